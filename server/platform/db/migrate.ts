import type { Knex } from 'knex';
import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const DIRECTORY = fileURLToPath(new URL('../../../migrations/', import.meta.url));
/** Seconds to wait for another node that migrates the same database. */
const LOCK_WAIT_S = 120;

/**
 * Migrations by file name, `.ts` included: the ledger in the database holds
 * these names, so they are never compiled to another ending. Loaded by `import`,
 * which both tsx and vitest understand.
 */
export const migrationSource: Knex.MigrationSource<string> = {
  async getMigrations() {
    const names = await readdir(DIRECTORY);
    return names.filter((name) => /^\d{12}-[a-z0-9-]+\.ts$/.test(name)).sort();
  },
  getMigrationName: (name) => name,
  getMigration: (name) => import(/* @vite-ignore */ pathToFileURL(join(DIRECTORY, name)).href) as Promise<Knex.Migration>,
};

/**
 * Runs every migration that hasn't landed, one after the other, and returns
 * their names. One node at a time: MariaDB's GET_LOCK ends with its connection,
 * so whoever holds it may also clear Knex's own mark, which a crash leaves behind.
 */
export async function migrate(db: Knex): Promise<string[]> {
  return underLock(db, async () => {
    const config = { migrationSource };
    await db.migrate.list(config);
    await db.migrate.forceFreeMigrationsLock(config);
    const [, landed] = (await db.migrate.latest(config)) as [number, string[]];
    return landed;
  });
}

/** Takes back the newest migration that landed; for development and the migration tests. */
export async function migrateDown(db: Knex): Promise<void> {
  await underLock(db, () => db.migrate.down({ migrationSource }));
}

async function underLock<T>(db: Knex, work: () => Promise<T>): Promise<T> {
  return db.transaction(async (trx) => {
    // GET_LOCK names are one space for the whole server, cut at 64 characters.
    const name = trx.raw("left(concat('migrate:', database()), 64)");
    const [rows] = (await trx.raw('select get_lock(?, ?) as got', [name, LOCK_WAIT_S])) as [{ got: number | null }[]];
    if (Number(rows[0]?.got) !== 1) throw new Error('Another process has been migrating this database for two minutes.');
    try {
      return await work();
    } finally {
      await trx.raw('do release_lock(?)', [name]);
    }
  });
}
