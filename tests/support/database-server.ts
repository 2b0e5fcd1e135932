import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { useDatabase, type DatabaseInUse } from '../../server/boot/database-use.mjs';

/** A MariaDB of the test's own, to stop, freeze and kill without harm to other tests. */
export type OwnDatabaseServer = DatabaseInUse & {
  /** Sends the server's process a signal (`SIGSTOP`, `SIGCONT`, `SIGKILL`); it is started again when it dies. */
  signal(name: NodeJS.Signals): void;
};

/** Starts one in a temporary folder; `release()` stops it and removes the folder. */
export async function ownDatabaseServer(): Promise<OwnDatabaseServer> {
  const base = mkdtempSync(join(tmpdir(), 'lanewright-db-'));
  chmodSync(base, 0o755);
  const database = await useDatabase(base, { small: true });
  return {
    ...database,
    signal: (name) => process.kill(database.pid(), name),
    release: async () => {
      await database.release();
      rmSync(base, { recursive: true, force: true });
    },
  };
}
