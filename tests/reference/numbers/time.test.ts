import { describe, expect, it } from 'vitest';
import { ewmaChart } from '#shared/domain/numbers/ewma.ts';
import { laplaceTest, type LaplaceTest } from '#shared/domain/numbers/laplace.ts';
import { militaryHandbookTest, type MilitaryHandbookTest } from '#shared/domain/numbers/military-handbook.ts';
import { mtbf, type Mtbf } from '#shared/domain/numbers/mtbf.ts';
import { fitGroupedPowerLaw, type GroupedPowerLaw } from '#shared/domain/numbers/power-law-grouped.ts';
import { currentMtbfLimits, fitPowerLaw, powerLawDistance, type PowerLawFit } from '#shared/domain/numbers/power-law.ts';
import { reversalChances, reverseArrangements, type ReverseArrangements } from '#shared/domain/numbers/reverse-arrangements.ts';
import { aircraft, coal, handbook, repairs, runningSum } from './fixtures.ts';
import { near } from './near.ts';
import { secondOpinion } from './second-opinion.ts';

describe('ten repairs in 1500 h (NIST/SEMATECH e-Handbook, sections 8.2.3.4 and 8.4.5.2)', () => {
  it('reverse arrangements: 33 of 45, significant improvement', () => {
    const intervals = repairs.times.map((time, i) => time - (repairs.times[i - 1] ?? 0));
    expect(intervals).toEqual([5, 35, 3, 132, 214, 323, 35, 48, 504, 179]);
    const result = reverseArrangements(intervals) as ReverseArrangements;
    expect(result).toMatchObject({ count: 33, max: 45, expected: 22.5, method: 'exact' });
    near(result.improving, 131_635 / 3_628_800);
    expect(result.z).toBeCloseTo(1.96774, 6);
  });

  it('Military Handbook: 37.23', () => {
    const result = militaryHandbookTest(repairs) as MilitaryHandbookTest;
    near(result.chisquare, 37.228081483, 1e-10);
    expect(result.df).toBe(20);
    near(result.improving, 0.010986357, 1e-7);
    near(result.worsening, 0.989013643);
  });

  it('Laplace: −1.33', () => {
    const result = laplaceTest(repairs) as LaplaceTest;
    near(result.z, -1.326949183);
    near(result.improving, 0.092262747, 1e-8);
  });

  it('power law, bias-corrected: shape 0.483506, scale 0.2913003, MTBF 310.234, 80 % limits 157.7138 and 548.5566', () => {
    const fit = fitPowerLaw(repairs) as PowerLawFit;
    near(fit.shape, 0.4835059794, 1e-9);
    near(fit.scale, 0.2913002686, 1e-9);
    near(fit.currentMtbf, 310.2340123624);
    const limits = currentMtbfLimits(fit.currentMtbf, 10, 0.8) as { low: number; high: number };
    near(limits.low, 157.7138340394, 1e-8);
    near(limits.high, 548.5565977314, 1e-8);
  });

  it('power law, maximum likelihood', () => {
    const fit = fitPowerLaw(repairs, 'maximum-likelihood') as PowerLawFit;
    near(fit.shape, 0.5372288660341876);
    near(fit.scale, 0.1966582157, 1e-9);
    near(fit.currentMtbf, 279.2106111, 1e-9);
  });
});

describe('MIL-HDBK-189 (1981), appendix C, 27 failures in 300 h', () => {
  it('power law, distance, and both trend tests', () => {
    const fit = fitPowerLaw(handbook, 'maximum-likelihood') as PowerLawFit;
    near(fit.shape, 0.7163392624);
    near(fit.scale, 0.4538418614);
    near(1 / fit.currentMtbf, 0.0644705336);
    near(powerLawDistance(handbook).value, 0.0910611224);
    expect((laplaceTest(handbook) as LaplaceTest).z).toBeCloseTo(-2.318, 3);
    const military = militaryHandbookTest(handbook) as MilitaryHandbookTest;
    expect(military.chisquare).toBeCloseTo(75.383276, 6);
    expect(military.df).toBe(54);
    expect(military.worsening).toBeCloseTo(0.971135, 6);
  });

  it('grouped: 49 failures in five inspections every 20 h, shape 0.753 and scale 1.53 (from memory)', () => {
    const fit = fitGroupedPowerLaw([20, 40, 60, 80, 100], [13, 16, 5, 8, 7]) as GroupedPowerLaw;
    expect(fit.shape).toBeCloseTo(0.753, 3);
    expect(fit.scale).toBeCloseTo(1.53, 2);
  });
});

