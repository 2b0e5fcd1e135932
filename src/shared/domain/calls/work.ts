import type { Fact, FactOf, Person } from '../journal/fact.ts';
import type { Call, CallsState, CallStep } from './state.ts';

/** Facts in which a person works on a call. */
export type WorkFact = {
  [T in Fact['type']]: FactOf<T> extends { data: { call: string } } ? FactOf<T> : never;
}[Fact['type']];

export const isWork = (fact: Fact): fact is WorkFact => 'call' in fact.data;

const NOBODY: Person = { kind: 'job', id: '', name: '' };

/** One step of a person on the open call that contains the raise named; a fold never refuses, so a step on no open call changes nothing. */
export function work(calls: CallsState, fact: WorkFact): CallsState {
  const call = openCall(calls, fact.data.call);
  if (!call) return calls;
  const after = { ...change(call, fact), lastAt: Math.max(call.lastAt, fact.time) };
  if (after.status !== 'closed') return { ...calls, open: { ...calls.open, [call.key]: after } };
  const { [call.key]: _gone, ...open } = calls.open;
  return { ...calls, open, closed: [...calls.closed, after] };
}

/** The open call that has this id, or had it before an earlier arrival gave it another. */
export const openCall = (calls: CallsState, id: string): Call | undefined =>
  Object.values(calls.open).find((call) => call.id === id || call.raises.some((raised) => raised.id === id));

function change(call: Call, fact: WorkFact): Call {
  const by = fact.by ?? NOBODY;
  const at = fact.time;
  const steps = (kind: CallStep['kind'], text: string | null = null): CallStep[] => [...call.steps, { at, kind, by: fact.by, text }];
  switch (fact.type) {
    case 'call.acknowledged':
      return { ...call, status: 'acknowledged', acknowledged: { at: call.acknowledged?.at ?? at, by }, onLane: null, parked: null, steps: steps('acknowledged') };
    case 'call.on-lane':
      return { ...call, status: 'on-lane', onLane: { at, by }, parked: null, steps: steps('on-lane') };
    case 'call.parked':
      return { ...call, status: 'parked', parked: { at, until: fact.data.until, reason: fact.data.reason, by }, steps: steps('parked', fact.data.reason) };
    case 'call.unparked':
      return { ...call, status: call.onLane ? 'on-lane' : call.acknowledged ? 'acknowledged' : 'unanswered', parked: null, steps: steps('unparked') };
    case 'call.out-of-service':
      return { ...call, status: 'out-of-service', outOfService: { at, reason: fact.data.reason, by, backAt: null }, parked: null, steps: steps('out-of-service', fact.data.reason) };
    case 'call.back-in-service':
    case 'call.cleared':
      return end(call, fact, by, steps);
    case 'lockout.begun':
    case 'lockout.stepped':
    case 'lockout.released':
      return lockout(call, fact, by, steps);
  }
}

function end(call: Call, fact: FactOf<'call.cleared'> | FactOf<'call.back-in-service'>, by: Person, steps: (kind: CallStep['kind'], text?: string | null) => CallStep[]): Call {
  const { cause, note } = fact.data;
  return {
    ...call,
    status: 'closed',
    outOfService: call.outOfService && { ...call.outOfService, backAt: fact.time },
    cleared: cause === undefined ? null : { at: fact.time, by, cause, note: note ?? null },
    stops: call.stops.map((s) => (s.to === null ? { ...s, to: fact.time } : s)),
    steps: steps(fact.type === 'call.cleared' ? 'cleared' : 'back-in-service', note ?? null),
  };
}

/** The last step before work: the start was tried and the machine stays dead. From here on the record says that somebody is in it. */
export const LAST_LOCKOUT_STEP = 'try';

function lockout(call: Call, fact: FactOf<'lockout.begun'> | FactOf<'lockout.stepped'> | FactOf<'lockout.released'>, by: Person, steps: (kind: CallStep['kind'], text?: string | null) => CallStep[]): Call {
  const at = fact.time;
  if (fact.type === 'lockout.begun') {
    return { ...call, lockout: { by, begunAt: at, steps: {}, inMachineSince: null, releasedAt: null, alarmAt: null }, steps: steps('lockout-begun') };
  }
  if (!call.lockout) return call;
  if (fact.type === 'lockout.released') return { ...call, lockout: { ...call.lockout, releasedAt: at }, steps: steps('lockout-released', fact.data.leftBehind) };
  const { step, done } = fact.data;
  const { [step]: _before, ...others } = call.lockout.steps;
  const last = step === LAST_LOCKOUT_STEP;
  return {
    ...call,
    lockout: { ...call.lockout, steps: done ? { ...others, [step]: at } : others, inMachineSince: last ? (done ? at : null) : call.lockout.inMachineSince },
    steps: steps('lockout-step', done ? step : `-${step}`),
  };
}
