import { expect, it } from 'vitest';
import { fitGroupedPowerLaw, type GroupedPowerLaw } from './power-law-grouped.ts';
import { fitPowerLaw, type PowerLawFit } from './power-law.ts';

it('agrees with single times when the groups are fine', () => {
  const times = [3.5, 9.5, 20.5, 41.5, 77.5];
  const ends = Array.from({ length: 10_000 }, (_, i) => (i + 1) / 100);
  const counts = ends.map((end) => times.filter((time) => time > end - 0.01 && time <= end).length);
  const grouped = fitGroupedPowerLaw(ends, counts) as GroupedPowerLaw;
  const single = fitPowerLaw({ times, end: 100 }, 'maximum-likelihood') as PowerLawFit;
  expect(grouped.shape).toBeCloseTo(single.shape, 3);
});

it('finds a constant rate in counts that follow the widths', () => {
  expect((fitGroupedPowerLaw([10, 30, 60], [10, 20, 30]) as GroupedPowerLaw).shape).toBeCloseTo(1, 12);
  expect((fitGroupedPowerLaw([10, 30, 60], [100, 800, 2700]) as GroupedPowerLaw).shape).toBeCloseTo(2, 12);
});

it('is missing where there is no maximum, and refuses ends that do not rise', () => {
  expect(fitGroupedPowerLaw([10, 20], [5, 0])).toEqual({ value: null, reason: 'no-maximum' });
  expect(fitGroupedPowerLaw([10, 20], [0, 5])).toEqual({ value: null, reason: 'no-maximum' });
  expect(fitGroupedPowerLaw([10, 20], [0, 0])).toEqual({ value: null, reason: 'too-few' });
  expect(() => fitGroupedPowerLaw([20, 10], [1, 1])).toThrow('rise');
});
