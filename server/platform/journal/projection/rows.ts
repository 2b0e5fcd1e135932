import type { Knex } from 'knex';
import type { House } from '#shared/domain/house/state.ts';

/** What a column takes. JSON goes as text. */
export type Value = string | number | boolean | Date | Buffer | null;
/** One row without `centre_id` and `version`, column by column. */
export type Row = Record<string, Value>;

/** One table that the house is written to, for what asks the past: histories, figures, `replay:check`. */
export interface Projection {
  table: string;
  /** Columns that name a row within a centre. */
  key: readonly string[];
  /** All other columns but `version`. */
  columns: readonly string[];
  /** Rows of what `house` holds and `other` doesn't share with it; every row when `other` is null. */
  rows(house: House, other: House | null): Row[];
}

/** What `mine` holds that `others` doesn't, by identity: folds share what they don't touch. Lists mostly grow at their end. */
export function unshared<T extends object>(mine: readonly T[], others: readonly T[]): readonly T[] {
  let same = 0;
  while (same < mine.length && mine[same] === others[same]) same += 1;
  if (same === mine.length) return [];
  const rest = new Set(others.slice(same));
  return mine.slice(same).filter((item) => !rest.has(item));
}

export const json = (value: unknown): string | null => (value === null || value === undefined ? null : JSON.stringify(value));
export const time = (at: number | null): Date | null => (at === null ? null : new Date(at));

export const keyOf = (projection: Projection, row: Row): string => projection.key.map((column) => textOf(row[column])).join('\u0000');

const textOf = (value: Value | undefined): string =>
  value instanceof Date ? String(value.getTime()) : Buffer.isBuffer(value) ? value.toString('hex') : String(value);

const ROWS_A_STATEMENT = 400;

/** Writes rows of a centre, whether they are there or not. */
export async function upsert(trx: Knex.Transaction, projection: Projection, centre: Buffer, version: number, rows: readonly Row[]): Promise<void> {
  const columns = [...projection.key, ...projection.columns];
  const place = `(?,?${',?'.repeat(columns.length)})`;
  const update = ['version', ...projection.columns].map((c) => `\`${c}\`=values(\`${c}\`)`).join(',');
  for (let i = 0; i < rows.length; i += ROWS_A_STATEMENT) {
    const some = rows.slice(i, i + ROWS_A_STATEMENT);
    const values = some.flatMap((row) => [centre, version, ...columns.map((column) => row[column] ?? null)]);
    const names = columns.map((c) => `\`${c}\``).join(',');
    await trx.raw(
      `insert into \`${projection.table}\` (centre_id,version,${names}) values ${some.map(() => place).join(',')} on duplicate key update ${update}`,
      values,
    );
  }
}

/** Takes away rows that a late fact made untrue. */
export async function remove(trx: Knex.Transaction, projection: Projection, centre: Buffer, rows: readonly Row[]): Promise<void> {
  for (let i = 0; i < rows.length; i += ROWS_A_STATEMENT) {
    const some = rows.slice(i, i + ROWS_A_STATEMENT);
    const same = `(${projection.key.map((c) => `\`${c}\`=?`).join(' and ')})`;
    const values = some.flatMap((row) => projection.key.map((column) => row[column] ?? null));
    await trx.raw(`delete from \`${projection.table}\` where centre_id=? and (${some.map(() => same).join(' or ')})`, [centre, ...values]);
  }
}
