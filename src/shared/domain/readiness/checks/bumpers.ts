import { type CheckResult, result } from '../check.ts';
import { WATCHED_KINDS } from '../../leagues/session-kinds.ts';
import type { LaneSituation } from '../situation.ts';

/** Bumpers down after youth or a party. While those people are still there they are to stay up. */
export function checkBumpers(at: LaneSituation): CheckResult {
  const { lane, session, occupants } = at;
  if (!lane.bumpers || !WATCHED_KINDS.includes(session.kind)) return result('bumpers', 'ok', 'bumpers.down');
  const present = occupants.some((occupant) => occupant.present);
  return result('bumpers', present ? 'ok' : 'at-risk', 'bumpers.up', { waits: present, settles: { by: session.warmUpAt, what: 'desk' }, waitsFor: { kind: 'desk', name: null } });
}
