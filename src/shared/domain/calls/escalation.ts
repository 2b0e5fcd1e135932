import type { Call, CallStatus } from './state.ts';

/** Who should be looking by now. */
export type Escalation = 'none' | 'other-mechanic' | 'desk' | 'manager';

/** Time unanswered, ms since the call arrived, after which somebody else is asked. */
export interface EscalationRules {
  otherMechanicMs: number;
  deskMs: number;
  managerMs: number;
}

const MINUTE = 60_000;
/** Three minutes each: common practice of the trade. */
export const DEFAULT_ESCALATION: EscalationRules = { otherMechanicMs: 3 * MINUTE, deskMs: 6 * MINUTE, managerMs: 9 * MINUTE };

/** Status as people see it: a parked call whose end has passed asks again, in the state it was parked in. */
export function statusAt(call: Pick<Call, 'status' | 'parked' | 'onLane' | 'acknowledged'>, now: number): CallStatus {
  if (call.status !== 'parked' || (call.parked && now < call.parked.until)) return call.status;
  return call.onLane ? 'on-lane' : call.acknowledged ? 'acknowledged' : 'unanswered';
}

/** Since when a call waits for somebody to say "mine" (epoch ms): its arrival, or the end of its parking. Null when nobody is waited for. */
export function unansweredSince(call: Pick<Call, 'status' | 'parked' | 'onLane' | 'acknowledged' | 'receivedAt'>, now: number): number | null {
  if (statusAt(call, now) !== 'unanswered') return null;
  return call.status === 'parked' && call.parked ? call.parked.until : call.receivedAt;
}

/**
 * Who should be looking at an unanswered call. Arrival counts, not when it happened: nobody could answer what hadn't arrived.
 * A danger is the desk's at once, and the manager's where a machine call would be the other mechanic's.
 */
export function escalationOf(call: Pick<Call, 'status' | 'parked' | 'onLane' | 'acknowledged' | 'receivedAt' | 'safety'>, now: number, rules: EscalationRules = DEFAULT_ESCALATION): Escalation {
  const since = unansweredSince(call, now);
  if (since === null) return 'none';
  const waited = now - since;
  if (call.safety) return waited >= rules.otherMechanicMs ? 'manager' : 'desk';
  if (waited >= rules.managerMs) return 'manager';
  if (waited >= rules.deskMs) return 'desk';
  return waited >= rules.otherMechanicMs ? 'other-mechanic' : 'none';
}
