import type { Knex } from 'knex';
import type { CentreRef } from '../http/route.ts';
import { lastOf, type Days } from './days.ts';
import { readCheckpoints } from './head-store.ts';
import { changesBetween, PROJECTIONS } from './projection/changes.ts';
import { keyOf, type Projection, type Row, type Value } from './projection/rows.ts';
import { replay } from './rebuild.ts';

export interface ReplayCheck {
  events: number;
  rows: number;
  /** Each names table, row and field. */
  differences: string[];
}

type Rows = Map<string, Row>;

/** Folds a centre's journal from its beginning and compares every stored row with what it should say. One snapshot for both. */
export async function checkReplay(db: Knex, centre: CentreRef): Promise<ReplayCheck> {
  return db.transaction(async (trx) => {
    let events = 0;
    const wanted = new Map<string, Rows>(PROJECTIONS.map(({ table }) => [table, new Map()]));
    const bases = new Map<number, string>();
    const days = await replay(trx, centre, (before, after, facts) => {
      events += facts.length;
      collect(wanted, before, after);
      bases.set(after[0].from, JSON.stringify(after[0].timeline.base));
    });
    let rows = 0;
    const differences: string[] = [];
    for (const projection of PROJECTIONS) {
      const stored = await storedRows(trx, projection, centre);
      const should = wanted.get(projection.table) ?? new Map<string, Row>();
      rows += new Set([...stored.keys(), ...should.keys()]).size;
      differences.push(...compared(projection, should, stored));
    }
    const checkpoints = await readCheckpoints(trx, centre.id, 0, lastOf(days).from + 1);
    rows += checkpoints.length;
    for (const { at, state } of checkpoints) {
      const should = bases.get(at);
      if (should !== undefined && canonical(JSON.parse(should)) !== canonical(state)) differences.push(`stream_checkpoint ${at}: state`);
    }
    return { events, rows, differences };
  }, { isolationLevel: 'repeatable read' });
}

function collect(wanted: Map<string, Rows>, before: Days, after: Days): void {
  for (const { projection, written, gone } of changesBetween(before, after)) {
    const rows = wanted.get(projection.table);
    for (const row of gone) rows?.delete(keyOf(projection, row));
    for (const row of written) rows?.set(keyOf(projection, row), row);
  }
}

async function storedRows(trx: Knex.Transaction, projection: Projection, centre: CentreRef): Promise<Rows> {
  const columns = [...projection.key, ...projection.columns];
  const found = (await trx(projection.table).where({ centre_id: centre.id }).select(columns).options({ timeout: 60_000 })) as Row[];
  return new Map(found.map((row) => [keyOf(projection, row), row]));
}

function compared(projection: Projection, should: Rows, stored: Rows): string[] {
  const name = (row: Row) => `${projection.table} ${projection.key.map((column) => `${column}=${said(row[column])}`).join(' ')}`;
  const missing = [...should].filter(([key]) => !stored.has(key)).map(([, row]) => `${name(row)}: not stored`);
  const strange = [...stored].filter(([key]) => !should.has(key)).map(([, row]) => `${name(row)}: stored, but the journal gives no such row`);
  const other = [...should].flatMap(([key, row]) => {
    const is = stored.get(key);
    return is ? projection.columns.filter((column) => canonical(plain(row[column])) !== canonical(plain(is[column])))
      .map((column) => `${name(row)}: ${column} is ${said(is[column])}, the journal gives ${said(row[column])}`) : [];
  });
  return [...missing, ...strange, ...other];
}

/** What a column holds, whether as it is to be written or as it was read: JSON that was written as text comes back as a value. */
function plain(value: unknown): unknown {
  if (value instanceof Date) return value.getTime();
  if (Buffer.isBuffer(value)) return value.toString('hex');
  if (typeof value !== 'string' || !/^[[{]/.test(value)) return value ?? null;
  try {
    return JSON.parse(value) as unknown;
  } catch {
    return value;
  }
}

function canonical(value: unknown): string {
  return JSON.stringify(value, (_key, inner: unknown) =>
    typeof inner === 'object' && inner !== null && !Array.isArray(inner) ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1))) : inner);
}

function said(value: Value | undefined): string {
  if (value instanceof Date) return value.toISOString();
  const text = Buffer.isBuffer(value) ? value.toString('hex') : typeof value === 'string' ? value : JSON.stringify(value ?? null);
  return text.length > 120 ? `${text.slice(0, 117)}…` : text;
}
