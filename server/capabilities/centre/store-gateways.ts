import type { Knex } from 'knex';
import { isDuplicate } from '#server/platform/db/errors.ts';
import { fromRowTime } from '#server/platform/db/row-times.ts';
import { fromBinary, newId, toBinary } from '#server/platform/db/uuid.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { conflict } from '#server/platform/http/refusal.ts';
import type { GatewayNews, Sequences } from './gateway-news.ts';
import { type CentreColumns, refOf } from './store.ts';

interface GatewayRow {
  centre_id: Buffer;
  id: Buffer;
  name: string;
  created_at: Date;
  heard_at: Date | null;
  started_at: Date | null;
  queued: number | null;
  uptime_s: number | null;
  clock_error_ms: number | null;
  changed_repeats: number;
  changed_repeat_at: Date | null;
  sequences: Sequences;
}

interface KeyRow {
  id: Buffer;
  gateway_id: Buffer;
  created_at: Date;
  revoked_at: Date | null;
}

interface HolderRow extends CentreColumns {
  gateway: Buffer;
  gateway_name: string;
  revoked_at: Date | null;
}

/** A gateway as it is stored. */
export interface StoredGateway {
  id: string;
  name: string;
  createdAt: number;
  news: GatewayNews;
}

/** Whose key it is. */
export interface KeyHolder {
  gateway: { id: string; name: string };
  centre: CentreRef;
  revoked: boolean;
}

const gatewayOf = (row: GatewayRow): StoredGateway => ({
  id: fromBinary(row.id),
  name: row.name,
  createdAt: row.created_at.getTime(),
  news: {
    heardAt: fromRowTime(row.heard_at), startedAt: fromRowTime(row.started_at), queued: row.queued, uptimeS: row.uptime_s, clockErrorMs: row.clock_error_ms,
    changedRepeats: row.changed_repeats, changedRepeatAt: fromRowTime(row.changed_repeat_at), sequences: row.sequences,
  },
});

export function gatewayStore(db: Knex) {
  return {
    async list(centre: Buffer): Promise<StoredGateway[]> {
      const rows = (await db('gateway').where({ centre_id: centre }).orderBy('id')) as GatewayRow[];
      return rows.map(gatewayOf);
    },
    async keys(centre: Buffer): Promise<{ id: string; gateway: string; createdAt: number }[]> {
      const rows = (await db('gateway_key').where({ centre_id: centre }).whereNull('revoked_at').orderBy('id')) as KeyRow[];
      return rows.map((row) => ({ id: fromBinary(row.id), gateway: fromBinary(row.gateway_id), createdAt: row.created_at.getTime() }));
    },
    /** Adds a gateway with its first key. */
    async add(trx: Knex, centre: Buffer, name: string, keyHash: Buffer, now: number): Promise<string> {
      const id = newId();
      const row = { centre_id: centre, id: toBinary(id), name, created_at: new Date(now), changed_repeats: 0, sequences: '{}' };
      try {
        await trx('gateway').insert(row);
      } catch (error) {
        if (isDuplicate(error, 'gateway_name')) throw conflict('gateway.name-taken', { name });
        throw error;
      }
      await this.addKey(trx, centre, id, keyHash, now);
      return id;
    },
    /** Live keys of a gateway, locked; null: no such gateway. */
    async lockKeys(trx: Knex, centre: Buffer, gateway: string): Promise<number | null> {
      const row = await trx('gateway').where({ centre_id: centre, id: toBinary(gateway) }).forUpdate().first<Pick<GatewayRow, 'id'> | undefined>('id');
      if (!row) return null;
      const keys = await trx('gateway_key').where({ centre_id: centre, gateway_id: row.id }).whereNull('revoked_at').select<Pick<KeyRow, 'id'>[]>('id');
      return keys.length;
    },
    async addKey(trx: Knex, centre: Buffer, gateway: string, hash: Buffer, now: number): Promise<void> {
      await trx('gateway_key').insert({ hash, id: toBinary(newId()), centre_id: centre, gateway_id: toBinary(gateway), created_at: new Date(now) });
    },
    /** False when there is no such live key. */
    async revoke(trx: Knex, centre: Buffer, gateway: string, key: string, now: number): Promise<boolean> {
      const where = { centre_id: centre, gateway_id: toBinary(gateway), id: toBinary(key) };
      return (await trx('gateway_key').where(where).whereNull('revoked_at').update({ revoked_at: new Date(now) })) > 0;
    },
    async byKey(hash: Buffer): Promise<KeyHolder | null> {
      const row = await db('gateway_key as k')
        .join('gateway as g', (on) => on.on('g.centre_id', 'k.centre_id').on('g.id', 'k.gateway_id'))
        .join('centre as c', 'c.id', 'k.centre_id')
        .where('k.hash', hash)
        .first<HolderRow | undefined>('g.id as gateway', 'g.name as gateway_name', 'k.revoked_at', 'c.id', 'c.slug', 'c.name', 'c.zone', 'c.cut', 'c.lanes', 'c.rules');
      if (!row) return null;
      return { gateway: { id: fromBinary(row.gateway), name: row.gateway_name }, centre: refOf(row), revoked: row.revoked_at !== null };
    },
    async saveNews(centre: Buffer, gateway: string, news: GatewayNews): Promise<void> {
      const time = (at: number | null) => (at === null ? null : new Date(at));
      await db('gateway').where({ centre_id: centre, id: toBinary(gateway) }).update({
        heard_at: time(news.heardAt), started_at: time(news.startedAt), queued: news.queued, uptime_s: news.uptimeS, clock_error_ms: news.clockErrorMs,
        changed_repeats: news.changedRepeats, changed_repeat_at: time(news.changedRepeatAt), sequences: JSON.stringify(news.sequences),
      });
    },
  };
}

export type GatewayStore = ReturnType<typeof gatewayStore>;
