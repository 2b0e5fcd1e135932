import type { LeagueForm } from '#shared/contracts/leagues.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import type { SessionKind } from '#shared/domain/leagues/session-kinds.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';
import { fromBinary, toBinary } from '#server/platform/db/uuid.ts';

export interface LeagueRow {
  centre_id: Buffer;
  id: Buffer;
  name: string;
  weekday: number;
  start_minutes: number;
  warm_up_minutes: number;
  from_lane: number;
  to_lane: number;
  teams: number;
  bowlers_a_team: number;
  games: number;
  absent: number;
  crosses_lanes: boolean;
  first_date: string;
  last_date: string;
  skip_dates: string[];
  pattern: string | null;
  revision: number | null;
  fresh: boolean;
  sanctioned: boolean;
  created_at: Date;
  ended_at: Date | null;
}

export interface League extends LeagueForm {
  id: string;
  endedAt: number | null;
}

export interface SessionRow {
  centre_id: Buffer;
  id: Buffer;
  league_id: Buffer | null;
  kind: SessionKind;
  name: string;
  business_date: string;
  season_date: string | null;
  warm_up_at: Date;
  start_at: Date;
  end_at: Date;
  status: 'booked' | 'cancelled';
  changed: boolean;
  pattern: string | null;
  revision: number | null;
  fresh: boolean;
  sanctioned: boolean;
  teams: number | null;
  bowlers: number | null;
  games: number | null;
  absent: number | null;
}

/** A session with what only its own slice needs: the night of its season, and whether somebody set it by hand. */
export interface Evening extends Session {
  seasonDate: string | null;
  changed: boolean;
}

export function leagueOfRow(row: LeagueRow): League {
  return {
    id: fromBinary(row.id), name: row.name, weekday: row.weekday, startMinutes: row.start_minutes, warmUpMinutes: row.warm_up_minutes, fromLane: row.from_lane,
    toLane: row.to_lane, teams: row.teams, bowlersATeam: row.bowlers_a_team, games: row.games, absent: row.absent, crossesLanes: row.crosses_lanes,
    firstDate: row.first_date, lastDate: row.last_date, skipDates: row.skip_dates, pattern: row.pattern, revision: row.revision, fresh: row.fresh,
    sanctioned: row.sanctioned, endedAt: fromRowTime(row.ended_at),
  };
}

export function leagueToRow(form: LeagueForm): Omit<LeagueRow, 'centre_id' | 'id' | 'created_at' | 'ended_at' | 'skip_dates'> & { skip_dates: string } {
  return {
    name: form.name, weekday: form.weekday, start_minutes: form.startMinutes, warm_up_minutes: form.warmUpMinutes, from_lane: form.fromLane, to_lane: form.toLane,
    teams: form.teams, bowlers_a_team: form.bowlersATeam, games: form.games, absent: form.absent, crosses_lanes: form.crossesLanes, first_date: form.firstDate,
    last_date: form.lastDate, skip_dates: JSON.stringify([...new Set(form.skipDates)].sort()), pattern: form.pattern, revision: form.revision, fresh: form.fresh,
    sanctioned: form.sanctioned,
  };
}

export function eveningOfRow(row: SessionRow, lanes: readonly number[]): Evening {
  return {
    id: fromBinary(row.id), kind: row.kind, leagueId: row.league_id ? fromBinary(row.league_id) : null, name: row.name, date: row.business_date,
    seasonDate: row.season_date, lanes, warmUpAt: fromRowTime(row.warm_up_at), startAt: fromRowTime(row.start_at), endAt: fromRowTime(row.end_at),
    status: row.status, changed: row.changed, pattern: row.pattern, revision: row.revision, fresh: row.fresh, sanctioned: row.sanctioned, teams: row.teams,
    format: row.bowlers === null || row.games === null ? null : { bowlers: row.bowlers, games: row.games, absent: row.absent ?? 0 },
  };
}

export function eveningToRow(centreId: Buffer, evening: Evening): SessionRow {
  return {
    centre_id: centreId, id: toBinary(evening.id), league_id: evening.leagueId ? toBinary(evening.leagueId) : null, kind: evening.kind, name: evening.name,
    business_date: evening.date, season_date: evening.seasonDate, warm_up_at: toRowTime(evening.warmUpAt), start_at: toRowTime(evening.startAt),
    end_at: toRowTime(evening.endAt), status: evening.status, changed: evening.changed, pattern: evening.pattern, revision: evening.revision,
    fresh: evening.fresh, sanctioned: evening.sanctioned, teams: evening.teams, bowlers: evening.format?.bowlers ?? null, games: evening.format?.games ?? null,
    absent: evening.format?.absent ?? null,
  };
}
