import { describe, expect, it } from 'vitest';
import { anEvening, aRun, aSession, aUse, aCall, HOUR, MIN, seenFrom, undressed, WARM_UP } from '#tests/support/evening.ts';
import { checkPattern } from './pattern.ts';

const planned = (runs = [aRun()], more = {}) => anEvening({ lanes: undressed(more), runs });
const fresh = aSession({ fresh: true });

describe('pattern and age', () => {
  it('is fine on a lane dressed with the right revision', () => {
    expect(checkPattern(seenFrom(5, anEvening()))).toMatchObject({ verdict: 'ok', waits: false, code: 'pattern.dressed', params: { deliveries: 0 } });
  });

  it.each([
    [{ pattern: 'owls', revision: 2 }, 'pattern.other'],
    [{ pattern: 'house', revision: 1 }, 'pattern.other'],
    [{ pattern: null, revision: null }, 'pattern.unverified'],
    [{ pattern: 'owls', revision: 9 }, 'pattern.unverified'],
    [{ pattern: 'heard-of', revision: 1 }, 'pattern.unverified'],
  ])('holds when %o lies there and no run is planned: %s', (lies, code) => {
    const lanes = { 5: { dressed: { at: WARM_UP - HOUR, machine: 'M1', run: '1', ...lies } } };
    expect(checkPattern(seenFrom(5, anEvening({ lanes })))).toMatchObject({ verdict: 'holds', code });
  });

  it('takes any revision where none is asked for, and any pattern where none is', () => {
    const lanes = { 5: { dressed: { at: WARM_UP - HOUR, machine: 'M1', run: '1', pattern: 'owls', revision: 2 } }, 6: { dressed: { at: WARM_UP - HOUR, machine: 'M1', run: '1', pattern: null, revision: null } } };
    expect(checkPattern(seenFrom(5, anEvening({ lanes }), aSession({ revision: null }))).verdict).toBe('ok');
    expect(checkPattern(seenFrom(6, anEvening({ lanes }), aSession({ pattern: null, revision: null }))).verdict).toBe('ok');
  });

  it('waits for a run that ends in time, lane by lane at its machine\'s pace', () => {
    const third = checkPattern(seenFrom(7, planned()));
    expect(third).toMatchObject({ verdict: 'ok', waits: true, code: 'pattern.run-planned', waitsFor: { kind: 'run', name: '118' } });
    expect(third.settles).toEqual({ by: WARM_UP - 24 * MIN, what: 'run' });
  });

  it('is tight within the margin, and holds when the run ends after warm-up', () => {
    const tight = planned([aRun({ plannedStart: WARM_UP - 9 * MIN })]);
    expect(checkPattern(seenFrom(6, tight)).verdict).toBe('ok');
    expect(checkPattern(seenFrom(8, tight))).toMatchObject({ verdict: 'at-risk', code: 'pattern.run-tight' });
    expect(checkPattern(seenFrom(8, planned([aRun({ plannedStart: WARM_UP - 7 * MIN })])))).toMatchObject({ verdict: 'holds', code: 'pattern.run-late' });
  });

  it('slides with the clock when a planned run isn\'t begun', () => {
    const late = anEvening({ now: WARM_UP - 5 * MIN, lanes: undressed(), runs: [aRun()] });
    expect(checkPattern(seenFrom(8, late))).toMatchObject({ verdict: 'holds', code: 'pattern.run-late' });
    expect(checkPattern(seenFrom(5, late))).toMatchObject({ verdict: 'at-risk' });
  });

  it('a run of another pattern, or one that says none, settles nothing', () => {
    expect(checkPattern(seenFrom(5, planned([aRun({ pattern: 'house', revision: 1 })])))).toMatchObject({ verdict: 'holds', code: 'pattern.run-other', settles: null });
    expect(checkPattern(seenFrom(5, planned([aRun({ pattern: null, revision: null })])))).toMatchObject({ verdict: 'holds', code: 'pattern.run-unverified' });
  });

  it('a good film that a run of another pattern will cover holds', () => {
    expect(checkPattern(seenFrom(5, anEvening({ runs: [aRun({ pattern: 'house', revision: 1 })] })))).toMatchObject({ verdict: 'holds', code: 'pattern.run-other' });
  });

  it('without a run is at risk while there is time to plan one, then holds', () => {
    expect(checkPattern(seenFrom(5, anEvening({ lanes: undressed(), now: WARM_UP - 3 * HOUR })))).toMatchObject({ verdict: 'at-risk', code: 'pattern.never-dressed' });
    expect(checkPattern(seenFrom(5, anEvening({ lanes: undressed() })))).toMatchObject({ verdict: 'holds', latestStart: WARM_UP - 6 * MIN });
  });

  it('wears: more than 500 deliveries or 24 hours at warm-up', () => {
    expect(checkPattern(seenFrom(5, anEvening({ lanes: { 5: { deliveriesSince: 501 } } })))).toMatchObject({ verdict: 'holds', code: 'pattern.worn' });
    expect(checkPattern(seenFrom(5, anEvening({ lanes: { 5: { deliveriesSince: 500 } } }))).verdict).toBe('ok');
    const old = { at: WARM_UP - 25 * HOUR, machine: 'M1', run: '1', pattern: 'owls', revision: 3 };
    expect(checkPattern(seenFrom(5, anEvening({ lanes: { 5: { dressed: old } } })))).toMatchObject({ code: 'pattern.worn' });
  });

  it('forecasts: people on the lane wear it until warm-up', () => {
    const lanes = { 5: { deliveriesSince: 440, use: aUse({ until: WARM_UP - 10 * MIN }) } };
    expect(checkPattern(seenFrom(5, anEvening({ lanes })))).toMatchObject({ verdict: 'holds', code: 'pattern.worn' });
  });

  it('fresh: others rolled at most the tolerance, nobody is on it, and no mechanic was in it since', () => {
    const on = (lane: object, calls = [aCall(7)].slice(1)) => checkPattern(seenFrom(5, anEvening({ lanes: { 5: lane }, calls }), fresh));
    expect(on({ deliveriesSince: 5 }).verdict).toBe('ok');
    expect(on({ deliveriesSince: 6 })).toMatchObject({ verdict: 'holds', code: 'pattern.played-on', params: { deliveries: 6, tolerance: 5 } });
    expect(on({ use: aUse({ until: WARM_UP - 20 * MIN }) })).toMatchObject({ verdict: 'holds', code: 'pattern.played-on' });
    const repaired = aCall(5, { status: 'closed', onLane: { at: WARM_UP - 70 * MIN, by: { kind: 'user', id: 'm', name: 'Odell' } } });
    expect(on({}, [repaired])).toMatchObject({ verdict: 'holds', code: 'pattern.after-repair' });
    expect(checkPattern(seenFrom(5, anEvening({ calls: [repaired] }))).verdict).toBe('ok');
  });

  it('fresh: the session\'s own people don\'t count', () => {
    const own = aUse({ kind: 'league', label: 'Night Owls', from: WARM_UP - 8 * MIN });
    const lanes = { 5: { deliveriesSince: 30, deliveriesSinceBy: { [String(own.from)]: 28 }, use: own } };
    expect(checkPattern(seenFrom(5, anEvening({ now: WARM_UP - 2 * MIN, lanes }), fresh)).verdict).toBe('ok');
  });
});
