import type { CallStatus, CallStepKind } from '../../domain/calls/state.ts';
import type { LockoutStep } from '../../domain/calls/lockout-steps.ts';
import { type Equipment, type LaneUseKind, neighbourOf, pairOf, type SafetyKind, type Scope } from '../../domain/equipment.ts';
import { causeText } from './calls-causes.ts';
import type { Sentences } from './sentences.ts';

export const equipmentNames: Record<Equipment, string> = {
  'pinsetter': 'pinsetter', 'ball-return': 'ball return', 'ball-lift': 'ball lift', 'foul-unit': 'foul unit', 'scoring': 'scoring', 'console': 'console',
  'masking': 'masking', 'bumpers': 'bumpers', 'channel': 'channel', 'lane-surface': 'lane surface', 'approach': 'approach', 'power': 'power',
  'motion-sensor': 'motion sensor', 'lane-machine': 'lane machine',
};
export const safetyNames: Record<SafetyKind, string> = {
  'wet-approach': 'Wet or oily approach', 'ball-on-lane': 'Ball on the lane', 'person-in-pit': 'Person in the pit', 'smoke': 'Smoke', 'other-danger': 'Danger',
};
export const statusNames: Record<CallStatus, string> = {
  'unanswered': 'unanswered', 'acknowledged': 'mechanic on the way', 'on-lane': 'on lane', 'parked': 'parked', 'out-of-service': 'out of service', 'closed': 'back running',
};
export const useNames: Record<LaneUseKind, string> = {
  'league': 'League', 'tournament': 'Tournament', 'open': 'Open play', 'party': 'Party', 'warmup': 'Warm-up', 'coaching': 'Coaching', 'maintenance': 'Maintenance',
  'unknown': 'Somebody is on the lane',
};

const DEFAULT_TITLES: Record<Equipment, string> = {
  'pinsetter': 'Pinsetter', 'ball-return': 'Ball not returned', 'ball-lift': 'Ball not returned', 'foul-unit': 'Foul unit', 'scoring': 'Scoring', 'console': 'Console',
  'masking': 'Masking', 'bumpers': 'Bumpers', 'channel': 'Channel', 'lane-surface': 'Lane surface', 'approach': 'Approach', 'power': 'Power dip in the house',
  'motion-sensor': 'Motion sensor', 'lane-machine': 'Lane machine',
};
const TITLE_MAX = 48;

interface Titled {
  equipment: Equipment;
  safety: SafetyKind | null;
  origin: 'stop' | 'fault' | 'bowler' | 'desk' | 'mechanic';
  text: string | null;
}

