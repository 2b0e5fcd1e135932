import { expect, it } from 'vitest';
import { FORGOTTEN_AFTER, usedSpan } from './forgotten-lane.ts';

const MINUTE = 60_000;
const open = { from: 0, to: 120 * MINUTE };

it('ends ten minutes after the last delivery, or at closing when that came first', () => {
  expect(usedSpan(open, 50 * MINUTE)).toEqual({ from: 0, to: 60 * MINUTE });
  expect(usedSpan(open, 115 * MINUTE)).toEqual(open);
  expect(usedSpan(open, open.to - FORGOTTEN_AFTER)).toEqual(open);
});

it('counts ten minutes for a lane on which nobody bowled', () => {
  expect(usedSpan(open, null)).toEqual({ from: 0, to: 10 * MINUTE });
  expect(usedSpan({ from: 9, to: 9 }, null)).toEqual({ from: 9, to: 9 });
});