describe('reverse arrangements', () => {
  // Critical values of the NIST/SEMATECH e-Handbook, section 8.2.3.4, recomputed from the exact distribution.
  it.each([
    [4, 6, 6, null],
    [5, 9, 9, 10],
    [6, 12, 13, 14],
    [7, 16, 17, 19],
    [8, 20, 22, 24],
    [9, 25, 27, 30],
    [10, 31, 33, 36],
    [11, 37, 39, 43],
    [12, 43, 46, 51],
  ])('critical values for %i intervals', (r, ...critical) => {
    const chances = reversalChances(r);
    [0.1, 0.05, 0.01].forEach((bar, i) => {
      let tail = 0;
      let first: number | null = null;
      for (let count = chances.length - 1; count >= 0; count -= 1) {
        tail += chances[count] as number;
        if (tail <= bar + 1e-12) first = count;
      }
      expect(first).toBe(critical[i]);
    });
  });

  it(`agree with Kendall’s exact test in ${secondOpinion.versions}`, () => {
    const { intervals, concordant, greater, less } = secondOpinion.kendall;
    const result = reverseArrangements(intervals) as ReverseArrangements;
    expect(result.count).toBe(concordant);
    near(result.improving, greater);
    near(result.worsening, less);
  });
});

describe('aircraft air conditioning, thirteen planes (Proschan 1963), failure-terminated', () => {
  it.each(aircraft)('plane $plane', ({ intervals, low, high, laplace, militaryHandbook, ...plane }) => {
    const times = runningSum(intervals);
    const end = times[times.length - 1] as number;
    const limits = mtbf(intervals.length, end, 0.95, 'failure') as Mtbf;
    expect(limits.value).toBeCloseTo(plane.mtbf, 3);
    expect(limits.low).toBeCloseTo(low, 2);
    expect(limits.high).toBeCloseTo(high, 2);
    const series = { times, end, termination: 'failure' as const };
    expect((laplaceTest(series) as LaplaceTest).z).toBeCloseTo(laplace, 3.9);
    const military = militaryHandbookTest(series) as MilitaryHandbookTest;
    expect(military.chisquare).toBeCloseTo(militaryHandbook, 3.9);
    expect(military.df).toBe(2 * (intervals.length - 1));
  });
});

it('coal-mining disasters from the first to the last: a falling rate (Jarrett 1979; statistics recomputed)', () => {
  const times = coal.slice(1).map((date) => date - (coal[0] as number));
  const series = { times, end: times[times.length - 1] as number, termination: 'failure' as const };
  expect((laplaceTest(series) as LaplaceTest).z).toBeCloseTo(-7.661952, 5.9);
  const military = militaryHandbookTest(series) as MilitaryHandbookTest;
  expect(military.chisquare).toBeCloseTo(566.488066, 5);
  expect(military.df).toBe(378);
  near(military.improving, 1.07e-9, 5e-3);
});

it('exponentially weighted chart (NIST/SEMATECH e-Handbook, section 6.3.2.4; from memory)', () => {
  const values = [52, 47, 53, 49.3, 50.1, 47, 51, 50.1, 51.2, 50.5, 49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1];
  const points = ewmaChart(values, 50, 2.0539, { weight: 0.3 });
  const smoothed = [50.6, 49.52, 50.56, 50.18, 50.16, 49.21, 49.75, 49.85, 50.26, 50.33, 50.11, 49.36, 49.52, 50.05, 49.38, 49.92, 50.73, 51.23, 51.94, 51.99];
  points.forEach((point, i) => expect(Math.abs(point.z - (smoothed[i] as number))).toBeLessThan(0.011));
  expect(points[19]?.high).toBeCloseTo(52.5884, 3);
  expect(points[19]?.low).toBeCloseTo(47.4115, 3);
  expect(points.every((point) => point.outside === null)).toBe(true);
});
