import { resolve } from 'node:path';
import type { TestProject } from 'vitest/node';
import { useDatabase, type DatabaseInUse } from '../../server/boot/database-use.mjs';
import { isAlive } from '../../server/boot/processes.mjs';
import { createDatabase } from '../../server/platform/db/database.ts';

declare module 'vitest' {
  interface ProvidedContext {
    /** The tests' MariaDB; its account may make databases named `lanewright_…`. */
    databaseUrl: string;
    /** Tells the databases of this run from those of another that uses the same server. */
    runId: string;
  }
}

const BASE = resolve(process.env['DATA_DIR'] ?? '.data', 'test');
const RUN_DATABASE = /^lanewright_(\d+)_/;

/** Projects of one run share the server; vitest sets each up, and takes each down, in turn. */
let inUse: DatabaseInUse | undefined;
let projects = 0;

/** Starts the tests' own MariaDB unless it runs already, and stops it when nobody else uses it. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  projects += 1;
  inUse ??= await useDatabase(BASE, { small: true, fast: true });
  await dropRuns(inUse.url, (pid) => pid !== process.pid && !isAlive(pid));
  project.provide('databaseUrl', inUse.url);
  project.provide('runId', String(process.pid));
  return async () => {
    projects -= 1;
    if (projects > 0 || inUse === undefined) return;
    await dropRuns(inUse.url, (pid) => pid === process.pid);
    await inUse.release();
    inUse = undefined;
  };
}

async function dropRuns(url: string, unwanted: (pid: number) => boolean): Promise<void> {
  const db = createDatabase(url, { connections: 1 });
  try {
    const rows = await db<{ schema_name: string }>('information_schema.schemata').select({ name: 'schema_name' });
    for (const { name } of rows) {
      const pid = RUN_DATABASE.exec(name)?.[1];
      if (pid !== undefined && unwanted(Number(pid))) await db.raw('drop database if exists ??', [name]);
    }
  } finally {
    await db.destroy();
  }
}
