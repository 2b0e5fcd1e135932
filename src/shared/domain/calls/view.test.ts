import { describe, expect, it } from 'vitest';
import { foldHouse } from '../house/fold.ts';
import { emptyHouse, type House } from '../house/state.ts';
import type { Fact, FactData, FactType, Person } from '../journal/fact.ts';
import { DEFAULT_ESCALATION, escalationOf, statusAt } from './escalation.ts';
import { downtimeOf, pastCall, stopsInLastFrames } from './history.ts';
import { ISOLATION_STEPS } from './lockout-steps.ts';
import type { Call } from './state.ts';
import { callFacts, callOrder, lockoutOpen, recordedInside } from './view.ts';

const MINUTE = 60_000;
const T0 = Date.UTC(2026, 4, 14, 17, 39);
const odell: Person = { kind: 'user', id: 'u1', name: 'Odell' };

/** Folds facts one after another, each a minute after the last. */
function night(...told: { [T in FactType]: [T, FactData[T], Person?] }[FactType][]): { house: House; call: Call } {
  let house = emptyHouse(32);
  let seq = 0;
  for (const [type, data, by] of told) {
    const time = T0 + seq * MINUTE;
    seq += 1;
    const asked = 'call' in data && data.call === '' ? { ...data, call: theCall(house).id } : data;
    house = foldHouse(house, { seq, n: 0, source: 's', id: `e${seq}`, time, receivedAt: time, by: by ?? null, type, data: asked } as Fact);
  }
  return { house, call: theCall(house) };
}
const theCall = (house: House): Call => [...Object.values(house.calls.open), ...house.calls.closed][0]!;
const stop = ['pinsetter.stopped', { lane: 9, code: 'E12' }] as ['pinsetter.stopped', FactData['pinsetter.stopped']];

describe('escalation', () => {
  const { call } = night(stop);

  it('asks the other mechanic at 3 minutes, the desk at 6, the manager at 9, to the millisecond', () => {
    const at = (ms: number) => escalationOf(call, T0 + ms);
    expect([at(0), at(3 * MINUTE - 1), at(3 * MINUTE), at(6 * MINUTE), at(9 * MINUTE)]).toEqual(['none', 'none', 'other-mechanic', 'desk', 'manager']);
  });

  it('counts from arrival, not from when it happened', () => {
    expect(escalationOf({ ...call, receivedAt: T0 + 10 * MINUTE }, T0 + 11 * MINUTE)).toBe('none');
  });

  it('stops once somebody said mine', () => {
    expect(escalationOf(night(stop, ['call.acknowledged', { call: '' }, odell]).call, T0 + 60 * MINUTE)).toBe('none');
  });

  it('puts a danger before the desk at once', () => {
    const danger = night(['call.raised', { lane: 9, equipment: 'approach', safety: 'wet-approach', from: 'desk' }]).call;
    expect(danger.lanesHeld).toEqual([9, 10]);
    expect(escalationOf(danger, T0)).toBe('desk');
    expect(escalationOf(danger, T0 + DEFAULT_ESCALATION.otherMechanicMs)).toBe('manager');
  });

  it('lets a parked call ask again when its end has passed', () => {
    const parked = night(stop, ['call.parked', { call: '', reason: 'part', until: T0 + 20 * MINUTE }, odell]).call;
    expect(statusAt(parked, T0 + 19 * MINUTE)).toBe('parked');
    expect(statusAt(parked, T0 + 20 * MINUTE)).toBe('unanswered');
    expect(escalationOf(parked, T0 + 22 * MINUTE)).toBe('none');
    expect(escalationOf(parked, T0 + 23 * MINUTE)).toBe('other-mechanic');
  });
});