/** What a call is, in a few words: what was said of it when that is short, else what stopped. */
export function callTitle({ equipment, safety, origin, text }: Titled): string {
  if (safety) return safetyNames[safety];
  if (text && text.length <= TITLE_MAX && !text.includes('\n')) return `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
  if (equipment === 'pinsetter' && origin === 'stop') return 'Pinsetter stopped';
  return equipment === 'pinsetter' && origin === 'bowler' ? 'Bowler asks for help' : DEFAULT_TITLES[equipment];
}

/** What was said, where the title doesn't say it already. */
export const callSaid = (call: Titled): string | null => (call.text && callTitle(call).toLowerCase() !== call.text.toLowerCase() ? call.text : null);

/** `ball lift, shared with lane 10`. */
export function callPlace({ equipment, scope, lane, safety }: { equipment: Equipment; scope: Scope; lane: number; safety: SafetyKind | null }): string {
  if (scope === 'house') return `${equipmentNames[equipment]}, the whole house`;
  if (safety) return `lanes ${pairOf(lane)}–${pairOf(lane) + 1} stopped`;
  return scope === 'pair' ? `${equipmentNames[equipment]}, shared with lane ${neighbourOf(lane)}` : equipmentNames[equipment];
}

/** The place, where the title doesn't say it already: `Pinsetter stopped` needs no `pinsetter`. */
export function callWhere(call: Titled & { scope: Scope; lane: number }): string | null {
  const place = callPlace(call);
  return callTitle(call).toLowerCase().startsWith(place) ? null : place;
}

/** `lane 9`, `lanes 9–10`, `the house`. */
export function callLanes({ scope, lane }: { scope: Scope; lane: number }): string {
  if (scope === 'house') return 'the house';
  return scope === 'pair' ? `lanes ${pairOf(lane)}–${pairOf(lane) + 1}` : `lane ${lane}`;
}

const ISOLATE_FAMILY = {
  'free-fall': 'Deck and rake down, springs released',
  'string': 'Deck down, string tension off',
} as const;

/** A step of the lockout record; stored energy differs by family. */
export function lockoutStepText(step: string, family: 'free-fall' | 'string' | null): string {
  if (step === 'energy-released') return family ? ISOLATE_FAMILY[family] : 'Deck and rake down, springs and strings slack';
  return LOCKOUT_STEPS[step as Exclude<LockoutStep, 'energy-released'>] ?? step;
}
const LOCKOUT_STEPS: Record<Exclude<LockoutStep, 'energy-released'>, string> = {
  'told-desk': 'Desk and bowlers told', 'machine-stopped': 'Machine stopped', 'neighbour-balls': 'No ball comes from the neighbour lane',
  'machine-isolated': 'Machine off at the isolator', 'lift-isolated': 'Ball lift off, own supply', 'lock-and-tag': 'My lock and tag on',
  'try': 'Tried the start: stays dead',
  'tools-out': 'Tools out', 'guards-on': 'Guards on', 'people-clear': 'People clear', 'told-release': 'Told: it will run', 'own-lock-off': 'My own lock and tag off',
};

const STEP_NAMES: Record<CallStepKind, string> = {
  'raised': 'Raised', 'joined': 'Reported again', 'acknowledged': 'Mine', 'on-lane': 'On lane', 'parked': 'Parked', 'unparked': 'Taken up again',
  'out-of-service': 'Out of service', 'back-in-service': 'Back in service', 'cleared': 'Back running', 'returned': 'Runs again by itself',
  'lockout-begun': 'Lockout record begun', 'lockout-step': 'Lockout record', 'lockout-released': 'Lockout record ended', 'lockout-alarm': 'Alarm: the machine moved with somebody recorded in it',
};

/** One step of a call's life, as a line. */
export function stepText(step: { kind: string; text: string | null }, family: 'free-fall' | 'string' | null): string {
  const name = STEP_NAMES[step.kind as CallStepKind] ?? step.kind;
  if (step.kind === 'lockout-alarm' || !step.text) return name;
  if (step.kind !== 'lockout-step') return `${name}: ${step.text}`;
  return step.text.startsWith('-') ? `Taken back: ${lockoutStepText(step.text.slice(1), family)}` : lockoutStepText(step.text, family);
}

/** Mail that a call is unanswered: a record, not an alarm. */
export const unansweredMail = {
  subject: (call: Titled & { lane: number; scope: Scope }, centre: string) => `${centre}: ${callLanes(call)} unanswered, ${callTitle(call)}`,
  text: (call: Titled & { lane: number; scope: Scope; safety: SafetyKind | null }, since: string, minutes: number, address: string | null) =>
    [
      `${callTitle(call)}, ${callLanes(call)} (${callPlace(call)}), was raised at ${since} and nobody had answered ${minutes} minutes later.`,
      ...(address ? [`The call: ${address}`] : []),
      'This mail is a record. Phones and screens were told at once.',
    ].join('\n\n'),
} as const;

/** Sentences for this slice's refusal codes. */
export const refusals: Sentences = {
  'call.unknown': () => 'There is no such call here.',
  'call.already-cleared': () => 'This call is closed already.',
  'call.already-acknowledged': ({ by }) => `${by} has this call already.`,
  'call.not-acknowledged': () => 'Nobody has this call yet: say "Mine".',
  'call.already-yours': () => 'You have this call already.',
  'call.already-on-lane': ({ by }) => `${by} is on the lane already.`,
  'call.cause-unknown': ({ cause }) => `“${cause}” is not a cause for this machine. Choose one from the list.`,
  'call.mechanic-in-machine': ({ by }) => `${by} has an open lockout record. Finish the release steps first.`,
  'call.out-of-service': () => 'This call is out of service. Put it back in service.',
  'call.not-out-of-service': () => 'This call is not out of service.',
  'call.safety-cannot-be-parked': () => 'A danger cannot be parked.',
  'call.park-end-invalid': ({ hours }) => `Parked till a time to come, at most ${hours} hours from now.`,
  'call.not-parked': () => 'This call is not parked.',
  'call.desk-answers-dangers': () => 'Calls on machines are the mechanics’. The desk answers dangers.',
  'lockout.already-begun': ({ by }) => `${by} has a lockout record open on this call.`,
  'lockout.not-begun': () => 'No lockout record is open on this call.',
  'lockout.step-unknown': () => 'This step is not on the list.',
  'lockout.step-out-of-order': ({ waitsFor }) => `First: ${lockoutStepText(String(waitsFor), null)}.`,
  'lockout.other-mechanic': ({ by }) => `This is ${by}’s record: only ${by} fills it in.`,
  'lockout.release-incomplete': ({ waitsFor }) => `Before the machine may run: ${lockoutStepText(String(waitsFor), null)}.`,
};

export { causeText };
