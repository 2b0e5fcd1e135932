import { lockoutStepText } from '#shared/text/en/calls.ts';
import { callsText, callText, lockoutText } from '#shared/text/en/calls-screen.ts';
import type { ActionKind, QueuedAction } from './action-queue.ts';

const NAMES: Record<Exclude<ActionKind, 'lockoutStep'>, string> = {
  acknowledge: callsText.mine, takeOver: callText.takenOver, onLane: callText.onLane, clear: callText.backRunning, park: callText.park, unpark: callText.unpark,
  outOfService: callText.outOfService, backInService: callText.backInService, lockoutBegin: lockoutText.begin, lockoutRelease: callText.endRecord,
  lockoutLeftBehind: lockoutText.leftConfirm,
};

/** What was pressed, in the words of its button. */
export const nameOf = (action: QueuedAction): string => (action.kind === 'lockoutStep' ? lockoutStepText(String(action.body?.step), null) : NAMES[action.kind]);
