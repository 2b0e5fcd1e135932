import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { poissonCdf } from './distributions.ts';
import { funnel, funnelCount, unclippedFunnelCount, type Funnel } from './funnel.ts';

const house = (counts: number[], frames = 1000): { lane: number; count: number; frames: number }[] =>
  counts.map((count, i) => ({ lane: i + 1, count, frames }));

describe('funnelCount', () => {
  it('is never below 0, and rises with the probability', () => {
    expect(unclippedFunnelCount(1, 0.025)).toBeLessThan(0);
    expect(funnelCount(1, 0.025)).toBe(0);
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 500, noNaN: true }), fc.double({ min: 0.001, max: 0.98, noNaN: true }), (mean, p) => {
        expect(unclippedFunnelCount(mean, p)).toBeLessThan(unclippedFunnelCount(mean, p + 0.01));
      }),
    );
  });
});

describe('funnel', () => {
  it('is missing without frames or stops', () => {
    expect(funnel(house([1, 2], 0))).toEqual({ value: null, reason: 'no-frames' });
    expect(funnel(house([0, 0]))).toEqual({ value: null, reason: 'no-events' });
  });

  it('shows the one lane that is far out of its own frames, and no other', () => {
    const result = funnel(house([4, 5, 3, 6, 4, 22, 5, 4])) as Funnel;
    expect(result.lanes.map((one) => one.position)).toEqual(['inside', 'inside', 'inside', 'inside', 'inside', 'above-outer', 'inside', 'inside']);
  });

  it('names lanes without frames apart and gives them no rate', () => {
    const result = funnel([...house([4, 5]), { lane: 9, count: 0, frames: 0 }]) as Funnel;
    expect(result.lanes.map((one) => one.lane)).toEqual([1, 2]);
    expect(result.withoutFrames).toEqual([9]);
  });

  it('says how many would stand out by chance, from exact tails', () => {
    // 5 expected each: beyond 9.38 means 10 or more, below 0.54 means none.
    const { inner } = (funnel(house([4, 5, 6])) as Funnel).byChance;
    const [up, down] = [1 - poissonCdf(9, 5), Math.exp(-5)];
    expect(inner.above).toBeCloseTo(3 * up, 10);
    expect(inner.below).toBeCloseTo(3 * down, 10);
    expect(inner.any).toBeCloseTo(1 - (1 - up - down) ** 3, 10);
    expect((funnel(house([4, 5, 6]), 1.5) as Funnel).byChance.outer.above).toBeCloseTo(0.003, 12);
  });

  it('widens by the factor of over-dispersion', () => {
    const plain = funnel(house([4, 5, 3, 22])) as Funnel;
    const wide = funnel(house([4, 5, 3, 22]), 2) as Funnel;
    const one = plain.lanes[0]!;
    const other = wide.lanes[0]!;
    expect(other.outer.high - plain.target).toBeCloseTo(2 * (one.outer.high - plain.target), 9);
    expect(other.inner.low).toBeGreaterThanOrEqual(0);
    expect(() => funnel(house([4, 5]), 0.9)).toThrow(RangeError);
  });

  it('narrows for a lane with more frames, whatever the unit', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 30 }), fc.integer({ min: 500, max: 4000 }), (stops, frames) => {
        const result = funnel([{ lane: 1, count: stops, frames }, { lane: 2, count: stops * 4, frames: frames * 4 }]) as Funnel;
        const [few, many] = result.lanes as [Funnel['lanes'][number], Funnel['lanes'][number]];
        expect(many.outer.high).toBeLessThan(few.outer.high);
        expect(few.rate).toBeCloseTo(result.target, 9);
      }),
    );
  });
});
