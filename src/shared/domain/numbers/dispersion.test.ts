import { describe, expect, it } from 'vitest';
import { dispersion, type Dispersion } from './dispersion.ts';

describe('dispersion', () => {
  it('never narrows limits', () => {
    const even = dispersion([10, 10, 10], [1, 1, 1]) as Dispersion;
    expect(even).toMatchObject({ chisquare: 0, df: 2, factor: 1, widen: 1 });
    expect(even.p).toBe(1);
  });

  it('leaves out units without exposure', () => {
    expect(dispersion([10, 0, 20], [1, 0, 1])).toEqual(dispersion([10, 20], [1, 1]));
  });

  it('is less moved by one bad lane when winsorised, while the test stays the same', () => {
    const counts = [10, 11, 9, 10, 12, 8, 10, 9, 11, 60];
    const sizes = counts.map(() => 1);
    const plain = dispersion(counts, sizes) as Dispersion;
    const pulled = dispersion(counts, sizes, 0.1) as Dispersion;
    expect(pulled.factor).toBeLessThan(plain.factor / 2);
    expect(pulled.p).toBe(plain.p);
  });

  it('is missing for one unit or no event', () => {
    expect(dispersion([3], [1])).toEqual({ value: null, reason: 'too-few' });
    expect(dispersion([0, 0], [1, 1])).toEqual({ value: null, reason: 'no-events' });
    expect(() => dispersion([1, 1], [1, 1], 0.5)).toThrow(RangeError);
  });
});
