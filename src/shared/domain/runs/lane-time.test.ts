import { expect, it } from 'vitest';
import { laneTimeMs, paceOf } from './lane-time.ts';

const MIN = 60_000;

it('believes a machine’s own median once enough lanes are seen', () => {
  expect(laneTimeMs([1, 2, 3])).toBe(120_000);
  expect(laneTimeMs([90, 100, 110, 120, 130, 140, 150, 1000])).toBe(125);
});
it('is whole milliseconds, between two lanes too', () => expect(laneTimeMs([90, 90, 90, 100, 101, 150, 150, 150])).toBe(101));
it('a machine of which nothing is known has the usual pace', () => {
  expect(paceOf({ paces: {} }, 'heron')).toBe(2 * MIN);
  expect(paceOf({ paces: { heron: [MIN] } }, 'heron', 90_000)).toBe(90_000);
});
