import type { Knex } from 'knex';

/**
 * Guards for migrations. DDL commits by itself in MariaDB, so a migration that
 * was cut off half way runs again from its top: every step asks first whether
 * it has been done.
 */

/** Collation of all text that people type and read: case and accents don't tell two names apart. */
export const TEXT_COLLATION = 'utf8mb4_unicode_ci';

/**
 * Collation of event ids, sources and keys, where every byte counts. `utf8mb4_bin`
 * would still take `evt-a` and `evt-a ` (trailing space) for one key.
 */
export const EXACT_COLLATION = 'utf8mb4_nopad_bin';

/**
 * Creates a table (InnoDB, utf8mb4, `utf8mb4_unicode_ci`). Knex adds indexes by
 * statements of their own after the table, so one that stands already comes from
 * an attempt that was cut off and may lack some: while empty it is made anew.
 * One with rows was complete, as rows come last, and is kept.
 */
export async function createTableOnce(knex: Knex, name: string, build: (table: Knex.CreateTableBuilder) => void): Promise<void> {
  if (await knex.schema.hasTable(name)) {
    if ((await knex(name).first(knex.raw('1 as found'))) !== undefined) return;
    await knex.schema.dropTable(name);
  }
  await knex.schema.createTable(name, (table) => {
    table.engine('InnoDB');
    table.charset('utf8mb4');
    table.collate(TEXT_COLLATION);
    build(table);
  });
}

/** Adds a column unless the table has it; `build` must add just this one. */
export async function addColumnOnce(
  knex: Knex,
  table: string,
  column: string,
  build: (table: Knex.AlterTableBuilder) => void,
): Promise<void> {
  if (await knex.schema.hasColumn(table, column)) return;
  await knex.schema.alterTable(table, build);
}

/** Drops a column if the table still has it. */
export async function dropColumnOnce(knex: Knex, table: string, column: string): Promise<void> {
  if (!(await knex.schema.hasColumn(table, column))) return;
  await knex.schema.alterTable(table, (builder) => builder.dropColumn(column));
}

/** Adds an index or unique key under this name unless there is one; `build` must use the same name. */
export async function addIndexOnce(
  knex: Knex,
  table: string,
  index: string,
  build: (table: Knex.AlterTableBuilder) => void,
): Promise<void> {
  if (await isListed(knex, 'statistics', 'index_name', table, index)) return;
  await knex.schema.alterTable(table, build);
}

/** Drops an index or unique key by name if there is one. */
export async function dropIndexOnce(knex: Knex, table: string, index: string): Promise<void> {
  if (!(await isListed(knex, 'statistics', 'index_name', table, index))) return;
  await knex.schema.alterTable(table, (builder) => builder.dropIndex([], index));
}

/** Adds a constraint (foreign key, check) under this name unless there is one; `build` must use the same name. */
export async function addConstraintOnce(
  knex: Knex,
  table: string,
  constraint: string,
  build: (table: Knex.AlterTableBuilder) => void,
): Promise<void> {
  if (await isListed(knex, 'table_constraints', 'constraint_name', table, constraint)) return;
  await knex.schema.alterTable(table, build);
}

async function isListed(knex: Knex, view: string, column: string, table: string, name: string): Promise<boolean> {
  const row: unknown = await knex(`information_schema.${view}`)
    .where({ table_schema: knex.raw('database()'), table_name: table, [column]: name })
    .first(knex.raw('1 as found'));
  return row !== undefined;
}

/** A UUIDv7 as 16 bytes: keys in order of time, half the size of text. Convert with `uuid.ts`. */
export function binaryId(table: Knex.CreateTableBuilder, column: string): Knex.ColumnBuilder {
  return table.specificType(column, 'binary(16)');
}

/** Text compared byte by byte (event ids, sources, keys, slugs, hashes). `length` in characters. */
export function exact(table: Knex.CreateTableBuilder, column: string, length: number): Knex.ColumnBuilder {
  return table.specificType(column, `varchar(${length}) character set utf8mb4 collate ${EXACT_COLLATION}`);
}

/** An instant, UTC, to the millisecond: DATETIME(3), read and written as a JavaScript Date. */
export function instant(table: Knex.CreateTableBuilder, column: string): Knex.ColumnBuilder {
  return table.specificType(column, 'datetime(3)');
}

/** A yes or no: TINYINT(1), read as a JavaScript boolean. Any wider TINYINT stays a number. */
export function flag(table: Knex.CreateTableBuilder, column: string): Knex.ColumnBuilder {
  return table.specificType(column, 'tinyint(1)');
}
