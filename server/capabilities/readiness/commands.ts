import { createHash } from 'node:crypto';
import { pairsOf } from '#shared/domain/leagues/lanes.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import { WATCHED_KINDS } from '#shared/domain/leagues/session-kinds.ts';
import { shownOf } from '#shared/domain/readiness/confirmation.ts';
import { candidatePairs } from '#shared/domain/readiness/offers.ts';
import { isFrozen, sessionReadiness } from '#shared/domain/readiness/session.ts';
import type { Actor } from '#shared/policy/policy.ts';
import { newId } from '#server/platform/db/uuid.ts';
import { personOf } from '#server/platform/http/person.ts';
import { conflict, invalid, notFound } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { type Records, type ReadinessSources, surroundings } from './sources.ts';
import { readinessStore as store, type Weights } from './store.ts';

export interface CommandDeps {
  ledger: Ledger;
  leagues: ReadinessSources['leagues'];
  records: (centre: CentreRef, now: number, until: number) => Promise<Records>;
  now: () => number;
  changed: (centre: CentreRef) => void;
}

/** What people say and do about a session. Everything is decided under the centre's lock, upon the house as it is. */
export function readinessCommands({ ledger, leagues, records, now: clock, changed }: CommandDeps) {
  const sessionOf = async (centre: CentreRef, id: string): Promise<Session> => {
    const session = await leagues.session(centre, id);
    if (!session) throw notFound('booking.unknown');
    return session;
  };
  const done = async <R>(centre: CentreRef, work: Promise<R>): Promise<R> => {
    const result = await work;
    changed(centre);
    return result;
  };
  return {
    /** The secretary's word; what they were shown is recorded with it. */
    async confirm(centre: CentreRef, actor: Actor, id: string): Promise<void> {
      const session = await sessionOf(centre, id);
      const known = await records(centre, clock(), session.endAt);
      const by = personOf(actor);
      return done(centre, ledger.decide(centre, async ({ state }, now, trx) => {
        if (session.status === 'cancelled' || !WATCHED_KINDS.includes(session.kind)) throw conflict('readiness.not-watched');
        if (isFrozen(session, now)) throw conflict('readiness.frozen', { warmUpAt: session.warmUpAt });
        const readiness = sessionReadiness(session, surroundings(centre, state, known, now));
        const holding = readiness.lanes.filter((lane) => lane.mark === 'holds').map((lane) => lane.lane);
        if (holding.length > 0) throw conflict('readiness.holds', { lanes: holding.join() });
        const standing = (await store.kept(trx, centre.id, [id])).confirmations.findLast((one) => one.reopened === null);
        if (standing) throw conflict('readiness.already-confirmed', { by: standing.by, at: standing.at });
        const shown = shownOf(session, readiness);
        const hash = createHash('sha256').update(JSON.stringify(shown)).digest('hex');
        return {
          facts: [{ type: 'session.confirmed' as const, data: { session: id, lanes: [...session.lanes] }, by }], topics: ['sessions' as const], result: () => undefined,
          write: (own) => store.insertConfirmation(own, centre.id, { id: newId(now), session: id, by, at: now, shown, hash }),
        };
      }));
    },

    async raise(centre: CentreRef, actor: Actor, id: string, given: { text: string; lane: number | null }): Promise<void> {
      const session = await sessionOf(centre, id);
      if (session.status === 'cancelled') throw conflict('booking.cancelled');
      if (given.lane !== null && !session.lanes.includes(given.lane)) throw invalid('readiness.lane-not-of-session', '/lane', { lane: given.lane });
      const by = personOf(actor);
      return done(centre, ledger.decide(centre, (_house, now) => ({
        facts: [{ type: 'session.concern' as const, data: { session: id, text: given.text, lane: given.lane ?? undefined }, by }], topics: ['sessions' as const], result: () => undefined,
        write: (trx) => store.insertConcern(trx, centre.id, { id: newId(now), session: id, by: by.name, at: now, text: given.text, lane: given.lane }),
      })));
    },

    settle(centre: CentreRef, actor: Actor, id: string, concern: string, note: string): Promise<void> {
      const by = personOf(actor).name;
      return done(centre, ledger.decide(centre, async (_house, now, trx) => {
        const raised = await store.concern(trx, centre.id, id, concern);
        if (!raised) throw notFound('concern.unknown');
        if (raised.settled) throw conflict('concern.settled', { by: raised.settled.by });
        return { facts: [], topics: ['sessions' as const], result: () => undefined, write: (own) => store.settleConcern(own, centre.id, concern, { by, at: now, note }) };
      }));
    },

    setWeights: (centre: CentreRef, weights: Weights): Promise<void> =>
      done(centre, ledger.decide(centre, () => ({ facts: [], topics: ['sessions' as const, 'settings' as const], result: () => undefined, write: (trx) => store.setWeights(trx, centre.id, weights) }))),

    sessionOf,
    move: (centre: CentreRef, id: string, pairs: { fromPair: number; toPair: number }) => done(centre, movePair({ ledger, leagues, records, now: clock, changed }, centre, id, pairs)),
  };
}
export type ReadinessCommands = ReturnType<typeof readinessCommands>;

/** A move to a pair that nobody has, wants, or is on without a known end; whether it must be dressed first is shown afterwards. */
async function movePair({ leagues, records, now: clock }: CommandDeps, centre: CentreRef, id: string, { fromPair, toPair }: { fromPair: number; toPair: number }): Promise<void> {
  const known = await records(centre, clock(), clock() + 24 * 3_600_000);
  if (pairsOf([fromPair])[0] !== fromPair) throw invalid('readiness.pair-not-of-session', '/fromPair', { pair: fromPair });
  if (pairsOf([toPair])[0] !== toPair) throw invalid('league.lanes-outside-house', '/toPair', { from: toPair, to: toPair + 1, house: centre.lanes });
  await leagues.movePair(centre, id, fromPair, toPair, ({ state }, now, session, booked) => {
    const around = surroundings(centre, state, { ...known, sessions: booked }, now);
    const lanes = [state.floor[toPair - 1], state.floor[toPair]];
    const broken = lanes.some((lane) => !lane || lane.outOfService !== null || lane.stop !== null);
    const occupied = lanes.some((lane) => lane?.use && lane.use.until === null && lane.use.games === null && !booked.some((other) => other.lanes.includes(lane.lane)));
    if (broken || occupied || !candidatePairs(session, around).includes(toPair)) throw conflict('readiness.pair-not-free', { pair: toPair });
  });
}
