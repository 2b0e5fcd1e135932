import type { Knex } from 'knex';
import { readdirSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createDatabase } from '#server/platform/db/database.ts';
import { migrate, migrateDown, migrationSource } from '#server/platform/db/migrate.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';
import { schemaText } from './schema-text.ts';

const files = readdirSync(new URL('../../migrations/', import.meta.url)).filter((name) => name.endsWith('.ts')).sort();

/** What all migrations in order make; each test compares its own way of getting there with it. */
let straight: string;
beforeAll(async () => {
  const database = await ownDatabase();
  straight = await schemaText(database.db);
  await database.close();
});

async function empty(): Promise<TestDatabase> {
  const database = await ownDatabase({ migrated: false });
  opened.push(database);
  return database;
}
const opened: TestDatabase[] = [];
afterAll(() => Promise.all(opened.map((database) => database.close())));

test('the schema is the reviewed one', async () => {
  await expect(straight).toMatchFileSnapshot('./schema.sql');
});

test('all files run once, in order of name', async () => {
  const { db } = await empty();
  expect(files.length).toBeGreaterThan(0);
  expect(await migrate(db)).toEqual(files);
  expect(await migrate(db)).toEqual([]);
});

test('two nodes that start at once run each file once', async () => {
  const { db, url } = await empty();
  const other = createDatabase(url);
  const landed = await Promise.all([migrate(db), migrate(other)]);
  await other.destroy();
  expect(landed.map((names) => names.length).sort((a, b) => a - b)).toEqual([0, files.length]);
  expect(await schemaText(db)).toBe(straight);
});

test('what was cut off before the ledger knew of it runs again and heals', async () => {
  const { db } = await empty();
  for (const name of files) {
    await db.migrate.up({ migrationSource });
    await db('knex_migrations').where({ name }).delete();
    await db('knex_migrations_lock').update({ is_locked: 1 });
    await db.migrate.forceFreeMigrationsLock({ migrationSource });
    await db.migrate.up({ migrationSource });
  }
  expect(await schemaText(db)).toBe(straight);
});

test('a mark left by a process that was killed while migrating does not stop the next', async () => {
  const { db } = await empty();
  await db.migrate.up({ migrationSource });
  await db('knex_migrations_lock').update({ is_locked: 1 });
  expect(await migrate(db)).toEqual(files.slice(1));
});

test('down to nothing and up again gives the same schema', async () => {
  const { db } = await empty();
  await migrate(db);
  for (let left = files.length; left > 0; left -= 1) await migrateDown(db);
  expect(await schemaText(db)).toBe('');
  await migrate(db);
  expect(await schemaText(db)).toBe(straight);
});

describe.each(files)('%s', (name) => {
  let migration: Knex.Migration & { config?: { transaction?: boolean } };
  beforeAll(async () => {
    migration = await migrationSource.getMigration(name);
  });

  test('has a time and a verb in its name, a way up and down, and no transaction that DDL would end', () => {
    expect(name).toMatch(/^\d{12}-[a-z]+(-[a-z0-9]+)+\.ts$/);
    expect(migration.up).toBeTypeOf('function');
    expect(migration.down).toBeTypeOf('function');
    expect(migration.config).toEqual({ transaction: false });
  });
});