describe('view of a call', () => {
  it('says who waits, who comes and what joined', () => {
    const { house, call } = night(['lane.opened', { lane: 9, use: 'league', label: 'Thursday Scratch' }], stop, stop, ['call.acknowledged', { call: '' }, odell]);
    expect(callFacts(call, house, T0 + 5 * MINUTE, DEFAULT_ESCALATION)).toMatchObject({
      lane: 9, status: 'acknowledged', joined: 1, code: 'E12', raisedAt: T0 + MINUTE, mechanic: { id: 'u1', name: 'Odell' },
      acknowledgedAt: T0 + 3 * MINUTE, mechanicIn: null, playing: { kind: 'league', label: 'Thursday Scratch' },
    });
  });

  it('says that somebody is in the machine from the last step to the release, and that it counted meanwhile', () => {
    const steps = ISOLATION_STEPS.map((step) => ['lockout.stepped', { call: '', step: step.code, done: true }, odell] as ['lockout.stepped', FactData['lockout.stepped'], Person]);
    const half = night(stop, ['lockout.begun', { call: '' }, odell], ...steps.slice(0, -1));
    expect(recordedInside(half.call)).toBeNull();
    expect(lockoutOpen(half.call)).toBe(true);
    const inside = night(stop, ['lockout.begun', { call: '' }, odell], ...steps, ['lane.counted', { lane: 9, cycles: 1 }]);
    expect(callFacts(inside.call, inside.house, T0, DEFAULT_ESCALATION)).toMatchObject({ mechanicIn: { by: 'Odell', since: T0 + (steps.length + 1) * MINUTE }, alarmAt: T0 + (steps.length + 2) * MINUTE });
    const out = night(stop, ['lockout.begun', { call: '' }, odell], ...steps, ['lane.counted', { lane: 9, cycles: 1 }], ['lockout.released', { call: '' }, odell]);
    expect(callFacts(out.call, out.house, T0, DEFAULT_ESCALATION)).toMatchObject({ mechanicIn: null, alarmAt: null });
    expect(lockoutOpen(out.call)).toBe(false);
  });
});

describe('order of calls', () => {
  const call = (over: object) => ({ safety: null, alarmAt: null, status: 'unanswered' as const, returnedAt: null, raisedAt: T0, mechanic: null, ...over });

  it('puts dangers first, then mine, then unanswered, the oldest first', () => {
    const calls = [
      call({ name: 'out', status: 'out-of-service' }), call({ name: 'new', raisedAt: T0 + 2 }), call({ name: 'old', raisedAt: T0 + 1 }),
      call({ name: 'returned', returnedAt: T0 }), call({ name: 'theirs', status: 'on-lane', mechanic: { id: 'u2', name: 'Ives' } }),
      call({ name: 'mine', status: 'acknowledged', mechanic: { id: 'u1', name: 'Odell' } }), call({ name: 'danger', safety: 'smoke' }),
      call({ name: 'alarm', status: 'on-lane', alarmAt: T0 }),
    ];
    expect(calls.toSorted(callOrder('u1')).map((one) => (one as { name?: string }).name)).toEqual(['danger', 'alarm', 'mine', 'old', 'new', 'returned', 'theirs', 'out']);
  });
});

describe('history of a lane', () => {
  it('keeps cause, who, and the time it stood', () => {
    const { call } = night(stop, ['call.acknowledged', { call: '' }, odell], ['pinsetter.restarted', { lane: 9 }], ['call.cleared', { call: '', cause: 'deck.pin-off-spot', note: 'tightened' }, odell]);
    expect(pastCall(call)).toEqual({ at: T0 + 3 * MINUTE, equipment: 'pinsetter', cause: 'deck.pin-off-spot', note: 'tightened', by: 'Odell', downMs: 2 * MINUTE });
  });

  it('does not invent downtime for a call without a stop', () => {
    expect(downtimeOf(night(['call.requested', { lane: 9 }], ['call.cleared', { call: '', cause: 'bowler.asked-for-help' }, odell]).call)).toBeNull();
  });

  it('counts overlapping stops once', () => {
    expect(downtimeOf({ stops: [{ from: 0, to: 10 }, { from: 5, to: 20 }, { from: 30, to: null }], lastAt: 34 })).toBe(24);
  });

  it('counts the stops of the last 200 frames, and says nothing where no frames are heard', () => {
    const hears = { deliveries: true, frames: true, stops: true };
    expect(stopsInLastFrames({ framesEver: 1000, stopMarks: [700, 800, 801, 1000], hears })).toBe(2);
    expect(stopsInLastFrames({ framesEver: 0, stopMarks: [0, 0], hears: { ...hears, frames: false } })).toBeNull();
    expect(stopsInLastFrames(undefined)).toBeNull();
  });
});
