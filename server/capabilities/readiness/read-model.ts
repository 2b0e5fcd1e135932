import type { Knex } from 'knex';
import { WATCHED_KINDS } from '#shared/domain/leagues/session-kinds.ts';
import type { SessionVerdict } from '#shared/domain/readiness/session.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { toBinary } from '#server/platform/db/uuid.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

/** Who is told about a session: managers, mechanics, and the secretaries of its league. */
export interface Recipient {
  role: 'manager' | 'mechanic' | 'secretary';
  email: string;
  name: string;
}

export interface ReadyAtWarmUp {
  /** Leagues and tournaments whose warm-up lies in the span. */
  sessions: number;
  ready: number;
  /** Of those, how many have no verdict on record. */
  unknown: number;
}

export function readinessReadModel(db: Knex) {
  return {
    async recipients(centre: CentreRef, league: string | null): Promise<Recipient[]> {
      const staff = db('membership as m').join('user as u', 'u.id', 'm.user_id').where('m.centre_id', centre.id).whereIn('m.role', ['manager', 'mechanic']);
      const own = db('membership_league as l')
        .join('membership as m', (join) => join.on('m.centre_id', 'l.centre_id').andOn('m.user_id', 'l.user_id'))
        .join('user as u', 'u.id', 'l.user_id')
        .where({ 'l.centre_id': centre.id, 'm.role': 'secretary' });
      const told = await staff.orderBy('u.email').select<Recipient[]>('m.role', 'u.email', 'u.name');
      const secretaries = league === null ? [] : await own.where('l.league_id', toBinary(league)).orderBy('u.email').select<Recipient[]>('m.role', 'u.email', 'u.name');
      return [...told, ...secretaries];
    },

    /** For the night's figures: verdicts as they were frozen at warm-up, for warm-ups in [from, to) ms. */
    async readyAtWarmUp(centre: CentreRef, from: number, to: number): Promise<ReadyAtWarmUp> {
      const rows = await db('session as s')
        .leftJoin('session_verdict as v', (join) => join.on('v.centre_id', 's.centre_id').andOn('v.session_id', 's.id').andOnNotNull('v.frozen_at'))
        .where({ 's.centre_id': centre.id, 's.status': 'booked' })
        .whereIn('s.kind', [...WATCHED_KINDS])
        .where('s.warm_up_at', '>=', toRowTime(from))
        .where('s.warm_up_at', '<', toRowTime(to))
        .select<{ verdict: SessionVerdict | null }[]>('v.verdict');
      return { sessions: rows.length, ready: rows.filter((row) => row.verdict === 'ready').length, unknown: rows.filter((row) => row.verdict === null).length };
    },
  };
}
export type ReadinessReadModel = ReturnType<typeof readinessReadModel>;
