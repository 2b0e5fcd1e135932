import type { Knex } from 'knex';
import type { BookingView, LeagueView } from '#shared/contracts/leagues.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { fromBinary, toBinary } from '#server/platform/db/uuid.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { type Evening, leagueOfRow, type League, type LeagueRow, type SessionRow } from './rows.ts';
import { eveningsOf } from './store.ts';

type CountRow = { league_id: Buffer; nights: number; next_at: Date | null };
type SecretaryRow = { league_id: Buffer; name: string };

export function bookingView(evening: Evening): BookingView {
  const { id, kind, leagueId, name, date, warmUpAt, startAt, endAt, lanes, status, changed } = evening;
  return { id, kind, league: leagueId, name, date, warmUpAt, startAt, endAt, lanes: [...lanes], status, changed };
}

/** What the screens of leagues, and other slices, read of them. */
export function leaguesReadModel(db: Knex) {
  async function secretariesOf(centre: CentreRef): Promise<Map<string, string[]>> {
    const rows = await db('membership_league as l').join('user as u', 'u.id', 'l.user_id').where('l.centre_id', centre.id).orderBy('u.name').select<SecretaryRow[]>('l.league_id', 'u.name');
    const names = new Map<string, string[]>();
    for (const { league_id, name } of rows) names.set(fromBinary(league_id), [...(names.get(fromBinary(league_id)) ?? []), name]);
    return names;
  }

  async function views(centre: CentreRef, leagues: readonly League[], now: number): Promise<LeagueView[]> {
    const counts = (await db<SessionRow>('session').where({ centre_id: centre.id, status: 'booked' }).whereNotNull('league_id').groupBy('league_id')
      .select('league_id', db.raw('count(*) as nights'), db.raw('min(case when start_at > ? then start_at end) as next_at', [toRowTime(now)]))) as unknown as CountRow[];
    const byLeague = new Map(counts.map((row) => [fromBinary(row.league_id), row]));
    const secretaries = await secretariesOf(centre);
    return leagues.map(({ endedAt, ...league }) => ({
      ...league, nights: Number(byLeague.get(league.id)?.nights ?? 0), nextAt: byLeague.get(league.id)?.next_at?.getTime() ?? null, ended: endedAt !== null,
      secretaries: secretaries.get(league.id) ?? [],
    }));
  }

  return {
    async leagues(centre: CentreRef, now: number, only: readonly string[] | null): Promise<LeagueView[]> {
      const rows = await db<LeagueRow>('league').where('centre_id', centre.id).orderBy(['weekday', 'start_minutes', 'name']).select<LeagueRow[]>('*');
      const seen = rows.map(leagueOfRow).filter((league) => only === null || only.includes(league.id));
      return views(centre, seen, now);
    },

    async league(centre: CentreRef, id: string, now: number): Promise<{ league: LeagueView; sessions: BookingView[] } | null> {
      const row = await db<LeagueRow>('league').where({ centre_id: centre.id, id: toBinary(id) }).first();
      if (!row) return null;
      const [league] = await views(centre, [leagueOfRow(row)], now);
      const sessions = await eveningsOf(db, centre.id, (query) => void query.where('league_id', toBinary(id)));
      return league ? { league, sessions: sessions.map(bookingView) } : null;
    },

    async leagueIds(centre: CentreRef): Promise<string[]> {
      const rows = await db('league').where('centre_id', centre.id).select<Pick<LeagueRow, 'id'>[]>('id');
      return rows.map((row) => fromBinary(row.id));
    },

    /** Names of the leagues that want a pattern, by its code; ended ones don't. */
    async patternUsers(centre: CentreRef): Promise<Map<string, string[]>> {
      const rows = await db('league').where('centre_id', centre.id).whereNotNull('pattern').whereNull('ended_at').orderBy('name').select<{ pattern: string; name: string }[]>('pattern', 'name');
      const users = new Map<string, string[]>();
      for (const { pattern, name } of rows) users.set(pattern, [...(users.get(pattern) ?? []), name]);
      return users;
    },

    async session(centre: CentreRef, id: string): Promise<Evening | null> {
      const [found] = await eveningsOf(db, centre.id, (query) => void query.where('id', toBinary(id)));
      return found ?? null;
    },

    ofDate: (centre: CentreRef, date: string): Promise<Evening[]> => eveningsOf(db, centre.id, (query) => void query.where('business_date', date)),

    /** Booked sessions that touch [from, to), by start. */
    between: (centre: CentreRef, from: number, to: number): Promise<Evening[]> =>
      eveningsOf(db, centre.id, (query) => void query.where('status', 'booked').where('warm_up_at', '<', toRowTime(to)).where('end_at', '>', toRowTime(from))),
  };
}
export type LeaguesReadModel = ReturnType<typeof leaguesReadModel>;
