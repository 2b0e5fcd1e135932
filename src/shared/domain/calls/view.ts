import type { Equipment, LaneUseKind, SafetyKind, Scope } from '../equipment.ts';
import type { House } from '../house/state.ts';
import { type Escalation, escalationOf, type EscalationRules, statusAt } from './escalation.ts';
import type { Call, CallStatus } from './state.ts';

/** A call as screens show it, but for the words of what is played on its lane: those are the text's. */
export interface CallFacts {
  id: string;
  lane: number;
  lanesHeld: number[];
  scope: Scope;
  equipment: Equipment;
  safety: SafetyKind | null;
  origin: Call['origin'];
  text: string | null;
  code: string | null;
  status: CallStatus;
  raisedAt: number;
  receivedAt: number;
  raisedBy: string | null;
  mechanic: { id: string; name: string } | null;
  acknowledgedAt: number | null;
  onLaneAt: number | null;
  returnedAt: number | null;
  parkedUntil: number | null;
  /** Raises besides the first. */
  joined: number;
  mechanicIn: { by: string; since: number } | null;
  alarmAt: number | null;
  escalation: Escalation;
  playing: { kind: LaneUseKind; label: string | null } | null;
}

/** One call of a house at `now` (epoch ms). */
export function callFacts(call: Call, house: House, now: number, rules: EscalationRules): CallFacts {
  const status = statusAt(call, now);
  const who = call.onLane?.by ?? call.acknowledged?.by ?? null;
  const inside = recordedInside(call);
  const use = house.floor[call.lane - 1]?.use ?? null;
  return {
    id: call.id, lane: call.lane, lanesHeld: call.lanesHeld, scope: call.scope, equipment: call.equipment, safety: call.safety,
    origin: call.origin, text: call.text, code: call.code, status, raisedAt: call.raisedAt, receivedAt: call.receivedAt,
    raisedBy: call.raisedBy?.name ?? null, mechanic: who && { id: who.id, name: who.name },
    acknowledgedAt: call.acknowledged?.at ?? null, onLaneAt: call.onLane?.at ?? null, returnedAt: call.returnedAt,
    parkedUntil: status === 'parked' ? (call.parked?.until ?? null) : null, joined: call.raises.length - 1,
    mechanicIn: inside, alarmAt: inside ? (call.lockout?.alarmAt ?? null) : null, escalation: escalationOf(call, now, rules),
    playing: use && use.to === null ? { kind: use.kind, label: use.label } : null,
  };
}

/** Who is recorded in the machine; null once released, and for a record that isn't complete. */
export function recordedInside(call: Pick<Call, 'lockout' | 'status'>): { by: string; since: number } | null {
  const lockout = call.lockout;
  if (!lockout || lockout.inMachineSince === null || lockout.releasedAt !== null || call.status === 'closed') return null;
  return { by: lockout.by.name, since: lockout.inMachineSince };
}

/** A lockout record that was begun and not ended: nothing may be given back while it stands. */
export const lockoutOpen = (call: Pick<Call, 'lockout'>): boolean => call.lockout !== null && call.lockout.releasedAt === null;

const RANK: Record<CallStatus, number> = { 'unanswered': 0, 'acknowledged': 1, 'on-lane': 1, 'parked': 2, 'out-of-service': 3, 'closed': 4 };

/**
 * Order in which calls ask for a person: dangers, then an alarm, mine, unanswered, answered, machines that run again and
 * only want their cause, parked, out of service; the oldest first in each.
 */
export function callOrder(mine: string | null): (a: CallFactsForOrder, b: CallFactsForOrder) => number {
  const rank = (call: CallFactsForOrder): number[] => [
    call.safety && call.status !== 'closed' ? 0 : 1,
    call.alarmAt === null ? 1 : 0,
    mine !== null && call.mechanic?.id === mine && RANK[call.status] === 1 ? 0 : 1,
    RANK[call.status],
    call.returnedAt === null ? 0 : 1,
    call.raisedAt,
  ];
  return (a, b) => {
    const [left, right] = [rank(a), rank(b)];
    const at = left.findIndex((value, i) => value !== right[i]);
    return at < 0 ? 0 : (left[at] ?? 0) - (right[at] ?? 0);
  };
}
export type CallFactsForOrder = Pick<CallFacts, 'safety' | 'alarmAt' | 'status' | 'returnedAt' | 'raisedAt' | 'mechanic'>;
