import type { CallView } from '#shared/contracts/floor.ts';
import type { Role } from '#shared/policy/policy.ts';

/** Something a person must hear of now. */
export interface Alert {
  call: CallView;
  why: 'new' | 'still' | 'alarm';
}

type Known = Pick<CallView, 'id' | 'escalation' | 'alarmAt' | 'status'>;

/** Who is asked at which level; a danger is everybody's from the start. */
const ASKED: Record<CallView['escalation'], Role | null> = { 'none': null, 'other-mechanic': 'mechanic', 'desk': 'desk', 'manager': 'manager' };

/** What a role must hear of, from the calls it knew to the calls there are. Nothing known yet (a page just opened): nothing is rung. */
export function alertsFor(known: readonly Known[] | null, calls: readonly CallView[], role: Role): Alert[] {
  if (!known) return [];
  return calls.flatMap((call): Alert[] => {
    const before = known.find((one) => one.id === call.id);
    if (call.alarmAt !== null && call.alarmAt !== (before?.alarmAt ?? null)) return [{ call, why: 'alarm' }];
    if (call.status !== 'unanswered') return [];
    if (!before || before.status !== 'unanswered') return role === 'mechanic' || call.safety ? [{ call, why: 'new' }] : [];
    return before.escalation !== call.escalation && ASKED[call.escalation] === role ? [{ call, why: 'still' }] : [];
  });
}
