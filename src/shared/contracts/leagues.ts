import * as z from 'zod/mini';
import { BOOKING_KINDS, SESSION_KINDS } from '../domain/leagues/session-kinds.ts';
import { centreParams, contract, date, instant, laneNumber, line, uuid } from './contract.ts';

const minutesOfDay = z.int().check(z.minimum(0), z.maximum(1439));
const patternCode = z.nullable(line(40));
const revision = z.nullable(z.int().check(z.minimum(1), z.maximum(9999)));
const laneField = z.int().check(z.minimum(-99), z.maximum(999));

/** What a person says of a league; lanes are judged by the house's own size and pairs, so that the message can say why. */
export const leagueForm = z.object({
  name: line(60),
  /** 1 = Monday … 7 = Sunday. */
  weekday: z.int().check(z.minimum(1), z.maximum(7)),
  startMinutes: minutesOfDay,
  warmUpMinutes: z.int().check(z.minimum(0), z.maximum(60)),
  fromLane: laneField,
  toLane: laneField,
  teams: z.int().check(z.minimum(1), z.maximum(99)),
  bowlersATeam: z.int().check(z.minimum(1), z.maximum(8)),
  games: z.int().check(z.minimum(1), z.maximum(12)),
  /** Blinds and vacancies on a pair. */
  absent: z.int().check(z.minimum(0), z.maximum(15)),
  crossesLanes: z.boolean(),
  firstDate: date,
  lastDate: date,
  skipDates: z.array(date).check(z.maxLength(60)),
  pattern: patternCode,
  revision,
  fresh: z.boolean(),
  sanctioned: z.boolean(),
});
export type LeagueForm = z.infer<typeof leagueForm>;

export const leagueView = z.extend(leagueForm, { id: uuid, nights: z.int(), nextAt: z.nullable(instant), ended: z.boolean(), secretaries: z.array(z.string()) });
export type LeagueView = z.infer<typeof leagueView>;

export const bookingView = z.object({
  id: uuid, kind: z.enum(SESSION_KINDS), league: z.nullable(uuid), name: z.string(), date, warmUpAt: instant, startAt: instant, endAt: instant,
  lanes: z.array(laneNumber), status: z.enum(['booked', 'cancelled']), /** Lanes, time or cancelling of this one evening were set by hand. */ changed: z.boolean(),
});
export type BookingView = z.infer<typeof bookingView>;

const leagueDetail = z.object({ league: leagueView, sessions: z.array(bookingView) });
const leagueParams = z.extend(centreParams, { league: uuid });
const sessionParams = z.extend(centreParams, { session: uuid });
const leagues = '/api/centres/:centre/leagues';
const bookings = '/api/centres/:centre/bookings';
const laneRefusals = ['league.lanes-reversed', 'league.lanes-outside-house', 'league.lanes-taken'] as const;
const seasonRefusals = [
  ...laneRefusals, 'league.lanes-whole-pairs', 'league.teams-exceed-lanes', 'league.season-reversed', 'league.season-too-long', 'league.season-empty',
  'league.start-in-missing-hour', 'league.date-invalid', 'league.pattern-unknown', 'league.absent-too-many', 'league.name-taken',
] as const;

export const bookingForm = z.object({
  kind: z.enum(BOOKING_KINDS), name: line(60), date, startMinutes: minutesOfDay, minutes: z.int().check(z.minimum(10), z.maximum(720)),
  fromLane: laneField, toLane: laneField, bowlersALane: z.optional(z.int().check(z.minimum(1), z.maximum(12))), pattern: z.optional(patternCode),
});
export type BookingForm = z.infer<typeof bookingForm>;

export const leagueContracts = {
  list: contract({
    id: 'leagues.list', method: 'GET', path: leagues, permission: 'league.see', summary: 'Leagues of the centre; a secretary’s own', params: centreParams,
    response: z.object({ leagues: z.array(leagueView), lanes: z.int(), zone: z.string(), patterns: z.array(z.object({ code: z.string(), name: z.string(), revisions: z.array(z.int()) })) }),
  }),
  see: contract({ id: 'leagues.see', method: 'GET', path: `${leagues}/:league`, permission: 'league.see', summary: 'One league with the sessions of its season', params: leagueParams, response: leagueDetail, refusals: ['league.unknown'] }),
  create: contract({
    id: 'leagues.create', method: 'POST', path: leagues, permission: 'league.edit', summary: 'A league; makes the sessions of its season', params: centreParams, body: leagueForm, status: 201, response: leagueDetail,
    refusals: seasonRefusals,
  }),
  change: contract({
    id: 'leagues.change', method: 'PUT', path: `${leagues}/:league`, permission: 'league.edit', summary: 'Change a league and the sessions that are still to come; evenings set by hand keep lanes and time',
    params: leagueParams, body: leagueForm, response: leagueDetail, refusals: ['league.unknown', 'league.ended', ...seasonRefusals],
  }),
  end: contract({
    id: 'leagues.end', method: 'POST', path: `${leagues}/:league/end`, permission: 'league.edit', summary: 'End a league: cancels the sessions that are still to come', params: leagueParams, response: leagueDetail,
    refusals: ['league.unknown', 'league.ended'],
  }),
  bookings: contract({
    id: 'bookings.list', method: 'GET', path: bookings, permission: 'call.see', summary: 'Everything booked on a business date', params: centreParams, query: z.object({ date: z.optional(date) }),
    response: z.object({ date, bookings: z.array(bookingView) }),
  }),
  book: contract({
    id: 'bookings.create', method: 'POST', path: bookings, permission: 'league.edit', summary: 'Book lanes for a party, open play, practice …', params: centreParams, body: bookingForm, status: 201, response: bookingView,
    refusals: [...laneRefusals, 'booking.past', 'booking.in-missing-hour', 'league.date-invalid'],
  }),
  move: contract({
    id: 'bookings.move', method: 'PUT', path: `${bookings}/:session`, permission: 'league.edit', summary: 'Other lanes, or another time, for one session', params: sessionParams,
    body: z.object({ lanes: z.array(laneNumber).check(z.minLength(1), z.maxLength(99)), date, startMinutes: minutesOfDay }), response: bookingView,
    refusals: ['booking.unknown', 'booking.cancelled', 'booking.past', 'booking.in-missing-hour', 'league.lanes-whole-pairs', 'league.date-invalid', ...laneRefusals],
  }),
  cancel: contract({
    id: 'bookings.cancel', method: 'POST', path: `${bookings}/:session/cancel`, permission: 'league.edit', summary: 'Cancel one session', params: sessionParams, response: bookingView,
    refusals: ['booking.unknown', 'booking.cancelled', 'booking.past'],
  }),
};
