/**
 * The record a mechanic keeps when reaching into a machine: the order of 29 CFR 1910.147 (d) before, (e) after.
 * It is a record. Nothing here isolates anything.
 */

export const LOCKOUT_PHASES = ['prepare', 'stop', 'isolate', 'lock', 'release-energy', 'try'] as const;
export type LockoutPhase = (typeof LOCKOUT_PHASES)[number];

/**
 * Steps before reaching in, each with its phase. The ball lift has a supply of its own, and balls still come from the
 * neighbour lane: both are steps, as both are forgotten.
 */
export const ISOLATION_STEPS = [
  { code: 'told-desk', phase: 'prepare' },
  { code: 'machine-stopped', phase: 'stop' },
  { code: 'neighbour-balls', phase: 'stop' },
  { code: 'machine-isolated', phase: 'isolate' },
  { code: 'lift-isolated', phase: 'isolate' },
  { code: 'lock-and-tag', phase: 'lock' },
  { code: 'energy-released', phase: 'release-energy' },
  { code: 'try', phase: 'try' },
] as const satisfies readonly { code: string; phase: LockoutPhase }[];

/** Steps before the machine may run again, in the order of (e): the own lock comes off last. */
export const RELEASE_STEPS = ['tools-out', 'guards-on', 'people-clear', 'told-release', 'own-lock-off'] as const;

export type IsolationStep = (typeof ISOLATION_STEPS)[number]['code'];
export type ReleaseStep = (typeof RELEASE_STEPS)[number];
export type LockoutStep = IsolationStep | ReleaseStep;

/** Steps recorded as done, by code, with their time (epoch ms). */
export type StepsDone = Readonly<Record<string, number>>;

export const isIsolationStep = (step: string): step is IsolationStep => ISOLATION_STEPS.some((one) => one.code === step);
export const isReleaseStep = (step: string): step is ReleaseStep => RELEASE_STEPS.some((one) => one === step);

/** Every step before reaching in is recorded: from here the board says *mechanic in machine, recorded …*. */
export const isolationRecorded = (done: StepsDone): boolean => ISOLATION_STEPS.every((step) => done[step.code] !== undefined);

/** Every step before the machine may run again is recorded. */
export const releaseRecorded = (done: StepsDone): boolean => RELEASE_STEPS.every((step) => done[step] !== undefined);

/** Nothing was recorded: such a record may be dropped without release steps. */
export const nothingRecorded = (done: StepsDone): boolean => Object.keys(done).length === 0;

/**
 * Which steps must be recorded before `step`. Within a phase the order is free; a phase waits for all earlier phases.
 * Release may begin at any time – somebody thinks better of it with half the list done – but in its own order, and
 * while it is under way the list before stays as it is.
 */
function needed(step: LockoutStep): readonly string[] {
  if (isReleaseStep(step)) return RELEASE_STEPS.slice(0, RELEASE_STEPS.indexOf(step));
  const phase = phaseOf(step);
  return ISOLATION_STEPS.filter((one) => LOCKOUT_PHASES.indexOf(one.phase) < phase).map((one) => one.code);
}

const phaseOf = (step: IsolationStep): number => LOCKOUT_PHASES.indexOf(ISOLATION_STEPS.find((one) => one.code === step)?.phase ?? 'prepare');

export type StepVerdict = { ok: true } | { ok: false; code: 'lockout.step-unknown' } | { ok: false; code: 'lockout.step-out-of-order'; waitsFor: string };

/** May `step` be recorded (`done`) or taken back now? Taking back is for slips: only what no later step rests on. */
export function mayRecord(step: string, done: boolean, recorded: StepsDone): StepVerdict {
  if (!isIsolationStep(step) && !isReleaseStep(step)) return { ok: false, code: 'lockout.step-unknown' };
  const releasing = RELEASE_STEPS.find((one) => recorded[one] !== undefined);
  if (isIsolationStep(step) && releasing) return { ok: false, code: 'lockout.step-out-of-order', waitsFor: releasing };
  const waitsFor = done ? needed(step).find((one) => recorded[one] === undefined) : restsOn(step, recorded);
  return waitsFor === undefined ? { ok: true } : { ok: false, code: 'lockout.step-out-of-order', waitsFor };
}

/** A recorded step that needs this one. */
function restsOn(step: LockoutStep, recorded: StepsDone): string | undefined {
  const all: readonly LockoutStep[] = [...ISOLATION_STEPS.map((one) => one.code), ...RELEASE_STEPS];
  return all.find((one) => recorded[one] !== undefined && needed(one).includes(step));
}
