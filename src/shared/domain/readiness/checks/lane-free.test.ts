import { describe, expect, it } from 'vitest';
import { anEvening, aRun, aSession, aUse, HOUR, MIN, seenFrom, undressed, WARM_UP } from '#tests/support/evening.ts';
import { checkLaneFree } from './lane-free.ts';

const early = (end: number) => aSession({ id: 'early', name: 'Early Birds', warmUpAt: WARM_UP - 150 * MIN, startAt: WARM_UP - 140 * MIN, endAt: end, format: null });

describe('lane free in time', () => {
  it('is free when nobody has it', () => expect(checkLaneFree(seenFrom(5, anEvening()))).toMatchObject({ verdict: 'ok', waits: false, code: 'lane.free' }));

  it('waits for an earlier session that ends in time, clearing included', () => {
    const around = anEvening({ sessions: [aSession(), early(WARM_UP - 20 * MIN)] });
    const check = checkLaneFree(seenFrom(5, around));
    expect(check).toMatchObject({ verdict: 'ok', waits: true, code: 'lane.frees', waitsFor: { kind: 'people', name: 'Early Birds' } });
    expect(check.settles?.by).toBe(WARM_UP - 7.5 * MIN);
  });

  it('is tight when only the slow clearing misses warm-up, and holds when the likely one does', () => {
    const end = (minutes: number) => checkLaneFree(seenFrom(5, anEvening({ sessions: [aSession(), early(WARM_UP - minutes * MIN)] })));
    expect(end(14)).toMatchObject({ verdict: 'at-risk', code: 'lane.free-tight' });
    expect(end(10)).toMatchObject({ verdict: 'holds', code: 'lane.free-late' });
  });

  it('must be free earlier where it still has to be dressed', () => {
    const around = anEvening({ lanes: undressed(), runs: [aRun()], sessions: [aSession(), early(WARM_UP - 20 * MIN)] });
    expect(checkLaneFree(seenFrom(5, around))).toMatchObject({ verdict: 'at-risk', params: { neededAt: WARM_UP - 6 * MIN } });
  });

  it('open play goes by its time, or by games and bowlers; without either nobody knows', () => {
    const use = (change: object, now = WARM_UP - HOUR) => checkLaneFree(seenFrom(5, anEvening({ now, lanes: { 5: { use: aUse(change) } } })));
    expect(use({ until: WARM_UP - 30 * MIN })).toMatchObject({ code: 'lane.frees' });
    expect(use({ games: 1, bowlers: 2 }).params['freeAt']).toBe(WARM_UP - HOUR + 25 * MIN + 12.5 * MIN);
    expect(use({})).toMatchObject({ verdict: 'at-risk', code: 'lane.end-unknown' });
    expect(use({}, WARM_UP - 3 * HOUR)).toMatchObject({ verdict: 'ok', waits: true, code: 'lane.end-unknown' });
  });

  it('its own people are not in its way', () => {
    const use = aUse({ kind: 'warmup', from: WARM_UP - 5 * MIN });
    expect(checkLaneFree(seenFrom(5, anEvening({ now: WARM_UP - MIN, lanes: { 5: { use } } })))).toMatchObject({ code: 'lane.free' });
  });
});
