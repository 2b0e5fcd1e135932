import { describe, expect, it } from 'vitest';
import { leagueFaults } from './rules.ts';

const league = { fromLane: 25, toLane: 32, teams: 8, bowlersATeam: 4, absent: 0 };
const codes = (change: object) => leagueFaults({ ...league, ...change }, 32).map((fault) => [fault.field, fault.code]);

describe('rules of a league', () => {
  it('takes whole pairs with a lane for each team', () => expect(codes({})).toEqual([]));
  it.each([
    [{ fromLane: 5, toLane: 4 }, 'fromLane', 'league.lanes-reversed'],
    [{ fromLane: 25, toLane: 31 }, 'fromLane', 'league.lanes-whole-pairs'],
    [{ toLane: 34 }, 'toLane', 'league.lanes-outside-house'],
    [{ fromLane: -1 }, 'fromLane', 'league.lanes-outside-house'],
    [{ teams: 9 }, 'teams', 'league.teams-exceed-lanes'],
    [{ absent: 8 }, 'absent', 'league.absent-too-many'],
  ])('%o: %s %s', (change, field, code) => expect(codes(change)).toEqual([[field, code]]));
});
