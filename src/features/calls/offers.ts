import type { CallDetail } from '#shared/contracts/calls.ts';
import { isolationRecorded, nothingRecorded, releaseRecorded } from '#shared/domain/calls/lockout-steps.ts';
import { callsText, callText, lockoutText } from '#shared/text/en/calls-screen.ts';
import type { ActionKind } from './action-queue.ts';

export type SheetName = 'cause' | 'service' | 'park' | 'left-behind';

/** A button: it acts at once, or opens a sheet that asks for what is missing. */
export interface Offer {
  label: string;
  does: { act: ActionKind } | { open: SheetName };
  /** Why it can't be pressed now. */
  because?: string;
}

export interface Offers {
  /** In thumb's reach: what comes next in the life of the call. */
  main: Offer | null;
  second: Offer | null;
  more: Offer[];
}

export interface Viewer {
  id: string | null;
  /** Works on machines. */
  works: boolean;
  /** May answer dangers. */
  answers: boolean;
  manages: boolean;
}

const offer = (label: string, act: ActionKind): Offer => ({ label, does: { act } });
const sheet = (label: string, open: SheetName, because?: string): Offer => ({ label, does: { open }, because });

/** What somebody can do to a call next. The server decides all the same. */
export function offersFor(call: CallDetail, viewer: Viewer): Offers {
  const nothing: Offers = { main: null, second: null, more: [] };
  if (call.status === 'closed' || !(viewer.works || (viewer.answers && call.safety))) return nothing;
  if (!viewer.works) return forDesk(call);
  const open = call.lockout && call.lockout.releasedAt === null ? call.lockout : null;
  const more = [...(viewer.manages && open && open.byId !== viewer.id ? [sheet(lockoutText.leftBehind, 'left-behind')] : [])];
  const service = sheet(callText.outOfService, 'service');
  if (open) return inRecord(call, open, viewer, more, service);
  const park = call.safety ? [] : [sheet(callText.park, 'park')];
  switch (call.status) {
    case 'unanswered': return { main: offer(callsText.mine, 'acknowledge'), second: service, more: [offer(callText.onLane, 'onLane'), ...park] };
    case 'acknowledged': return mine(call, viewer) ? { main: offer(callText.onLane, 'onLane'), second: service, more: [back(call), ...park] } : { main: taken(call), second: null, more: [offer(callText.onLane, 'onLane'), back(call), service, ...park] };
    case 'on-lane': return mine(call, viewer) ? { main: back(call), second: service, more: park } : { main: taken(call), second: null, more: [back(call), service, ...park] };
    case 'parked': return { main: offer(callText.unpark, 'unpark'), second: service, more: [back(call)] };
    case 'out-of-service': return { main: sheet(callText.backInService, 'cause'), second: null, more: [] };
  }
}

const mine = (call: CallDetail, viewer: Viewer): boolean => call.mechanic?.id === viewer.id;
const taken = (call: CallDetail): Offer => offer(callText.takeOver(call.mechanic?.name ?? ''), 'takeOver');
const back = (call: CallDetail, because?: string): Offer => sheet(call.safety ? callText.dangerGone : callText.backRunning, 'cause', because);

/** The desk says "mine" to a danger and says when it is gone. */
function forDesk(call: CallDetail): Offers {
  if (call.status === 'out-of-service') return { main: null, second: null, more: [] };
  const gone = back(call);
  return call.status === 'unanswered' ? { main: offer(callsText.mine, 'acknowledge'), second: gone, more: [] } : { main: gone, second: null, more: [] };
}

/** While a lockout record is open nothing is given back; its own end comes next. */
function inRecord(call: CallDetail, open: NonNullable<CallDetail['lockout']>, viewer: Viewer, more: Offer[], service: Offer): Offers {
  const second = call.status === 'out-of-service' ? null : service;
  if (open.byId !== viewer.id) return { main: back(call, callText.firstReleaseOf(open.by)), second, more };
  if (releaseRecorded(open.steps)) return { main: offer(callText.endRecord, 'lockoutRelease'), second, more };
  if (nothingRecorded(open.steps) && call.status !== 'on-lane' && call.status !== 'out-of-service') return { main: offer(callText.onLane, 'onLane'), second, more };
  return { main: back(call, isolationRecorded(open.steps) ? callText.firstRelease : callText.recordOpen), second, more };
}
