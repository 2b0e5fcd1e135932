import { describe, expect, it } from 'vitest';
import { aCall, anEvening, aSession, MIN, seenFrom, undressed, WARM_UP } from '#tests/support/evening.ts';
import { checkPinsetter } from './pinsetter.ts';

const odell = { kind: 'user' as const, id: 'm1', name: 'Odell' };
const stopped = { stop: { since: WARM_UP - 63 * MIN, reason: 'fault', code: null, text: null, pins: null } };
const of = (call: ReturnType<typeof aCall>, lanes = {}) => checkPinsetter(seenFrom(7, anEvening({ calls: [call], lanes })));

describe('pinsetter', () => {
  it('is fine without calls', () => expect(checkPinsetter(seenFrom(7, anEvening()))).toMatchObject({ verdict: 'ok', code: 'pinsetter.fine' }));

  it.each([
    [{}, 'pinsetter.unanswered', null],
    [{ status: 'acknowledged' as const, acknowledged: { at: 1, by: odell } }, 'pinsetter.coming', 'Odell'],
    [{ status: 'on-lane' as const, onLane: { at: 1, by: odell } }, 'pinsetter.on-lane', 'Odell'],
    [{ status: 'parked' as const, parked: { at: 1, until: WARM_UP, reason: 'part', by: odell } }, 'pinsetter.parked', null],
    [{ status: 'out-of-service' as const, outOfService: { at: 1, reason: 'belt', by: odell, backAt: null } }, 'pinsetter.out-of-service', null],
    [{ status: 'on-lane' as const, onLane: { at: 1, by: odell }, lockout: { by: odell, begunAt: 1, steps: {}, inMachineSince: 2, releasedAt: null, alarmAt: null } }, 'pinsetter.mechanic-in', 'Odell'],
  ])('holds while a stop stands: %o', (change, code, name) => {
    expect(of(aCall(7, change))).toMatchObject({ verdict: 'holds', code, waitsFor: { kind: 'mechanic', name } });
  });

  it('a machine that runs again and only lacks its cause doesn\'t hold', () => {
    const returned = aCall(7, { returnedAt: WARM_UP - 50 * MIN, stops: [{ from: 1, to: 2 }] });
    expect(of(returned)).toMatchObject({ verdict: 'ok', code: 'pinsetter.cause-missing' });
  });

  it('somebody\'s call without a stop holds until it is answered, then is at risk', () => {
    const asked = aCall(7, { origin: 'desk', stops: [] });
    expect(of(asked)).toMatchObject({ verdict: 'holds', code: 'pinsetter.unanswered' });
    expect(of({ ...asked, status: 'acknowledged', acknowledged: { at: 1, by: odell } })).toMatchObject({ verdict: 'at-risk', code: 'pinsetter.coming' });
  });

  it('holds out of service, and on a stop that nobody has called for', () => {
    expect(checkPinsetter(seenFrom(7, anEvening({ lanes: { 7: { outOfService: { since: 1, reason: 'belt', by: 'Odell' } } } })))).toMatchObject({ verdict: 'holds', code: 'pinsetter.out-of-service' });
    expect(checkPinsetter(seenFrom(7, anEvening({ lanes: { 7: stopped } })))).toMatchObject({ verdict: 'holds', code: 'pinsetter.stopped' });
  });

  it('says by when: in time to dress it where that is still to come, else by warm-up', () => {
    expect(of(aCall(7)).settles).toEqual({ by: WARM_UP, what: 'mechanic' });
    const must = of(aCall(7), undressed());
    expect(must.params).toMatchObject({ byAt: WARM_UP - 4 * MIN, dress: 1 });
    expect(must.latestStart).toBe(WARM_UP - 6 * MIN);
    const fresh = checkPinsetter(seenFrom(7, anEvening({ calls: [aCall(7)] }), aSession({ fresh: true })));
    expect(fresh.params).toMatchObject({ dress: 1 });
  });

  it('another lane\'s call is another lane\'s matter', () => {
    expect(checkPinsetter(seenFrom(8, anEvening({ calls: [aCall(7)] }))).verdict).toBe('ok');
  });
});
