import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
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
    expect(result.byChance.inner).toBeCloseTo(0.1, 12);
    expect(result.byChance.anyOuter).toBeCloseTo(1 - 0.998 ** 2, 12);
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
