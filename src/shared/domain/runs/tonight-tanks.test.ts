import { expect, it } from 'vitest';
import type { PatternRevision } from './pattern.ts';
import { tanksTonight } from './tonight-tanks.ts';

/** 2 × 37 × 50 µL = 3.70 mL a lane. */
const body: PatternRevision = { lengthFt: 40, passes: [{ direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 2, ul: 50, product: 'A', fromFt: 0, toFt: 30 }] };
const revisionOf = (code: string) => (code === 'owls' ? { body } : undefined);
const ahead = [{ lanes: [1, 2], pattern: 'owls', revision: 3 }, { lanes: [9], pattern: null, revision: null }, { lanes: [5, 6], pattern: 'owls', revision: 3 }];

it('names the lane before which a tank runs out, over all runs ahead', () => {
  expect(tanksTonight('heron', { tankA: 11_000, tankB: null }, ahead, revisionOf)).toEqual([{ machine: 'heron', store: 'tankA', lane: 5, shortUl: 100 }]);
  expect(tanksTonight('heron', { tankA: 14_800, tankB: 0 }, ahead, revisionOf)).toEqual([]);
});
it('says nothing where nothing is told', () => expect(tanksTonight('heron', { tankA: null, tankB: null }, ahead, revisionOf)).toEqual([]));
