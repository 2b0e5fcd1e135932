import { describe, expect, it } from 'vitest';
import { anEvening, aRun, aSession, aUse, HOUR, MIN, undressed, WARM_UP } from '#tests/support/evening.ts';
import { dressingWanted } from './dressing-wanted.ts';

const UNTIL = WARM_UP + 6 * HOUR;

describe('lanes that sessions still want dressed', () => {
  it('none, where all is as asked; all, where nothing lies', () => {
    expect(dressingWanted(anEvening(), UNTIL)).toEqual([]);
    expect(dressingWanted(anEvening({ lanes: undressed() }), UNTIL)).toEqual([{
      session: 'night-owls', name: 'Night Owls', warmUpAt: WARM_UP, pattern: 'owls', revision: 3,
      lanes: [5, 6, 7, 8].map((lane) => ({ lane, freeAt: WARM_UP - HOUR, run: null })),
    }]);
  });

  it('names the run that will do it, not one that lays another pattern', () => {
    const runsOf = (pattern: string) => dressingWanted(anEvening({ lanes: undressed(), runs: [aRun({ pattern, revision: pattern === 'owls' ? 3 : 1 })] }), UNTIL)[0]?.lanes.map((lane) => lane.run);
    expect(runsOf('owls')).toEqual(['M1/118', 'M1/118', 'M1/118', 'M1/118']);
    expect(runsOf('house')).toEqual([null, null, null, null]);
  });

  it('a lane is free when both of its pair are: when they leave, or nobody knows', () => {
    const until = WARM_UP - 20 * MIN;
    const lanes = dressingWanted(anEvening({ lanes: { ...undressed(), 6: { dressed: null, use: aUse({ until }) }, 7: { dressed: null, use: aUse() } } }), UNTIL)[0]?.lanes;
    expect(lanes?.map((lane) => lane.freeAt === null)).toEqual([false, false, true, true]);
    expect(lanes?.[0]?.freeAt).toBe(lanes?.[1]?.freeAt);
    expect(lanes?.[0]?.freeAt).toBeGreaterThanOrEqual(until);
  });

  it('a broken-off lane is wanted even if film lies there; a session that warms up, or another night, isn’t asked', () => {
    const broken = { 8: { brokenOff: { run: '117', machine: 'M1', at: WARM_UP - 2 * HOUR } } };
    expect(dressingWanted(anEvening({ lanes: broken }), UNTIL)[0]?.lanes.map((lane) => lane.lane)).toEqual([8]);
    expect(dressingWanted(anEvening({ lanes: undressed(), now: WARM_UP }), UNTIL)).toEqual([]);
    expect(dressingWanted(anEvening({ lanes: undressed() }), WARM_UP)).toEqual([]);
    expect(dressingWanted(anEvening({ lanes: undressed(), sessions: [aSession({ status: 'cancelled' })] }), UNTIL)).toEqual([]);
  });
});
