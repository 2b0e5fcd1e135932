import type { Knex } from 'knex';
import { inject } from 'vitest';
import { createDatabase, type DatabaseOptions } from '#server/platform/db/database.ts';
import { migrate } from '#server/platform/db/migrate.ts';

/** A database for tests, built by running every migration. */
export type TestDatabase = {
  db: Knex;
  url: string;
  /** Ends the pool; an own database is dropped as well. Call it in `afterAll`. */
  close(): Promise<void>;
};

/**
 * The database of this worker, shared by the test files that it runs one after
 * the other: make a centre of your own in each test, and count only its rows.
 */
export async function freshDatabase(options: DatabaseOptions = {}): Promise<TestDatabase> {
  const url = await createNamed(`lanewright_${inject('runId')}_worker${process.env['VITEST_POOL_ID'] ?? '0'}`);
  const db = createDatabase(url, options);
  await migrate(db);
  return { db, url, close: () => db.destroy() };
}

let made = 0;

/** A database of the test's own, empty but for what the migrations (unless `migrated` is false) put into it. */
export async function ownDatabase({ migrated = true, ...options }: DatabaseOptions & { migrated?: boolean } = {}): Promise<TestDatabase> {
  made += 1;
  const name = `lanewright_${inject('runId')}_own${process.pid}_${made}`;
  const url = await createNamed(name);
  const db = createDatabase(url, options);
  if (migrated) await migrate(db);
  const close = async () => {
    await db.raw('drop database if exists ??', [name]);
    await db.destroy();
  };
  return { db, url, close };
}

async function createNamed(name: string): Promise<string> {
  const url = new URL(inject('databaseUrl'));
  const db = createDatabase(url.href, { connections: 1 });
  try {
    await db.raw('create database if not exists ?? character set utf8mb4 collate utf8mb4_unicode_ci', [name]);
  } finally {
    await db.destroy();
  }
  url.pathname = `/${name}`;
  return url.href;
}
