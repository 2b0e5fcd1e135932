import { expect, it } from 'vitest';
import { militaryHandbookTest, type MilitaryHandbookTest } from './military-handbook.ts';

it('does not depend on the unit of time', () => {
  const one = militaryHandbookTest({ times: [1, 2, 4], end: 10 }) as MilitaryHandbookTest;
  const other = militaryHandbookTest({ times: [60, 120, 240], end: 600 }) as MilitaryHandbookTest;
  expect(one.chisquare).toBeCloseTo(other.chisquare, 12);
  expect(one.df).toBe(6);
  expect(one.improving + one.worsening).toBeCloseTo(1, 12);
});

it('is missing without an event, or with one at the very start', () => {
  expect(militaryHandbookTest({ times: [], end: 10 })).toEqual({ value: null, reason: 'too-few' });
  expect(militaryHandbookTest({ times: [0, 3], end: 10 })).toEqual({ value: null, reason: 'event-at-zero' });
});
