import * as z from 'zod/mini';
import { SESSION_KINDS } from '../domain/leagues/session-kinds.ts';
import { CHECKS, LANE_MARKS } from '../domain/readiness/check.ts';
import { SESSION_VERDICTS } from '../domain/readiness/session.ts';
import { centreParams, contract, date, instant, laneNumber, note, uuid } from './contract.ts';

const mark = z.enum(LANE_MARKS as unknown as readonly ['ok', 'waits', 'at-risk', 'holds']);
const params = z.record(z.string(), z.union([z.string(), z.number()]));

/** One check of one lane: the answer, a code with what its sentence needs, what settles it, and who is waited for. */
export const checkView = z.object({
  check: z.enum(CHECKS), verdict: z.enum(['ok', 'at-risk', 'holds']), waits: z.boolean(), code: z.string(), params,
  settles: z.nullable(z.object({ by: instant, what: z.enum(['run', 'mechanic', 'people', 'desk']) })),
  waitsFor: z.nullable(z.object({ kind: z.enum(['run', 'mechanic', 'people', 'desk']), name: z.nullable(z.string()) })),
  latestStart: z.nullable(instant),
});
export const laneReadinessView = z.object({ lane: laneNumber, mark, checks: z.array(checkView) });
export type LaneReadinessView = z.infer<typeof laneReadinessView>;

const because = z.object({ code: z.string(), params });
export const confirmationView = z.object({
  by: z.string(), at: instant, /** Opened again, when and why; null: it stands. */ reopened: z.nullable(z.object({ at: instant, because })),
});
export const concernView = z.object({
  id: uuid, by: z.string(), at: instant, text: z.string(), lane: z.nullable(laneNumber), settled: z.nullable(z.object({ by: z.string(), at: instant, note: z.string() })),
});

export const offerView = z.union([
  z.object({ kind: z.literal('move'), fromPair: laneNumber, toPair: laneNumber, deliveries: z.nullable(z.int()) }),
  z.object({ kind: z.literal('dress-then-move'), fromPair: laneNumber, toPair: laneNumber, machine: z.string(), startAt: instant, doneAt: instant }),
  z.object({ kind: z.literal('one-lane'), fromPair: laneNumber, lane: laneNumber, delayMs: z.int() }),
]);

export const sessionSummary = z.object({
  id: uuid, name: z.string(), kind: z.enum(SESSION_KINDS), league: z.nullable(uuid), date, lanes: z.array(laneNumber), warmUpAt: instant, startAt: instant, endAt: instant,
  /** The end is a forecast from frames, or as booked. */
  endBasis: z.enum(['frames', 'booked']), phase: z.enum(['later', 'next', 'warm-up', 'now', 'past']),
  /** Null: nobody watches this kind, or nothing was recorded before it froze. */
  verdict: z.nullable(z.enum(SESSION_VERDICTS)),
  /** From warm-up on: as it was then. */
  frozen: z.boolean(),
  marks: z.array(z.object({ lane: laneNumber, mark })), says: z.nullable(z.string()),
  confirmation: z.nullable(confirmationView), concerns: z.int(),
});
export type SessionSummary = z.infer<typeof sessionSummary>;

export const sessionView = z.extend(sessionSummary, {
  at: instant,
  pattern: z.nullable(z.object({ code: z.string(), name: z.nullable(z.string()), revision: z.nullable(z.int()) })),
  fresh: z.boolean(), sanctioned: z.boolean(), teams: z.nullable(z.int()),
  lanesSeen: z.array(laneReadinessView),
  moments: z.array(z.object({ at: instant, kind: z.enum(['settles', 'latest']), lanes: z.array(laneNumber), mark })),
  offers: z.object({ failing: z.array(laneNumber), offers: z.array(offerView), noneUntil: z.nullable(instant) }),
  raised: z.array(concernView), confirmations: z.array(confirmationView),
});
export type SessionView = z.infer<typeof sessionView>;

const weights = z.record(z.enum(CHECKS), z.enum(['holds', 'warns', 'ignored']));
const sessionParams = z.extend(centreParams, { session: uuid });
const at = '/api/centres/:centre/sessions';
const one = `${at}/:session`;
const unknown = ['booking.unknown'] as const;

export const readinessContracts = {
  list: contract({
    id: 'readiness.list', method: 'GET', path: at, permission: 'readiness.see', summary: 'Sessions of a business date with their readiness; a secretary’s own leagues', params: centreParams,
    query: z.object({ date: z.optional(date) }), response: z.object({ date, at: instant, sessions: z.array(sessionSummary) }), refusals: ['league.date-invalid'],
  }),
  see: contract({ id: 'readiness.see', method: 'GET', path: one, permission: 'readiness.see', summary: 'Readiness of one session: every check of every lane, what settles it, offers', params: sessionParams, response: sessionView, refusals: unknown }),
  confirm: contract({
    id: 'readiness.confirm', method: 'POST', path: `${one}/confirm`, permission: 'readiness.confirm', summary: 'The secretary’s word that the lanes are ready; never gates play', params: sessionParams, response: sessionView,
    refusals: [...unknown, 'readiness.holds', 'readiness.frozen', 'readiness.already-confirmed', 'readiness.not-watched'],
  }),
  concern: contract({
    id: 'readiness.concern', method: 'POST', path: `${one}/concerns`, permission: 'readiness.confirm', summary: 'Raise a concern; the desk hears of it', params: sessionParams, status: 201,
    body: z.object({ text: note(500).check(z.minLength(1)), lane: z.optional(z.nullable(laneNumber)) }), response: sessionView, refusals: [...unknown, 'readiness.lane-not-of-session', 'booking.cancelled'],
  }),
  settle: contract({
    id: 'readiness.settle', method: 'POST', path: `${one}/concerns/:concern/settle`, permission: 'readiness.settle', summary: 'Settle a concern, saying how', params: z.extend(sessionParams, { concern: uuid }),
    body: z.object({ note: note(300).check(z.minLength(1)) }), response: sessionView, refusals: [...unknown, 'concern.unknown', 'concern.settled'],
  }),
  move: contract({
    id: 'readiness.move', method: 'POST', path: `${one}/move`, permission: 'readiness.settle', summary: 'Move one pair of a session to another pair', params: sessionParams,
    body: z.object({ fromPair: laneNumber, toPair: laneNumber }), response: sessionView,
    refusals: [...unknown, 'booking.cancelled', 'booking.past', 'readiness.pair-not-of-session', 'league.lanes-outside-house', 'league.lanes-taken', 'readiness.pair-not-free'],
  }),
  weights: contract({ id: 'readiness.weights', method: 'GET', path: '/api/centres/:centre/readiness-checks', permission: 'settings.see', summary: 'Which checks hold, warn, or are ignored', params: centreParams, response: z.object({ weights }) }),
  setWeights: contract({
    id: 'readiness.setWeights', method: 'PUT', path: '/api/centres/:centre/readiness-checks', permission: 'settings.edit', summary: 'Say which checks hold, warn, or are ignored', params: centreParams, body: z.object({ weights }),
    response: z.object({ weights }),
  }),
};
