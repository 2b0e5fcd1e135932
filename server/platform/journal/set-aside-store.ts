import type { Knex } from 'knex';
import type { Fact } from '#shared/domain/journal/fact.ts';
import { streamOf } from './journal-rows.ts';
import { factOf, type FactRow } from './journal-store.ts';
import type { MendedEvent } from './ledger.ts';
import type { JournalRow } from './tables.ts';

export type SetAsideRow = Pick<JournalRow, 'source' | 'id' | 'type' | 'time_at' | 'received_at' | 'reason' | 'by_name' | 'sent'>;

/** Events that were set aside and still are, newest first. */
export async function readSetAside(db: Knex, centre: Buffer, limit: number): Promise<SetAsideRow[]> {
  return (await db('journal').select('source', 'id', 'type', 'time_at', 'received_at', 'reason', 'by_name', 'sent')
    .where({ centre_id: centre, status: 'set-aside' }).orderBy('received_at', 'desc').orderBy('seq', 'desc').orderBy('n', 'desc').limit(limit));
}

/** One of them; null when there is none or it has been applied. */
export async function findSetAside(db: Knex, centre: Buffer, source: string, id: string): Promise<SetAsideRow | null> {
  const row = (await db('journal').where({ centre_id: centre, source, id, status: 'set-aside' }).first()) as SetAsideRow | undefined;
  return row ?? null;
}

/**
 * Applies one event that was set aside: its row moves to the end of the journal, where other nodes look for what is new, and its
 * arrival is now. Null when it isn't set aside any more.
 */
export async function mend(trx: Knex.Transaction, centre: Buffer, event: MendedEvent, now: number, place: { seq: number; n: number }): Promise<Fact | null> {
  const where = { centre_id: centre, source: event.source, id: event.id };
  const row = (await trx('journal').where({ ...where, status: 'set-aside' }).forUpdate().first()) as FactRow | undefined;
  if (!row) return null;
  const change = {
    ...place, status: 'applied' as const, reason: null, applied_at: new Date(now), type: event.type, stream: streamOf(event.type, event.data),
    time_at: new Date(event.time), data: JSON.stringify(event.data),
  };
  await trx('journal').where(where).update(change);
  return factOf({ ...row, ...change });
}
