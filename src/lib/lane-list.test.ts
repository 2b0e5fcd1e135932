import { expect, it } from 'vitest';
import { parseLanes } from './lane-list.ts';

it('reads lanes as people write them, in their order', () => {
  expect(parseLanes('25–28, 3')).toEqual([25, 26, 27, 28, 3]);
  expect(parseLanes('8-6')).toEqual([8, 7, 6]);
  expect(['', 'x', '1–', '1 2', '100'].map(parseLanes)).toEqual([null, null, null, null, null]);
});
