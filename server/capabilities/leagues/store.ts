import type { Knex } from 'knex';
import type { LeagueForm } from '#shared/contracts/leagues.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { fromBinary, toBinary } from '#server/platform/db/uuid.ts';
import { type Evening, eveningOfRow, eveningToRow, type League, leagueOfRow, leagueToRow, type LeagueRow, type SessionRow } from './rows.ts';

type LaneRow = { centre_id: Buffer; session_id: Buffer; lane: number };

/** Sessions of a query with their lanes, by start; runs in whatever `on` is, a transaction included. */
export async function eveningsOf(on: Knex, centreId: Buffer, narrow: (query: Knex.QueryBuilder) => void): Promise<Evening[]> {
  const rows = await on('session').where('centre_id', centreId).modify(narrow).orderBy(['start_at', 'id']).select<SessionRow[]>('*');
  if (rows.length === 0) return [];
  const lanes = await on('session_lane').where('centre_id', centreId).whereIn('session_id', rows.map((row) => row.id)).orderBy('lane').select<LaneRow[]>('*');
  const byId = new Map<string, number[]>();
  for (const { session_id, lane } of lanes) {
    const key = fromBinary(session_id);
    byId.set(key, [...(byId.get(key) ?? []), lane]);
  }
  return rows.map((row) => eveningOfRow(row, byId.get(fromBinary(row.id)) ?? []));
}

/**
 * Own tables of leagues and sessions, read and written under the centre's lock: every writer goes through the ledger's `decide`, so
 * that two bookings of one lane never both find it free.
 */
export const leagueStore = {
  async league(trx: Knex, centreId: Buffer, id: string): Promise<League | null> {
    const row = await trx<LeagueRow>('league').where({ centre_id: centreId, id: toBinary(id) }).first();
    return row ? leagueOfRow(row) : null;
  },

  async nameTaken(trx: Knex, centreId: Buffer, name: string, except: string | null): Promise<boolean> {
    const rows = await trx('league').where({ centre_id: centreId, name }).whereNull('ended_at').select<Pick<LeagueRow, 'id'>[]>('id');
    return rows.some((row) => fromBinary(row.id) !== except);
  },

  async insertLeague(trx: Knex, centreId: Buffer, id: string, form: LeagueForm, now: number): Promise<void> {
    await trx('league').insert({ centre_id: centreId, id: toBinary(id), ...leagueToRow(form), created_at: toRowTime(now), ended_at: null });
  },

  async updateLeague(trx: Knex, centreId: Buffer, id: string, form: LeagueForm): Promise<void> {
    await trx('league').where({ centre_id: centreId, id: toBinary(id) }).update(leagueToRow(form));
  },

  async endLeague(trx: Knex, centreId: Buffer, id: string, now: number): Promise<void> {
    await trx('league').where({ centre_id: centreId, id: toBinary(id) }).update({ ended_at: toRowTime(now) });
  },

  async evening(trx: Knex, centreId: Buffer, id: string): Promise<Evening | null> {
    const [found] = await eveningsOf(trx, centreId, (query) => void query.where('id', toBinary(id)));
    return found ?? null;
  },

  eveningsOfLeague: (trx: Knex, centreId: Buffer, league: string): Promise<Evening[]> => eveningsOf(trx, centreId, (query) => void query.where('league_id', toBinary(league))),

  /** Booked sessions that touch [from, to). */
  bookedBetween: (trx: Knex, centreId: Buffer, from: number, to: number): Promise<Evening[]> =>
    eveningsOf(trx, centreId, (query) => void query.where('status', 'booked').where('warm_up_at', '<', toRowTime(to)).where('end_at', '>', toRowTime(from))),

  /** Writes sessions whole, new or known, with their lanes. */
  async saveEvenings(trx: Knex, centreId: Buffer, evenings: readonly Evening[]): Promise<void> {
    if (evenings.length === 0) return;
    const rows = evenings.map((evening) => eveningToRow(centreId, evening));
    await trx('session').insert(rows).onConflict(['centre_id', 'id']).merge();
    await trx('session_lane').where('centre_id', centreId).whereIn('session_id', rows.map((row) => row.id)).delete();
    const lanes = evenings.flatMap((evening) => evening.lanes.map((lane) => ({ centre_id: centreId, session_id: toBinary(evening.id), lane })));
    if (lanes.length > 0) await trx('session_lane').insert(lanes);
  },
};
