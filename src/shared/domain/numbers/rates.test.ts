import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { framesPerStop, perThousand, poissonLimits, pooled } from './rates.ts';

const counts = fc.integer({ min: 0, max: 2000 });

describe('perThousand', () => {
  it('is missing without frames, even with a count', () => {
    expect(perThousand(3, 0)).toEqual({ value: null, reason: 'no-frames' });
  });

  it('has a zero rate with an upper limit for no stops', () => {
    const result = perThousand(0, 1000);
    expect(result).toMatchObject({ rate: 0, low: 0 });
    expect((result as { high: number }).high).toBeCloseTo(3.688879454113936, 12);
  });

  it('refuses counts and frames that can not be', () => {
    expect(() => perThousand(-1, 10)).toThrow(RangeError);
    expect(() => perThousand(1.5, 10)).toThrow(RangeError);
    expect(() => perThousand(1, -10)).toThrow(RangeError);
    expect(() => perThousand(1, Number.NaN)).toThrow(RangeError);
    expect(() => perThousand(1, 10, 1)).toThrow(RangeError);
  });

  it('scales with the unit of exposure', () => {
    fc.assert(
      fc.property(counts, fc.integer({ min: 1, max: 100_000 }), fc.integer({ min: 2, max: 50 }), (count, frames, factor) => {
        const one = perThousand(count, frames) as { rate: number; low: number; high: number };
        const other = perThousand(count, frames * factor) as { rate: number; low: number; high: number };
        for (const key of ['rate', 'low', 'high'] as const) expect(other[key] * factor).toBeCloseTo(one[key], 9 - Math.ceil(Math.log10(one.high + 1)));
      }),
    );
  });
});

describe('poissonLimits', () => {
  it('hold the count and widen with confidence', () => {
    fc.assert(
      fc.property(counts, fc.double({ min: 0.5, max: 0.99, noNaN: true }), (count, level) => {
        const narrow = poissonLimits(count, level);
        const wide = poissonLimits(count, level + 0.009);
        expect(narrow.low).toBeLessThanOrEqual(count);
        expect(narrow.high).toBeGreaterThan(count);
        expect(wide.high).toBeGreaterThan(narrow.high);
        if (count > 0) expect(wide.low).toBeLessThan(narrow.low);
      }),
    );
  });
});

describe('framesPerStop', () => {
  it('is the reciprocal of the rate', () => {
    const result = framesPerStop(4, 1000) as { value: number; low: number; high: number };
    expect(result.value).toBe(250);
    expect(result.low).toBeCloseTo(1000 / poissonLimits(4).high, 9);
    expect(result.high).toBeCloseTo(1000 / poissonLimits(4).low, 9);
  });

  it('knows only a lower limit without a stop, and nothing without frames', () => {
    expect(framesPerStop(0, 1000)).toMatchObject({ value: null, high: null });
    expect((framesPerStop(0, 1000) as { low: number }).low).toBeCloseTo(271.085, 3);
    expect(framesPerStop(0, 0)).toEqual({ value: null, reason: 'no-frames' });
  });
});

describe('pooled', () => {
  it('adds counts and frames, never averages rates', () => {
    expect(pooled([{ count: 1, frames: 100 }, { count: 1, frames: 1900 }])).toEqual(perThousand(2, 2000));
  });

  it('does not pool scored with estimated frames', () => {
    expect(pooled([{ count: 1, frames: 100, basis: 'scored' }, { count: 1, frames: 100, basis: 'estimated' }])).toEqual({ value: null, reason: 'mixed-basis' });
  });

  it('is missing for nothing', () => {
    expect(pooled([])).toEqual({ value: null, reason: 'no-frames' });
  });
});
