import type { House } from '#shared/domain/house/state.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import { WATCHED_KINDS } from '#shared/domain/leagues/session-kinds.ts';
import { judge, type Judgement } from '#shared/domain/readiness/confirmation.ts';
import { type MailKind, mailDue } from '#shared/domain/readiness/mails.ts';
import { isFrozen, sessionReadiness, type SessionReadiness } from '#shared/domain/readiness/session.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger, NewFact } from '#server/platform/journal/ledger.ts';
import { newsMail, reopenedMail } from './letters.ts';
import type { Recipient } from './read-model.ts';
import type { Confirmation, KeptVerdict } from './rows.ts';
import { type Records, type ReadinessSources, surroundings } from './sources.ts';
import { type KeptOfSessions, readinessStore as store } from './store.ts';

const MINUTE = 60_000;
/** Verdicts are kept from so long before warm-up on; who looks earlier sees them computed. */
export const AHEAD_MS = 6 * 60 * MINUTE;
/** A server that was away at warm-up still freezes what it kept before. */
const BEHIND_MS = 6 * 60 * MINUTE;
/** Shortly before warm-up what every check says is kept anew each time: it is about to be frozen. */
const LAST_LOOK_MS = 25_000;
const TRANSITIONS_KEPT = 200;
const WATCH: Person = { kind: 'job', id: 'readiness-watch', name: 'Readiness' };

/** What one look at one session has to write. */
interface Step {
  session: Session;
  readiness: SessionReadiness | null;
  verdict: KeptVerdict | null;
  mail: MailKind | null;
  confirmation: { of: Confirmation; judged: Judgement } | null;
}

export const isWatched = (session: Session, now: number): boolean =>
  WATCHED_KINDS.includes(session.kind) && session.status === 'booked' && session.warmUpAt <= now + AHEAD_MS && session.warmUpAt > now - BEHIND_MS;

/** Null: nothing changed since the last look. */
function stepOf(centre: CentreRef, session: Session, house: House, records: Records, kept: KeptOfSessions, now: number): Step | null {
  const before = kept.verdicts.get(session.id);
  if (isFrozen(session, now)) {
    return before && before.frozenAt === null ? { session, readiness: null, verdict: { ...before, frozenAt: session.warmUpAt }, mail: null, confirmation: null } : null;
  }
  const readiness = sessionReadiness(session, surroundings(centre, house, records, now));
  const standing = kept.confirmations.findLast((one) => one.session === session.id && one.reopened === null);
  const judged = standing ? judge(standing.shown, session, readiness, standing.worse, now) : null;
  const told = before?.told ?? { held60At: null, held30At: null, readyAt: null };
  const mail = mailDue(readiness.verdict, session.warmUpAt, { held60: told.held60At !== null, held30: told.held30At !== null, ready: told.readyAt !== null }, now);
  const turned = !before || before.verdict !== readiness.verdict || before.frozenAt !== null;
  const moved = turned || said(before) !== said(readiness) || session.warmUpAt - now <= LAST_LOOK_MS;
  const confirmation = standing && judged && (!judged.stands || JSON.stringify(judged.worse) !== JSON.stringify(standing.worse)) ? { of: standing, judged } : null;
  if (!moved && !mail && !confirmation) return null;
  return { session, readiness, verdict: nextVerdict(before, readiness, mail, now), mail, confirmation };
}

/** Marks and codes of all checks: figures in them change all the time and are computed when read. */
const said = ({ lanes }: Pick<SessionReadiness, 'lanes'>): string => JSON.stringify(lanes.map((lane) => [lane.lane, lane.mark, lane.checks.map((check) => check.code)]));

