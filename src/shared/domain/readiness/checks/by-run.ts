import { type CheckName, type CheckResult, type Params, result } from '../check.ts';
import { type LaneSituation, latestDressing, type RunOnLane } from '../situation.ts';

/** Does this run lay what the session wants? `unverified`: it doesn't say, or the pattern isn't written down here. */
export function runFits(run: RunOnLane, at: LaneSituation): 'fits' | 'other' | 'unverified' {
  const { pattern, revision } = at.session;
  if (run.pattern === null || !isKnown(run.pattern, run.revision, at)) return pattern === null && run.pattern === null ? 'fits' : 'unverified';
  if (pattern === null) return 'fits';
  return run.pattern === pattern && (revision === null || run.revision === revision) ? 'fits' : 'other';
}

/** Is a revision of a pattern written down in this centre? */
export const isKnown = (pattern: string, revision: number | null, at: LaneSituation): boolean =>
  at.patterns.some((known) => known.code === pattern && (revision === null || known.revisions.some((r) => r.revision === revision)));

/**
 * A lane that must be dressed: a run that ends in time settles it, one that ends within the margin is tight, one that ends
 * after warm-up doesn't. Without a run it is at risk while there is time to plan one, then it holds with `why`.
 */
export function settledByRun(check: CheckName, at: LaneSituation, why: { code: string; params?: Params }): CheckResult {
  const { run, session, settings, now } = at;
  const latestStart = latestDressing(at);
  if (!run) {
    const early = now < session.warmUpAt - settings.planLeadMs;
    return result(check, early ? 'at-risk' : 'holds', why.code, { params: { ...why.params, byAt: latestStart + at.paceMs }, latestStart, waitsFor: { kind: 'run', name: null } });
  }
  const fits = runFits(run, at);
  const params = { run: run.run, machine: run.machine, doneAt: run.doneAt, latestAt: session.warmUpAt - settings.dressMarginMs };
  const more = { params, settles: { by: run.doneAt, what: 'run' as const }, waitsFor: { kind: 'run' as const, name: run.run }, latestStart };
  if (fits === 'other') return result(check, 'holds', 'pattern.run-other', { ...more, params: { ...params, pattern: run.pattern ?? '', revision: run.revision ?? 0 }, settles: null });
  if (fits === 'unverified') return result(check, 'holds', 'pattern.run-unverified', { ...more, settles: null });
  if (run.doneAt > session.warmUpAt) return result(check, 'holds', 'pattern.run-late', more);
  if (run.doneAt > session.warmUpAt - settings.dressMarginMs) return result(check, 'at-risk', 'pattern.run-tight', more);
  return result(check, 'ok', run.onLane ? 'pattern.being-dressed' : 'pattern.run-planned', { ...more, waits: true });
}
