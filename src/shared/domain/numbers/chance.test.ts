import { expect, it } from 'vitest';
import { expectedOutside, probabilityOfOutside } from './chance.ts';

it('says how many of a house would stand out by chance', () => {
  expect(expectedOutside(32, 0.05)).toBeCloseTo(1.6, 12);
  expect(probabilityOfOutside(32, 0.05)).toBeCloseTo(1 - 0.95 ** 32, 12);
  expect(probabilityOfOutside(2, 0.5, 2)).toBeCloseTo(0.25, 12);
  expect(probabilityOfOutside(5, 0.1, 0)).toBe(1);
  expect(probabilityOfOutside(5, 0.1, 6)).toBe(0);
  expect(() => expectedOutside(5, 1.1)).toThrow(RangeError);
});
