import { expect, it } from 'vitest';
import { findRoot } from './root.ts';

it('finds roots to the last digits', () => {
  expect(findRoot((x) => x * x - 2, 0, 2)).toBeCloseTo(Math.SQRT2, 14);
  expect(findRoot((x) => Math.exp(-x) - 1e-12, 0, 1000)).toBeCloseTo(12 * Math.LN10, 12);
  expect(findRoot((x) => (x - 1) ** 3, -7, 2)).toBeCloseTo(1, 4);
  expect(findRoot((x) => x - 3, 3, 9)).toBe(3);
});

it('refuses a bracket without a change of sign', () => {
  expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(RangeError);
});