function nextVerdict(before: KeptVerdict | undefined, readiness: SessionReadiness, mail: MailKind | null, now: number): KeptVerdict {
  const same = before?.verdict === readiness.verdict;
  const told = before?.told ?? { held60At: null, held30At: null, readyAt: null };
  return {
    session: readiness.session, verdict: readiness.verdict, since: same ? before.since : now, lanes: readiness.lanes, frozenAt: null,
    transitions: same ? before.transitions : [...(before?.transitions ?? []), { at: now, verdict: readiness.verdict }].slice(-TRANSITIONS_KEPT),
    told: { held60At: mail === 'held-60' ? now : told.held60At, held30At: mail === 'held-30' ? now : told.held30At, readyAt: mail === 'ready' ? now : told.readyAt },
  };
}

export interface WatchDeps {
  ledger: Ledger;
  notices: ReadinessSources['notices'];
  records: (centre: CentreRef, now: number, until: number) => Promise<Records>;
  kept: (centre: CentreRef, sessions: readonly string[]) => Promise<KeptOfSessions>;
  recipients: (centre: CentreRef, league: string | null) => Promise<Recipient[]>;
  publicUrl: string | null;
  /** Called after something was written. */
  changed: (centre: CentreRef) => void;
}

/**
 * One look at the sessions of a centre that are near: keeps transitions of their verdict, freezes them at warm-up, opens confirmations
 * again, and queues what is to be mailed, all of it in one unit of work under the centre's lock. Returns how many sessions it wrote.
 */
export function watcher(deps: WatchDeps) {
  return async (centre: CentreRef, now: number, options: { mail: boolean } = { mail: true }): Promise<number> => {
    const records = await deps.records(centre, now, now + AHEAD_MS + 12 * 60 * MINUTE);
    const watched = records.sessions.filter((session) => isWatched(session, now));
    if (watched.length === 0) return 0;
    const ids = watched.map((session) => session.id);
    const first = await deps.ledger.read(centre);
    const kept = await deps.kept(centre, ids);
    if (!watched.some((session) => stepOf(centre, session, first.state, records, kept, now) !== null)) return 0;
    const told = new Map(await Promise.all(watched.map(async (session) => [session.id, options.mail ? await deps.recipients(centre, session.leagueId) : []] as const)));
    const written = await deps.ledger.decide(centre, async ({ state }, _now, trx) => {
      const locked = await store.kept(trx, centre.id, ids);
      const steps = watched.flatMap((session) => stepOf(centre, session, state, records, locked, now) ?? []);
      const facts: NewFact[] = steps.flatMap(({ session, confirmation }) =>
        confirmation && !confirmation.judged.stands ? [{ type: 'session.reopened' as const, data: { session: session.id, because: confirmation.judged.because.code }, by: WATCH }] : []);
      return { facts, topics: steps.length > 0 ? ['sessions' as const] : [], result: () => steps.length, write: async (own) => {
        for (const step of steps) await writeStep(deps, own, centre, step, now, told.get(step.session.id) ?? []);
      } };
    }, { now });
    deps.changed(centre);
    return written;
  };
}

type Trx = Parameters<ReadinessSources['notices']['queueMail']>[0];

async function writeStep(deps: WatchDeps, trx: Trx, centre: CentreRef, step: Step, now: number, recipients: readonly Recipient[]): Promise<void> {
  const { session, readiness, verdict, mail, confirmation } = step;
  if (verdict) await store.saveVerdict(trx, centre.id, verdict);
  if (mail && readiness) {
    const letter = newsMail(mail, session, readiness, centre, deps.publicUrl);
    for (const { email } of recipients) await deps.notices.queueMail(trx, { centreId: centre.id, key: `readiness/${session.id}/${mail}`, to: email, ...letter });
  }
  if (!confirmation) return;
  const { of, judged } = confirmation;
  if (judged.stands) return store.markWorse(trx, centre.id, of.id, judged.worse);
  await store.reopen(trx, centre.id, of.id, now, judged.because);
  const letter = reopenedMail(session, judged.because, centre, deps.publicUrl);
  for (const { email } of recipients.filter((one) => one.role === 'secretary')) await deps.notices.queueMail(trx, { centreId: centre.id, key: `readiness/${session.id}/reopened/${of.id}`, to: email, ...letter });
}
