import { expect, it } from 'vitest';
import { laplaceTest, type LaplaceTest } from './laplace.ts';

it('is zero for events spread evenly, and turns round with time', () => {
  expect(laplaceTest({ times: [2, 5, 8], end: 10 })).toMatchObject({ z: 0, twoSided: 1 });
  const early = laplaceTest({ times: [1, 2, 4], end: 10 }) as LaplaceTest;
  const late = laplaceTest({ times: [6, 8, 9], end: 10 }) as LaplaceTest;
  expect(early.z).toBeCloseTo(-late.z, 12);
  expect(early.improving).toBeCloseTo(late.worsening, 12);
  expect(early.improving).toBeLessThan(0.5);
});

it('is missing without an event to look at', () => {
  expect(laplaceTest({ times: [], end: 10 })).toEqual({ value: null, reason: 'too-few' });
  expect(laplaceTest({ times: [10], end: 10, termination: 'failure' })).toEqual({ value: null, reason: 'too-few' });
});
