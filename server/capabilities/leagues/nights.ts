import type { BookingForm, LeagueForm } from '#shared/contracts/leagues.ts';
import { businessDayAt, instantOfWall } from '#shared/domain/business-day.ts';
import { bookedLength } from '#shared/domain/leagues/end-forecast.ts';
import { bowlersOnPair, type PairFormat } from '#shared/domain/leagues/frames.ts';
import { laneRangeFault, lanesBetween } from '#shared/domain/leagues/lanes.ts';
import { leagueFaults } from '#shared/domain/leagues/rules.ts';
import { seasonOf, type SeasonNight } from '#shared/domain/leagues/season.ts';
import { newId } from '#server/platform/db/uuid.ts';
import { invalid, Refusal } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Evening } from './rows.ts';

/** A pattern that a league may ask for. */
export interface PatternName {
  code: string;
  name: string;
  revisions: readonly number[];
}

/** The names of a library of patterns, as leagues ask for them. */
export const patternNames = (library: { patterns: readonly { code: string; name: string }[]; revisions: readonly { code: string; revision: number }[] }): PatternName[] =>
  library.patterns.map(({ code, name }) => ({ code, name, revisions: library.revisions.filter((one) => one.code === code).map((one) => one.revision) }));

const SEASON_FIELD: Record<string, string> = {
  'league.season-reversed': '/lastDate', 'league.season-too-long': '/lastDate', 'league.season-empty': '/skipDates', 'league.start-in-missing-hour': '/startMinutes', 'league.date-invalid': '/firstDate',
};

/** Throws what is wrong with a league, beside its fields; else the nights of its season. */
export function checkedNights(form: LeagueForm, centre: CentreRef, patterns: readonly PatternName[]): SeasonNight[] {
  const faults = leagueFaults(form, centre.lanes);
  const [first] = faults;
  if (first) throw new Refusal(422, first.code, first.params, faults.map((fault) => ({ pointer: `/${fault.field}`, code: fault.code, params: fault.params })));
  if (form.pattern !== null) {
    const known = patterns.find((pattern) => pattern.code === form.pattern);
    if (!known) throw invalid('league.pattern-unknown', '/pattern', { pattern: form.pattern });
    if (form.revision !== null && !known.revisions.includes(form.revision)) throw invalid('league.pattern-unknown', '/revision', { pattern: form.pattern, revision: form.revision });
  }
  const season = seasonOf({ ...form, zone: centre.zone });
  if (!season.ok) throw invalid(season.code, SEASON_FIELD[season.code] ?? '/firstDate', { date: season.date });
  return season.nights;
}

export const formatOf = (form: Pick<LeagueForm, 'bowlersATeam' | 'games' | 'absent'>): PairFormat => ({ bowlers: bowlersOnPair(form.bowlersATeam), games: form.games, absent: form.absent });

/**
 * Sessions after a league was made or changed: nights still to come are as the league says, those set by hand keep lanes, time and
 * cancelling, and nights that it no longer has are cancelled. Those that have begun stay as they were.
 */
export function seasonEvenings(league: string, form: LeagueForm, nights: readonly SeasonNight[], known: readonly Evening[], centre: CentreRef, now: number): Evening[] {
  const byDate = new Map(known.map((evening) => [evening.seasonDate, evening]));
  const ahead = nights.filter((night) => night.warmUpAt > now);
  const kept = ahead.flatMap((night) => {
    const before = byDate.get(night.date);
    if (before && before.warmUpAt <= now) return [];
    const fresh = eveningOf(league, form, night, centre, before?.id ?? newId(now));
    return [before?.changed ? { ...fresh, lanes: before.lanes, warmUpAt: before.warmUpAt, startAt: before.startAt, endAt: before.endAt, date: before.date, status: before.status, changed: true } : fresh];
  });
  const dates = new Set(ahead.map((night) => night.date));
  const dropped = known.filter((evening) => evening.status === 'booked' && evening.warmUpAt > now && evening.seasonDate !== null && !dates.has(evening.seasonDate));
  return [...kept, ...dropped.map((evening) => ({ ...evening, status: 'cancelled' as const }))];
}

function eveningOf(league: string, form: LeagueForm, night: SeasonNight, centre: CentreRef, id: string): Evening {
  const format = formatOf(form);
  return {
    id, kind: 'league', leagueId: league, name: form.name, date: businessDayAt(night.startAt, centre.zone, centre.cut).date, seasonDate: night.date,
    lanes: lanesBetween(form.fromLane, form.toLane), warmUpAt: night.warmUpAt, startAt: night.startAt, endAt: night.startAt + bookedLength(format), status: 'booked',
    changed: false, pattern: form.pattern, revision: form.revision, fresh: form.fresh, sanctioned: form.sanctioned, teams: form.teams, format,
  };
}

/** A booking for one evening. Open play and parties don't cross lanes: their bowlers stand on their own lane. */
export function bookingEvening(form: BookingForm, centre: CentreRef, now: number): Evening {
  const fault = laneRangeFault(form.fromLane, form.toLane, centre.lanes);
  if (fault) throw invalid(fault, fault === 'league.lanes-outside-house' && form.fromLane >= 1 ? '/toLane' : '/fromLane', { from: form.fromLane, to: form.toLane, house: centre.lanes });
  const startAt = startOf(form.date, form.startMinutes, centre);
  return {
    id: newId(now), kind: form.kind, leagueId: null, name: form.name, date: businessDayAt(startAt, centre.zone, centre.cut).date, seasonDate: null,
    lanes: lanesBetween(form.fromLane, form.toLane), warmUpAt: startAt, startAt, endAt: startAt + form.minutes * 60_000, status: 'booked', changed: false,
    pattern: form.pattern ?? null, revision: null, fresh: false, sanctioned: false, teams: null, format: null,
  };
}

/** Instant of a wall time in the centre; refuses the hour that the clocks skip. */
export function startOf(date: string, minutes: number, centre: CentreRef): number {
  const wall = instantOfWall(date, minutes, centre.zone);
  if (wall.ok) return wall.instant;
  throw wall.code === 'time.missing-hour' ? invalid('booking.in-missing-hour', '/startMinutes', { date }) : invalid('league.date-invalid', '/date', { date });
}
