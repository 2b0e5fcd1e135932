import { callKey, type Equipment, lanesHeld, type SafetyKind, scopeOf } from '../equipment.ts';
import type { Fact } from '../journal/fact.ts';
import type { Call, CallsState, CallStep } from './state.ts';

interface Raise {
  lane: number;
  equipment: Equipment;
  safety: SafetyKind | null;
  origin: Call['origin'];
  text: string | null;
  code: string | null;
  /** Whether the equipment stands still from this moment. */
  stops: boolean;
}

/** What a fact asks a mechanic for; null when it asks for none. Lanes lost to a power dip are one call of the house. */
export function raiseOf(fact: Fact): Raise | null {
  switch (fact.type) {
    case 'pinsetter.stopped':
      return { lane: fact.data.lane, equipment: fact.data.reason === 'power' ? 'power' : 'pinsetter', safety: null, origin: 'stop', text: fact.data.text ?? null, code: fact.data.code ?? null, stops: true };
    case 'equipment.faulted':
      return { lane: fact.data.lane, equipment: fact.data.equipment, safety: null, origin: 'fault', text: fact.data.text ?? null, code: null, stops: true };
    case 'call.requested':
      return { lane: fact.data.lane, equipment: fact.data.equipment ?? 'pinsetter', safety: null, origin: 'bowler', text: fact.data.text ?? null, code: null, stops: false };
    case 'call.raised':
      return { lane: fact.data.lane, equipment: fact.data.equipment, safety: fact.data.safety ?? null, origin: fact.data.from, text: fact.data.text ?? null, code: null, stops: fact.data.safety !== undefined };
    default:
      return null;
  }
}

/**
 * Id of a raise: a UUIDv7 (RFC 9562 §5.7) whose time is the arrival and whose free bits are sequence number (48) and place (14),
 * so that folding the journal again gives the same id.
 */
export function raiseId(fact: Pick<Fact, 'receivedAt' | 'seq' | 'n'>): string {
  const time = fact.receivedAt.toString(16).padStart(12, '0').slice(-12);
  const tail = ((BigInt(fact.seq) << 14n) | BigInt(fact.n & 0x3fff) | (2n << 62n)).toString(16).padStart(16, '0').slice(-16);
  return `${time.slice(0, 8)}-${time.slice(8)}-7000-${tail.slice(0, 4)}-${tail.slice(4)}`;
}

/** Opens a call, or joins the open one of the same place and equipment. */
export function raise(calls: CallsState, fact: Fact, asked: Raise): CallsState {
  const key = callKey(asked.equipment, asked.lane, asked.safety);
  const before = calls.open[key];
  const call = before ? joined(before, fact, asked) : opened(key, fact, asked);
  return { ...calls, open: { ...calls.open, [key]: call } };
}

const step = (fact: Fact, kind: CallStep['kind'], text: string | null): CallStep => ({ at: fact.time, kind, by: fact.by, text });
const arrival = (fact: Fact) => ({ id: raiseId(fact), seq: fact.seq, n: fact.n });

function opened(key: string, fact: Fact, asked: Raise): Call {
  return {
    id: raiseId(fact), key, scope: scopeOf(asked.equipment, asked.safety), lane: asked.lane, equipment: asked.equipment, safety: asked.safety,
    lanesHeld: lanesHeld(asked.equipment, asked.lane, asked.safety), raisedAt: fact.time, receivedAt: fact.receivedAt, raisedBy: fact.by,
    origin: asked.origin, text: asked.text, code: asked.code, status: 'unanswered', acknowledged: null, onLane: null, parked: null,
    outOfService: null, returnedAt: null, cleared: null, lockout: null, stops: asked.stops ? [{ from: fact.time, to: null }] : [],
    steps: [step(fact, 'raised', asked.text)], raises: [arrival(fact)], lastAt: fact.time,
  };
}

function joined(call: Call, fact: Fact, asked: Raise): Call {
  const first = call.raises.every((r) => r.seq > fact.seq || (r.seq === fact.seq && r.n > fact.n));
  const standing = call.stops.at(-1)?.to === null;
  return {
    ...call,
    id: first ? raiseId(fact) : call.id,
    receivedAt: first ? fact.receivedAt : call.receivedAt,
    text: call.text ?? asked.text,
    code: call.code ?? asked.code,
    returnedAt: asked.stops ? null : call.returnedAt,
    stops: asked.stops && !standing ? [...call.stops, { from: fact.time, to: null }] : call.stops,
    steps: [...call.steps, step(fact, 'joined', asked.text)],
    raises: [...call.raises, arrival(fact)],
    lastAt: Math.max(call.lastAt, fact.time),
  };
}
