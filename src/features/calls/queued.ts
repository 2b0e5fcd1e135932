import type { CallDetail } from '#shared/contracts/calls.ts';
import { isolationRecorded } from '#shared/domain/calls/lockout-steps.ts';
import type { QueuedAction } from './action-queue.ts';

/** The call as it will be once what is queued has been done: the next button follows from it, and it is marked as queued. */
export const withQueued = (call: CallDetail, queued: readonly QueuedAction[], me: { id: string; name: string }): CallDetail =>
  queued.filter((action) => action.call === call.id).reduce((now, action) => after(now, action, me), call);

function after(call: CallDetail, action: QueuedAction, me: { id: string; name: string }): CallDetail {
  const at = action.madeAt;
  switch (action.kind) {
    case 'acknowledge':
    case 'takeOver':
      return { ...call, status: 'acknowledged', mechanic: me, acknowledgedAt: call.acknowledgedAt ?? at, onLaneAt: null };
    case 'onLane':
      return { ...call, status: 'on-lane', mechanic: me, onLaneAt: at };
    case 'park':
      return { ...call, status: 'parked', parkedUntil: Number(action.body?.until) };
    case 'unpark':
      return { ...call, status: call.onLaneAt === null ? (call.acknowledgedAt === null ? 'unanswered' : 'acknowledged') : 'on-lane', parkedUntil: null };
    case 'outOfService':
      return { ...call, status: 'out-of-service', outOfService: { since: at, reason: String(action.body?.reason), by: me.name } };
    case 'clear':
    case 'backInService':
      return { ...call, status: 'closed', cleared: { at, by: me.name, cause: String(action.body?.cause ?? ''), note: null } };
    default:
      return { ...call, lockout: lockoutAfter(call.lockout, action, me) };
  }
}

function lockoutAfter(lockout: CallDetail['lockout'], action: QueuedAction, me: { id: string; name: string }): CallDetail['lockout'] {
  if (action.kind === 'lockoutBegin') return { by: me.name, byId: me.id, begunAt: action.madeAt, steps: {}, inMachineSince: null, releasedAt: null };
  if (!lockout) return null;
  if (action.kind !== 'lockoutStep') return { ...lockout, releasedAt: action.madeAt };
  const { [String(action.body?.step)]: _before, ...others } = lockout.steps;
  const steps = action.body?.done ? { ...others, [String(action.body.step)]: action.madeAt } : others;
  return { ...lockout, steps, inMachineSince: isolationRecorded(steps) ? (lockout.inMachineSince ?? action.madeAt) : null };
}
