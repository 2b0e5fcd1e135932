import { callKey } from '../equipment.ts';
import type { Fact } from '../journal/fact.ts';
import { raise, raiseOf } from './raise.ts';
import type { Call, CallsState } from './state.ts';
import { isWork, work } from './work.ts';

/** (calls, fact) → calls, for facts in their order. */
export function foldCalls(calls: CallsState, fact: Fact): CallsState {
  const asked = raiseOf(fact);
  const alarmed = alarm(calls, fact);
  if (asked) return raise(alarmed, fact, asked);
  if (isWork(fact)) return work(alarmed, fact);
  switch (fact.type) {
    case 'pinsetter.restarted': return returned(alarmed, callKey('pinsetter', fact.data.lane), fact);
    case 'equipment.restored': return returned(alarmed, callKey(fact.data.equipment, fact.data.lane), fact);
    default: return alarmed;
  }
}

/** The machine runs again by itself: the stop ends, the call still wants its cause. */
function returned(calls: CallsState, key: string, fact: Fact): CallsState {
  const call = calls.open[key];
  if (!call || call.returnedAt !== null) return calls;
  return replaced(calls, {
    ...call,
    returnedAt: fact.time,
    stops: call.stops.map((s) => (s.to === null ? { ...s, to: fact.time } : s)),
    steps: [...call.steps, { at: fact.time, kind: 'returned', by: fact.by, text: null }],
    lastAt: Math.max(call.lastAt, fact.time),
  });
}

/** Somebody is recorded in a machine, and it counts, is switched on or its lane is opened: the mechanic must hear of it. */
function alarm(calls: CallsState, fact: Fact): CallsState {
  const lane = laneThatMoves(fact);
  if (lane === null) return calls;
  const inside = Object.values(calls.open).filter(
    (c) => c.lockout && c.lockout.inMachineSince !== null && c.lockout.releasedAt === null && c.lockout.alarmAt === null && (c.lane === lane || c.lanesHeld.includes(lane)),
  );
  return inside.reduce((all, call) => (call.lockout ? replaced(all, {
    ...call,
    lockout: { ...call.lockout, alarmAt: fact.time },
    steps: [...call.steps, { at: fact.time, kind: 'lockout-alarm', by: fact.by, text: fact.type }],
    lastAt: Math.max(call.lastAt, fact.time),
  }) : all), calls);
}

function laneThatMoves(fact: Fact): number | null {
  switch (fact.type) {
    case 'lane.counted': return (fact.data.cycles ?? 0) + (fact.data.deliveries ?? 0) + (fact.data.frames ?? 0) > 0 ? fact.data.lane : null;
    case 'lane.opened':
    case 'pinsetter.on':
    case 'pinsetter.restarted': return fact.data.lane;
    case 'lane.moved': return fact.data.to;
    default: return null;
  }
}

const replaced = (calls: CallsState, call: Call): CallsState => ({ ...calls, open: { ...calls.open, [call.key]: call } });
