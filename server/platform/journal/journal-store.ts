import type { Knex } from 'knex';
import type { Fact, Person } from '#shared/domain/journal/fact.ts';
import { compareFacts } from '#shared/domain/journal/order.ts';
import { toRowTime } from '../db/row-times.ts';
import { groupedBy } from './grouped.ts';
import type { JournalRow } from './tables.ts';

const ROWS_A_STATEMENT = 500;
/** Reading many days at once may take longer than a request may. */
const LONG_QUERY_MS = 60_000;

const COLUMNS = [
  'centre_id', 'seq', 'n', 'source', 'id', 'type', 'stream', 'time_at', 'time_sent', 'received_at', 'status', 'reason', 'applied_at', 'by_kind', 'by_id',
  'by_name', 'data', 'sent', 'content_hash',
] as const satisfies readonly (keyof JournalRow)[];

const INTO = `insert into journal (${COLUMNS.join(',')}) values `;
const PLACE = `(${COLUMNS.map(() => '?').join(',')})`;

/** Appends rows in as few statements as fit; fails with errno 1062 when one of them is there already. */
export async function append(trx: Knex.Transaction, rows: readonly JournalRow[]): Promise<void> {
  for (let i = 0; i < rows.length; i += ROWS_A_STATEMENT) {
    const some = rows.slice(i, i + ROWS_A_STATEMENT);
    const values = some.flatMap((row) => COLUMNS.map((column) => row[column]));
    await trx.raw(INTO + some.map(() => PLACE).join(','), values as Knex.RawBinding[]);
  }
}

export const eventKey = (source: string, id: string): string => `${source}\u0000${id}`;

/** Which of these the journal has, by `eventKey`, with the hash of what came first. */
export async function known(trx: Knex.Transaction, centre: Buffer, events: readonly { source: string; id: string }[]): Promise<Map<string, Buffer>> {
  const bySource = groupedBy(events, (event) => event.source);
  const found = new Map<string, Buffer>();
  for (const [source, some] of bySource) {
    for (let i = 0; i < some.length; i += ROWS_A_STATEMENT) {
      const ids = some.slice(i, i + ROWS_A_STATEMENT).map((event) => event.id);
      const [rows] = (await trx.raw(
        `select id, content_hash from journal force index (journal_event) where centre_id = ? and source = ? and id in (${ids.map(() => '?').join(',')})`,
        [centre, source, ...ids],
      )) as [Pick<JournalRow, 'id' | 'content_hash'>[]];
      for (const row of rows) found.set(eventKey(source, row.id), row.content_hash);
    }
  }
  return found;
}

export type FactRow = Pick<JournalRow, 'seq' | 'n' | 'source' | 'id' | 'type' | 'time_at' | 'received_at' | 'applied_at' | 'by_kind' | 'by_id' | 'by_name' | 'data'>;
export const FACT_COLUMNS = ['seq', 'n', 'source', 'id', 'type', 'time_at', 'received_at', 'applied_at', 'by_kind', 'by_id', 'by_name', 'data'] as const;

/** Applied facts in their order: of a span of time [from, to), or those recorded after a sequence number. */
export async function readFacts(db: Knex, centre: Buffer, span: { from: number; to: number } | { after: number }): Promise<Fact[]> {
  const query = db('journal').select(...FACT_COLUMNS).where({ centre_id: centre, status: 'applied' }).options({ timeout: LONG_QUERY_MS });
  if ('after' in span) void query.where('seq', '>', span.after);
  else {
    void query.where('time_at', '>=', toRowTime(Math.max(0, span.from)));
    if (Number.isFinite(span.to)) void query.where('time_at', '<', toRowTime(span.to));
  }
  const rows = (await query) as FactRow[];
  return rows.map(factOf).sort(compareFacts);
}

export function factOf(row: FactRow): Fact {
  const by: Person | null = row.by_kind && { kind: row.by_kind, id: row.by_id ?? '', name: row.by_name ?? '' };
  return {
    seq: row.seq, n: row.n, source: row.source, id: row.id, type: row.type, time: row.time_at.getTime(),
    receivedAt: (row.applied_at ?? row.received_at).getTime(), by, data: JSON.parse(row.data ?? 'null') as unknown,
  } as Fact;
}
