import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { median, percentile } from './percentiles.ts';

describe('percentile, definition 7', () => {
  it('interpolates at (n − 1)p', () => {
    expect(percentile([1, 2, 3, 4], 0.25)).toEqual({ value: 1.75 });
    expect(percentile([10, 20, 30, 40, 50, 60, 70, 80, 90, 100], 0.9)).toEqual({ value: 91 });
    expect(median([9, 1, 5])).toEqual({ value: 5 });
    expect(median([9, 1, 5, 6])).toEqual({ value: 5.5 });
    expect(percentile([7], 0.9)).toEqual({ value: 7 });
  });

  it('sorts by size, not by text, and leaves the input alone', () => {
    const values = [100, 9, 20];
    expect(percentile(values, 0)).toEqual({ value: 9 });
    expect(values).toEqual([100, 9, 20]);
  });

  it('is missing without values, and refuses p outside 0…1', () => {
    expect(median([])).toEqual({ value: null, reason: 'no-values' });
    expect(() => percentile([1], 1.1)).toThrow(RangeError);
    expect(() => percentile([Number.NaN], 0.5)).toThrow(RangeError);
  });

  it('never falls as p rises and stays within the values', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -1000, max: 1000 }), { minLength: 1 }), fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), (values, p, q) => {
        const low = percentile(values, Math.min(p, q)).value as number;
        const high = percentile(values, Math.max(p, q)).value as number;
        expect(low).toBeLessThanOrEqual(high);
        expect(low).toBeGreaterThanOrEqual(Math.min(...values));
        expect(high).toBeLessThanOrEqual(Math.max(...values));
      }),
    );
  });
});
