import { describe, expect, it } from 'vitest';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { ISOLATION_STEPS, RELEASE_STEPS } from '#shared/domain/calls/lockout-steps.ts';
import { alertsFor } from './alerts.ts';
import { offersFor } from './offers.ts';
import { withQueued } from './queued.ts';

const T0 = 1_778_780_340_000;
const odell = { id: 'u1', name: 'Odell' };
const mechanic = { id: 'u1', works: true, answers: true, manages: false };
const desk = { id: 'u3', works: false, answers: true, manages: false };

const aCall = (over: Partial<CallDetail> = {}): CallDetail => ({
  id: 'call-9', lane: 9, lanesHeld: [9], scope: 'lane', equipment: 'pinsetter', safety: null, origin: 'stop', text: null, code: null, status: 'unanswered', raisedAt: T0,
  receivedAt: T0, raisedBy: null, mechanic: null, acknowledgedAt: null, onLaneAt: null, returnedAt: null, parkedUntil: null, joined: 0, mechanicIn: null, alarmAt: null,
  escalation: 'none', playing: null, steps: [], lockout: null, cleared: null, history: { stopsIn200Frames: null, last: [] }, neighbour: null, outOfService: null,
  family: 'free-fall', causeTimes: {}, ...over,
});
const press = (kind: 'acknowledge' | 'onLane' | 'lockoutBegin' | 'lockoutStep' | 'lockoutRelease' | 'clear', body: Record<string, string | boolean> | null = null) => ({
  key: kind, user: 'u1', centre: 'c', call: 'call-9', kind, body, madeAt: T0 + 1,
});
const labels = (call: CallDetail, viewer = mechanic) => {
  const { main, second, more } = offersFor(call, viewer);
  return { main: main?.label ?? null, because: main?.because ?? null, second: second?.label ?? null, more: more.map((one) => one.label) };
};

describe('what comes next', () => {
  it('follows the life of a call, also while its steps are still queued', () => {
    let call = aCall();
    expect(labels(call)).toMatchObject({ main: 'Mine', second: 'Out of service' });
    call = withQueued(call, [press('acknowledge')], odell);
    expect(labels(call)).toMatchObject({ main: 'On lane', second: 'Out of service' });
    call = withQueued(call, [press('onLane')], odell);
    expect(labels(call)).toMatchObject({ main: 'Back running', because: null });
    expect(labels(withQueued(call, [press('clear', { cause: 'deck.pin-off-spot' })], odell))).toMatchObject({ main: null, second: null });
  });

  it('keeps "Back running" away until the release steps are done and the record is ended', () => {
    let call = withQueued(aCall({ status: 'on-lane', mechanic: odell, onLaneAt: T0 }), [press('lockoutBegin')], odell);
    const all = [...ISOLATION_STEPS.map((one) => one.code), ...RELEASE_STEPS];
    for (const step of all) {
      expect(labels(call)).toMatchObject({ main: 'Back running', because: expect.stringMatching(/release steps/) as string });
      call = withQueued(call, [press('lockoutStep', { step, done: true })], odell);
    }
    expect(labels(call)).toMatchObject({ main: 'End the lockout record', because: null });
    expect(labels(withQueued(call, [press('lockoutRelease')], odell))).toMatchObject({ main: 'Back running', because: null });
  });

  it('offers to take over from somebody else, and the manager alone a lock left behind', () => {
    const theirs = aCall({ status: 'on-lane', mechanic: { id: 'u2', name: 'Ives' }, onLaneAt: T0 });
    expect(labels(theirs).main).toBe('Take over from Ives');
    const locked = { ...theirs, lockout: { by: 'Ives', byId: 'u2', begunAt: T0, steps: {}, inMachineSince: null, releasedAt: null } };
    expect(labels(locked)).toMatchObject({ main: 'Back running', because: 'Ives has a lockout record open' });
    expect(labels(locked).more).toEqual([]);
    expect(labels(locked, { ...mechanic, manages: true }).more).toEqual(['The lock was left behind']);
  });

  it('lets the desk answer a danger, and nothing else', () => {
    expect(labels(aCall(), desk)).toMatchObject({ main: null, second: null, more: [] });
    expect(labels(aCall({ safety: 'wet-approach', scope: 'pair' }), desk)).toMatchObject({ main: 'Mine', second: 'Danger removed' });
    expect(labels(aCall({ safety: 'wet-approach', scope: 'pair' })).more).not.toContain('Park');
  });
});

describe('who hears of what', () => {
  const known = [aCall()];
  const later = (over: Partial<CallDetail>) => [aCall(over)];
  it('nobody, of what was there when the page was opened', () => expect(alertsFor(null, known, 'mechanic')).toEqual([]));
  it('mechanics of every new call, the desk of dangers only', () => {
    expect(alertsFor([], known, 'mechanic')).toMatchObject([{ why: 'new' }]);
    expect(alertsFor([], known, 'desk')).toEqual([]);
    expect(alertsFor([], later({ safety: 'smoke' }), 'desk')).toMatchObject([{ why: 'new' }]);
  });
  it('the one who is asked next, once', () => {
    expect(alertsFor(known, later({ escalation: 'desk' }), 'desk')).toMatchObject([{ why: 'still' }]);
    expect(alertsFor(known, later({ escalation: 'desk' }), 'manager')).toEqual([]);
    expect(alertsFor(later({ escalation: 'desk' }), later({ escalation: 'desk' }), 'desk')).toEqual([]);
  });
  it('everybody of an alarm', () => {
    const alarmed = later({ status: 'on-lane', alarmAt: T0 });
    expect(alertsFor(known, alarmed, 'desk')).toMatchObject([{ why: 'alarm' }]);
    expect(alertsFor(alarmed, alarmed, 'desk')).toEqual([]);
  });
  it('nobody of a call that was answered meanwhile', () => expect(alertsFor([], later({ status: 'acknowledged' }), 'mechanic')).toEqual([]));
});
