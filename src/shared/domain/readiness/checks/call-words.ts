import type { Call } from '../../calls/state.ts';
import type { Params } from '../check.ts';

/** How far a call is that isn't settled; its words are the same for every equipment. */
export type CallStage = 'unanswered' | 'coming' | 'on-lane' | 'mechanic-in' | 'parked' | 'out-of-service';

export function stageOf(call: Call): CallStage {
  if (call.lockout?.inMachineSince && call.lockout.releasedAt === null) return 'mechanic-in';
  if (call.status === 'out-of-service') return 'out-of-service';
  if (call.status === 'parked') return 'parked';
  if (call.status === 'on-lane') return 'on-lane';
  return call.status === 'acknowledged' ? 'coming' : 'unanswered';
}

/** Still wrong: not closed, and the machine doesn't run again by itself. A missing cause is paperwork. */
export const isUnsettled = (call: Call): boolean =>
  call.status !== 'closed' && (call.returnedAt === null || call.status === 'out-of-service' || (call.lockout !== null && call.lockout.releasedAt === null));

export const hasOpenStop = (call: Call): boolean => call.stops.some((stop) => stop.to === null);

export const mechanicOf = (call: Call): string | null => (call.onLane ?? call.acknowledged)?.by.name ?? null;

export const callParams = (call: Call): Params => ({
  equipment: call.equipment, sinceAt: call.onLane?.at ?? call.acknowledged?.at ?? call.raisedAt, mechanic: mechanicOf(call) ?? '', untilAt: call.parked?.until ?? 0,
  reason: call.outOfService?.reason ?? call.parked?.reason ?? '', call: call.id,
});
