import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialPmf } from './distributions.ts';
import { compareRates, type RateComparison } from './two-rates.ts';

const compare = (a: number, b: number, c: number, d: number, level?: number): RateComparison =>
  compareRates({ count: a, frames: b }, { count: c, frames: d }, level) as RateComparison;
const count = fc.integer({ min: 0, max: 60 });
const frames = fc.integer({ min: 1, max: 5000 });

describe('compareRates', () => {
  it('is missing without frames or without events', () => {
    expect(compareRates({ count: 1, frames: 0 }, { count: 1, frames: 5 })).toEqual({ value: null, reason: 'no-frames' });
    expect(compareRates({ count: 0, frames: 5 }, { count: 0, frames: 5 })).toEqual({ value: null, reason: 'no-events' });
  });

  it('has no ratio and no upper limit when the second has no event', () => {
    expect(compare(4, 100, 0, 100)).toMatchObject({ ratio: null, high: null });
    expect(compare(0, 100, 4, 100)).toMatchObject({ ratio: 0, low: 0 });
  });

  it('adds up every outcome no likelier than the one seen', () => {
    fc.assert(
      fc.property(count, frames, count, frames, (a, b, c, d) => {
        fc.pre(a + c > 0);
        const n = a + c;
        const share = b / (b + d);
        const bar = binomialPmf(a, n, share) * (1 + 1e-7);
        let sum = 0;
        for (let i = 0; i <= n; i += 1) if (binomialPmf(i, n, share) <= bar) sum += binomialPmf(i, n, share);
        expect(compare(a, b, c, d).twoSided).toBeCloseTo(Math.min(1, sum), 9);
      }),
    );
  });

  it('counts the mirror image of an outcome as no likelier: 3 against 7 in equal frames', () => {
    expect(compare(3, 500, 7, 500).twoSided).toBeCloseTo(2 * (176 / 1024), 12);
    expect(compare(7, 500, 3, 500).twoSided).toBeCloseTo(2 * (176 / 1024), 12);
  });

  it('turns round when the sides change places', () => {
    fc.assert(
      fc.property(count, frames, count, frames, (a, b, c, d) => {
        fc.pre(a > 0 && c > 0);
        const one = compare(a, b, c, d);
        const other = compare(c, d, a, b);
        expect((one.ratio as number) * (other.ratio as number)).toBeCloseTo(1, 9);
        expect(one.low * (other.high as number)).toBeCloseTo(1, 7);
        expect(one.lower).toBeCloseTo(other.higher, 9);
        expect(one.twoSided).toBeCloseTo(other.twoSided, 7);
      }),
    );
  });

  it('widens with confidence and does not depend on the unit of frames', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), frames, fc.integer({ min: 1, max: 60 }), frames, (a, b, c, d) => {
        const narrow = compare(a, b, c, d, 0.8);
        const wide = compare(a, b, c, d, 0.95);
        expect(wide.low).toBeLessThan(narrow.low);
        expect(wide.high).toBeGreaterThan(narrow.high as number);
        const scaled = compare(a, b * 10, c, d * 10, 0.95);
        expect(Math.abs((scaled.low) / wide.low - 1)).toBeLessThan(1e-9);
        expect(narrow.low).toBeLessThan(narrow.ratio as number);
        expect(narrow.high).toBeGreaterThan(narrow.ratio as number);
      }),
    );
  });
});
