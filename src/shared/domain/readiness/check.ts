/** Checks of one lane for one session, in the order in which they are shown. */
export const CHECKS = ['pattern', 'run-complete', 'machine', 'lane-free', 'pinsetter', 'repeated-stops', 'other-equipment', 'bumpers', 'certificate'] as const;
export type CheckName = (typeof CHECKS)[number];

export type CheckVerdict = 'ok' | 'at-risk' | 'holds';

/** Values for a sentence: lane numbers, names, instants in ms (`…At`). */
export type Params = Record<string, string | number>;

export interface CheckResult {
  check: CheckName;
  verdict: CheckVerdict;
  /** OK only because the plan settles it in time: not there yet. */
  waits: boolean;
  code: string;
  params: Params;
  /** What settles it, and when at the latest or by forecast, ms. */
  settles: { by: number; what: 'run' | 'mechanic' | 'people' | 'desk' } | null;
  /** Whom or what it waits for: a mechanic's name, a run, the people on the lane; null where nobody is named yet. */
  waitsFor: { kind: 'run' | 'mechanic' | 'people' | 'desk'; name: string | null } | null;
  /** From this instant on it is too late to begin what settles it. */
  latestStart: number | null;
}

/** State of a lane: its worst check. */
export type LaneMark = 'ok' | 'waits' | 'at-risk' | 'holds';

export const LANE_MARKS: readonly LaneMark[] = ['ok', 'waits', 'at-risk', 'holds'];
export const rankOf = (mark: LaneMark): number => LANE_MARKS.indexOf(mark);
export const worstOf = (marks: readonly LaneMark[]): LaneMark => marks.reduce<LaneMark>((worst, mark) => (rankOf(mark) > rankOf(worst) ? mark : worst), 'ok');
export const markOf = (result: Pick<CheckResult, 'verdict' | 'waits'>): LaneMark => (result.verdict === 'ok' && result.waits ? 'waits' : result.verdict);

type More = Partial<Omit<CheckResult, 'check' | 'verdict' | 'code'>>;

/** A result with what isn't said left empty. */
export const result = (check: CheckName, verdict: CheckVerdict, code: string, more: More = {}): CheckResult => ({
  check, verdict, code, waits: false, params: {}, settles: null, waitsFor: null, latestStart: null, ...more,
});
