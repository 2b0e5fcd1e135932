import { describe, expect, it } from 'vitest';
import { dispersion } from './dispersion.ts';
import { poissonCdf } from './distributions.ts';
import { ewmaRateChart } from './ewma.ts';
import { changeFinding, driftFinding, laneFinding, SIGNIFICANCE, STRICT, trendFinding, type LaneFinding } from './findings.ts';
import { funnel } from './funnel.ts';
import { missing } from './missing.ts';
import type { RateComparison } from './two-rates.ts';

function lanes(counts: number[], frames = 1000): LaneFinding {
  const house = counts.map((count, i) => ({ lane: i + 1, count, frames }));
  return laneFinding(funnel(house), dispersion(counts, counts.map(() => frames)));
}
const comparison = (change: Partial<RateComparison>): RateComparison => ({ ratio: 0.5, low: 0.3, high: 0.9, twoSided: 0.02, lower: 0.01, higher: 0.995, ...change });

describe('laneFinding', () => {
  it('names the lane that is far out, and only it', () => {
    expect(lanes([4, 5, 3, 6, 4, 5, 6, 3, 24, 4, 5, 4])).toMatchObject({ code: 'lanes.watch', lanes: [9], of: 12 });
  });

  it('names no lane when all lie inside, or nothing was counted', () => {
    expect(lanes([4, 5, 3, 6])).toEqual({ code: 'lanes.alike', of: 4 });
    expect(lanes([0, 0])).toEqual({ code: 'lanes.no-stops' });
    expect(lanes([1, 1], 0)).toEqual({ code: 'lanes.no-frames' });
  });

  it('takes one lane of forty between the limits for chance, and five for more', () => {
    const calm = Array.from({ length: 40 }, (_, i) => 9 + (i % 3));
    expect(lanes(calm.map((count, i) => (i === 6 ? 18 : count)))).toMatchObject({ code: 'lanes.high-by-chance', lanes: [7], byChance: expect.closeTo(40 * (1 - poissonCdf(16, 10.2)), 9) });
    expect(lanes(calm.map((count, i) => (i < 5 ? 19 : count)))).toMatchObject({ code: 'lanes.several-high', lanes: [1, 2, 3, 4, 5] });
  });

  it('blames no single lane in a house that is uneven as a whole', () => {
    expect(lanes([2, 40, 3, 2, 38, 1, 2, 44])).toMatchObject({ code: 'lanes.uneven', lanes: [2, 5, 8], of: 8 });
  });
});

describe('changeFinding', () => {
  it('is a finding below the bar, not on it', () => {
    expect(changeFinding(comparison({ twoSided: SIGNIFICANCE }), 800)).toMatchObject({ code: 'change.not-shown', still: 800 });
    expect(changeFinding(comparison({ twoSided: SIGNIFICANCE - 1e-9 }), 800)).toMatchObject({ code: 'change.fewer' });
    expect(changeFinding(comparison({ ratio: 2, lower: 0.99, higher: 0.01 }), null)).toMatchObject({ code: 'change.more' });
  });

  it('compares nothing with nothing', () => {
    expect(changeFinding(missing('no-frames'), null)).toEqual({ code: 'change.no-frames' });
    expect(changeFinding(missing('no-events'), null)).toEqual({ code: 'change.no-stops' });
  });
});

describe('trendFinding', () => {
  it('doubles the smaller side and asks for less than the strict bar', () => {
    expect(trendFinding({ improving: STRICT / 2, worsening: 0.99 })).toMatchObject({ code: 'trend.steady', p: STRICT });
    expect(trendFinding({ improving: 0.0049, worsening: 0.99 })).toMatchObject({ code: 'trend.improving' });
    expect(trendFinding({ improving: 0.99, worsening: 0.0049 })).toMatchObject({ code: 'trend.worsening' });
    expect(trendFinding(missing('too-few'))).toEqual({ code: 'trend.too-few' });
  });
});

describe('driftFinding', () => {
  const steady = Array.from({ length: 20 }, () => 10);
  const units = (counts: number[]): number[] => counts.map(() => 1);
  const drift = (counts: number[]): ReturnType<typeof driftFinding> => driftFinding(ewmaRateChart(counts, units(counts), 10));

  it('tells a rate that has moved, and for how long', () => {
    const up = drift([...steady, 17, 17, 17, 17]);
    expect(up).toMatchObject({ code: 'drift.up' });
    expect(drift([...steady, 17, 17, 17, 17, 17])).toEqual({ code: 'drift.up', periods: (up as { periods: number }).periods + 1 });
    expect(drift([...steady, 3, 3, 3, 3, 3, 3])).toMatchObject({ code: 'drift.down' });
  });

  it('is silent about one odd week, about what is over, and without data', () => {
    expect(drift([...steady, 17])).toEqual({ code: 'drift.none' });
    expect(drift([...steady, 17, 17, 17, 17, ...steady])).toEqual({ code: 'drift.none' });
    expect(drift([])).toEqual({ code: 'drift.no-data' });
  });
});
