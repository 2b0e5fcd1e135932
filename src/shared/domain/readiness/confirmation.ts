import type { Session } from '../leagues/session.ts';
import { type CheckName, type CheckVerdict, LANE_MARKS, type Params } from './check.ts';
import type { SessionReadiness } from './session.ts';

/** A check must be worse for longer than this before a confirmation opens again, ms. */
export const WORSE_FOR_MS = 60_000;

/** What somebody saw when they confirmed. */
export interface Shown {
  lanes: readonly number[];
  pattern: string | null;
  revision: number | null;
  fresh: boolean;
  warmUpAt: number;
  startAt: number;
  checks: readonly { lane: number; verdicts: Partial<Record<CheckName, CheckVerdict>> }[];
}

export function shownOf(session: Session, readiness: SessionReadiness): Shown {
  const { lanes, pattern, revision, fresh, warmUpAt, startAt } = session;
  return {
    lanes: [...lanes], pattern, revision, fresh, warmUpAt, startAt,
    checks: readiness.lanes.map((lane) => ({ lane: lane.lane, verdicts: Object.fromEntries(lane.checks.map((c) => [c.check, c.verdict])) })),
  };
}

export interface Because {
  code: 'reopened.lanes' | 'reopened.pattern' | 'reopened.time' | 'reopened.worse';
  params: Params;
}

/** Checks that are worse than shown, by `lane/check`, each with the instant since when. */
export type Worse = Readonly<Record<string, number>>;

export type Judgement = { stands: true; worse: Worse } | { stands: false; because: Because };

/**
 * Does a confirmation still stand? It opens again when lanes, pattern or time are others than those shown, or when a check
 * of a lane has been worse than shown for more than a minute without a break. `worse` is what the last look found.
 */
export function judge(shown: Shown, session: Session, readiness: SessionReadiness, worse: Worse, now: number): Judgement {
  const changed = changeOf(shown, session);
  if (changed) return { stands: false, because: changed };
  const next: Record<string, number> = {};
  for (const { key, lane, check, code } of worsened(shown, readiness)) {
    const since = worse[key] ?? now;
    if (now - since > WORSE_FOR_MS) return { stands: false, because: { code: 'reopened.worse', params: { lane, check, why: code } } };
    next[key] = since;
  }
  return { stands: true, worse: next };
}

function changeOf(shown: Shown, session: Session): Because | null {
  if (shown.lanes.join() !== session.lanes.join()) return { code: 'reopened.lanes', params: { before: shown.lanes.join(), after: session.lanes.join() } };
  if (shown.pattern !== session.pattern || shown.revision !== session.revision || shown.fresh !== session.fresh) {
    return { code: 'reopened.pattern', params: { before: shown.pattern ?? '', after: session.pattern ?? '' } };
  }
  if (shown.warmUpAt === session.warmUpAt && shown.startAt === session.startAt) return null;
  return { code: 'reopened.time', params: { beforeAt: shown.startAt, afterAt: session.startAt } };
}

/** Waiting for what is planned is still OK: only the answers count. */
function worsened(shown: Shown, readiness: SessionReadiness): { key: string; lane: number; check: CheckName; code: string }[] {
  const before = new Map(shown.checks.map((lane) => [lane.lane, lane.verdicts]));
  return readiness.lanes.flatMap(({ lane, checks }) => checks.flatMap((now) => {
    const then = before.get(lane)?.[now.check] ?? 'ok';
    return LANE_MARKS.indexOf(now.verdict) > LANE_MARKS.indexOf(then) ? [{ key: `${lane}/${now.check}`, lane, check: now.check, code: now.code }] : [];
  }));
}
