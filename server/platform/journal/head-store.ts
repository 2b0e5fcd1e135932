import type { Knex } from 'knex';
import { HOUSE_FOLD_VERSION } from '#shared/domain/house/fold.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Topic } from '#shared/realtime/events.ts';
import { fromBinary, newId, toBinary } from '../db/uuid.ts';
import { notFound } from '../http/refusal.ts';
import type { CentreRef } from '../http/route.ts';
import type { CentreHeadRow } from './tables.ts';

/** Where a centre's journal stands. */
export interface Head {
  seq: number;
  epoch: string;
  foldVersion: number;
  checkpointAt: number;
}

/** Checkpoints are kept this long: gateways may send what is 7 days old, and a cut lies up to a day further back. */
const CHECKPOINTS_KEPT_MS = 9 * 24 * 3_600_000;

const headOf = (row: CentreHeadRow): Head => ({
  seq: row.seq, epoch: fromBinary(row.epoch), foldVersion: row.fold_version, checkpointAt: row.checkpoint_at,
});

/** Opens a centre's journal; part of making a centre. */
export async function openJournal(trx: Knex, centre: Buffer): Promise<void> {
  await trx('centre_head').insert({ centre_id: centre, seq: 0, epoch: toBinary(newId()), fold_version: HOUSE_FOLD_VERSION, checkpoint_at: 0 });
}

/** Locks the row that every unit of work of a centre locks first. */
export async function lockHead(trx: Knex.Transaction, centre: CentreRef): Promise<Head> {
  const [rows] = (await trx.raw('select * from centre_head where centre_id = ? for update', [centre.id])) as [CentreHeadRow[]];
  if (!rows[0]) throw notFound('centre.unknown');
  return headOf(rows[0]);
}

export async function readHead(db: Knex, centre: CentreRef): Promise<Head> {
  const [rows] = (await db.raw('select * from centre_head where centre_id = ?', [centre.id])) as [CentreHeadRow[]];
  if (!rows[0]) throw notFound('centre.unknown');
  return headOf(rows[0]);
}

export async function saveHead(trx: Knex.Transaction, centre: CentreRef, head: Head): Promise<void> {
  await trx.raw('update centre_head set seq = ?, epoch = ?, fold_version = ?, checkpoint_at = ? where centre_id = ?', [
    head.seq, toBinary(head.epoch), head.foldVersion, head.checkpointAt, centre.id,
  ]);
}

/** The state at a business-day cut, and the cut. */
export interface Checkpoint {
  at: number;
  state: House;
}

/** Checkpoints of the present folds in [from, to), oldest first; `newest`: only the last of them. */
export async function readCheckpoints(db: Knex, centre: Buffer, from: number, to: number, newest = false): Promise<Checkpoint[]> {
  const query = db('stream_checkpoint').select('at', 'state').where({ centre_id: centre, fold_version: HOUSE_FOLD_VERSION });
  void query.where('at', '>=', from).where('at', '<', Number.isFinite(to) ? to : Number.MAX_SAFE_INTEGER);
  const rows = (await (newest ? query.orderBy('at', 'desc').limit(1) : query.orderBy('at')));
  return rows.map((row) => ({ at: row.at, state: JSON.parse(row.state) as House }));
}

export async function saveCheckpoints(trx: Knex.Transaction, centre: Buffer, checkpoints: readonly Checkpoint[], now: number): Promise<void> {
  const newest = checkpoints.at(-1);
  if (!newest) return;
  const rows = checkpoints.map(({ at, state }) => ({
    centre_id: centre, at, fold_version: HOUSE_FOLD_VERSION, state: JSON.stringify(state), written_at: new Date(now),
  }));
  await trx('stream_checkpoint').insert(rows).onConflict(['centre_id', 'at']).merge();
  await trx('stream_checkpoint').where({ centre_id: centre }).where('at', '<', newest.at - CHECKPOINTS_KEPT_MS).delete();
}

/** What the relay tells the screens of. */
export interface Touched {
  lanes: number[];
  topics: Topic[];
}

export async function saveOutbox(trx: Knex.Transaction, centre: Buffer, seq: number, touched: Touched, now: number): Promise<void> {
  await trx.raw('insert into outbox (centre_id, seq, lanes, topics, written_at) values (?, ?, ?, ?, ?)', [
    centre, seq, JSON.stringify(touched.lanes), JSON.stringify(touched.topics), new Date(now),
  ]);
}

/** Outbox rows of a centre after a sequence number, in order. */
export async function readOutbox(db: Knex, centre: Buffer, after: number): Promise<(Touched & { seq: number })[]> {
  const rows = (await db('outbox').where({ centre_id: centre }).where('seq', '>', after).orderBy('seq').limit(2000));
  return rows.map((row) => ({ seq: row.seq, lanes: row.lanes, topics: row.topics as Topic[] }));
}

/** Removes outbox rows that were written before an instant. */
export async function sweepOutbox(db: Knex, before: number): Promise<void> {
  await db('outbox').where('written_at', '<', new Date(before)).delete();
}
