import { describe, expect, it } from 'vitest';
import { laneRangeFault, laneRuns, lanesBetween, pairRangeFault, pairsOf } from './lanes.ts';

describe('lanes of a league', () => {
  it.each([
    [1, 2, null], [25, 32, null], [5, 4, 'league.lanes-reversed'], [5, 5, 'league.lanes-whole-pairs'], [5, 7, 'league.lanes-whole-pairs'],
    [4, 7, 'league.lanes-whole-pairs'], [31, 34, 'league.lanes-outside-house'], [-1, 2, 'league.lanes-outside-house'],
  ])('lanes %i–%i: %s', (from, to, fault) => expect(pairRangeFault(from, to, 32)).toBe(fault));

  it('lets a party have one lane, but not one backwards or outside', () => {
    expect([laneRangeFault(5, 5, 32), laneRangeFault(6, 5, 32), laneRangeFault(33, 33, 32)]).toEqual([null, 'league.lanes-reversed', 'league.lanes-outside-house']);
  });

  it('names pairs and neighbouring runs', () => {
    expect(pairsOf([3, 4, 1, 2, 9])).toEqual([1, 3, 9]);
    expect(laneRuns([4, 3, 1, 2, 9, 10])).toEqual([{ from: 1, to: 4 }, { from: 9, to: 10 }]);
    expect(lanesBetween(25, 27)).toEqual([25, 26, 27]);
  });
});
