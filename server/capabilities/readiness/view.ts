import type { SessionBar } from '#shared/contracts/floor.ts';
import type { SessionSummary, SessionView } from '#shared/contracts/readiness.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import { WATCHED_KINDS } from '#shared/domain/leagues/session-kinds.ts';
import type { LaneReadiness } from '#shared/domain/readiness/lane.ts';
import { endOf, isOver, progressOf } from '#shared/domain/readiness/occupancy.ts';
import { offersFor } from '#shared/domain/readiness/offers.ts';
import { isFrozen, moments, outstanding, sessionReadiness, type SessionVerdict } from '#shared/domain/readiness/session.ts';
import type { Surroundings } from '#shared/domain/readiness/situation.ts';
import { timeOfDay } from '#shared/text/en/formats.ts';
import { barSentence, frozenSentence } from '#shared/text/en/readiness.ts';
import type { Confirmation } from './rows.ts';
import type { KeptOfSessions } from './store.ts';

/** A session is called next when its warm-up is this near. */
const NEXT_MS = 3 * 3_600_000;

/** Readiness as it is to be shown: computed until warm-up, from then on as it was frozen. */
export interface Seen {
  verdict: SessionVerdict | null;
  frozen: boolean;
  lanes: LaneReadiness[];
}

export function seenOf(session: Session, around: Surroundings, kept: KeptOfSessions): Seen {
  if (!WATCHED_KINDS.includes(session.kind) || session.status === 'cancelled') return { verdict: null, frozen: false, lanes: [] };
  if (isFrozen(session, around.now)) {
    const last = kept.verdicts.get(session.id);
    return { verdict: last?.verdict ?? null, frozen: true, lanes: last?.lanes ?? [] };
  }
  const { verdict, lanes } = sessionReadiness(session, around);
  return { verdict, frozen: false, lanes };
}

export function phaseOf(session: Session, around: Surroundings): SessionBar['phase'] {
  if (isOver(session, around.floor, around.now)) return 'past';
  if (around.now >= session.startAt) return 'now';
  if (around.now >= session.warmUpAt) return 'warm-up';
  return session.warmUpAt - around.now <= NEXT_MS ? 'next' : 'later';
}

function says(session: Session, seen: Seen, zone: string): string | null {
  const clock = (at: number) => timeOfDay(at, zone);
  if (seen.verdict === null) return null;
  return seen.frozen ? frozenSentence(seen.verdict) : barSentence(seen.verdict, session.lanes, outstanding(seen), clock);
}

const confirmationOf = (session: string, kept: KeptOfSessions): Confirmation | undefined => kept.confirmations.findLast((one) => one.session === session);

/** One bar of the floor. */
export function sessionBar(session: Session, around: Surroundings, kept: KeptOfSessions, zone: string): SessionBar {
  const seen = seenOf(session, around, kept);
  const confirmation = confirmationOf(session.id, kept);
  const progress = progressOf(session, around.floor);
  const begun = around.now >= session.startAt;
  return {
    id: session.id, name: session.name, kind: session.kind, fromLane: Math.min(...session.lanes), toLane: Math.max(...session.lanes), warmUpAt: session.warmUpAt,
    startAt: session.startAt, endAt: begun ? endOf(session, around.floor, around.now).endAt : session.endAt, phase: phaseOf(session, around), verdict: seen.verdict,
    says: says(session, seen, zone),
    lanes: session.lanes.map((lane) => ({ lane, state: seen.lanes.find((one) => one.lane === lane)?.mark ?? 'ok' })),
    confirmed: confirmation && !confirmation.reopened ? { by: confirmation.by, at: confirmation.at } : null,
    game: progress?.game ?? null, frame: progress?.frame ?? null,
  };
}

export function sessionSummary(session: Session, around: Surroundings, kept: KeptOfSessions, zone: string): SessionSummary {
  return summaryOf(session, seenOf(session, around, kept), around, kept, zone);
}

function summaryOf(session: Session, seen: Seen, around: Surroundings, kept: KeptOfSessions, zone: string): SessionSummary {
  const { id, name, kind, leagueId, date, lanes, warmUpAt, startAt } = session;
  const end = around.now >= startAt ? endOf(session, around.floor, around.now) : { endAt: session.endAt, basis: 'booked' as const };
  const confirmation = confirmationOf(id, kept);
  return {
    id, name, kind, league: leagueId, date, lanes: [...lanes], warmUpAt, startAt, endAt: end.endAt, endBasis: end.basis, phase: phaseOf(session, around),
    verdict: seen.verdict, frozen: seen.frozen, marks: seen.lanes.map(({ lane, mark }) => ({ lane, mark })), says: says(session, seen, zone),
    confirmation: confirmation ? { by: confirmation.by, at: confirmation.at, reopened: confirmation.reopened } : null,
    concerns: kept.concerns.filter((concern) => concern.session === id && concern.settled === null).length,
  };
}

export function sessionView(session: Session, around: Surroundings, kept: KeptOfSessions, zone: string): SessionView {
  const seen = seenOf(session, around, kept);
  const offers = seen.verdict === null || seen.frozen ? { failing: [], offers: [], noneUntil: null } : offersFor(session, { session: session.id, at: around.now, verdict: seen.verdict, lanes: seen.lanes }, around);
  const known = around.patterns.find((pattern) => pattern.code === session.pattern);
  return {
    ...summaryOf(session, seen, around, kept, zone), at: around.now,
    pattern: session.pattern === null ? null : { code: session.pattern, name: known?.name ?? null, revision: session.revision },
    fresh: session.fresh, sanctioned: session.sanctioned, teams: session.teams, lanesSeen: seen.lanes, moments: seen.frozen ? [] : moments(seen), offers,
    raised: kept.concerns.filter((concern) => concern.session === session.id).map(({ session: _of, ...concern }) => concern),
    confirmations: kept.confirmations.filter((one) => one.session === session.id).map(({ by, at, reopened }) => ({ by, at, reopened })),
  };
}
