// `node server/boot/run.mjs <file> …`: a command of ours, with packages and database in place. Only the command itself
// writes to standard output.
import { useDatabase } from './database-use.mjs';
import { runningDatabase } from './database-server.mjs';
import { checkNode, ensureModules, ensurePrograms } from './packages.mjs';
import { checkDatabasePort, makeDataDir, readSettings } from './settings.mjs';
import { endSteps, runEntry, runToEnd, sayAside, StopError } from './steps.mjs';

const tell = sayAside;

async function main() {
  const [file, ...args] = process.argv.slice(2);
  if (file === undefined) throw new StopError('Which file shall run? node server/boot/run.mjs <file> …');
  const settings = readSettings(process.env);
  checkNode();
  makeDataDir(settings);
  await ensurePrograms({ database: settings.databaseUrl === null, tell });
  await ensureModules({ tell });
  const database = settings.databaseUrl === null ? await ownDatabase(settings) : undefined;
  try {
    const env = { ...process.env, DATA_DIR: settings.dataDir, DATABASE_URL: database?.url ?? settings.databaseUrl };
    return await runToEnd(process.execPath, ['--import', 'tsx', file, ...args], { env });
  } finally {
    await database?.release();
  }
}

/** The one that runs from this data folder, on whatever port, or one for the time of the command. */
async function ownDatabase(settings) {
  const port = runningDatabase(settings.dataDir)?.port ?? settings.dbPort;
  await checkDatabasePort({ ...settings, dbPort: port });
  return useDatabase(settings.dataDir, { port, say: tell });
}

// The command gets the signal as well and ends; then the database is released.
process.on('SIGINT', () => {});
process.on('SIGTERM', endSteps);
process.on('SIGHUP', endSteps);
await runEntry(main);
