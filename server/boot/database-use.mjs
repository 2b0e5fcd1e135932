// Several processes may use one private MariaDB (npm start, a command beside it, test runs): the last one out stops it.
import fs from 'node:fs';
import path from 'node:path';
import { runningDatabase, startDatabase, stopDatabase } from './database-server.mjs';
import { isHeldBy, signature, withLock } from './lock.mjs';
import { pause } from './processes.mjs';

const WATCH_MS = 250;
/** Before the next try after one that failed. */
const AFTER_FAILURE_MS = 2_000;

const usersOf = (base) => path.join(base, 'db-users');
const lockOf = (base) => path.join(base, 'db.lock');

/** Signatures of living users; those of the dead are cleared. */
function livingUsers(base) {
  const folder = usersOf(base);
  fs.mkdirSync(folder, { recursive: true });
  return fs.readdirSync(folder).filter((name) => {
    const file = path.join(folder, name);
    if (isHeldBy(fs.readFileSync(file, 'utf8'))) return true;
    fs.rmSync(file, { force: true });
    return false;
  });
}

/**
 * Makes sure that the server of `base` runs, counts this process among its
 * users, and starts it again whenever it dies. `port`: as said, or the start
 * fails; 0: any. Returns where it is, and `release()`, after which the server
 * stops if nobody else uses it.
 */
export async function useDatabase(base, { port = 0, small = false, fast = false, say = () => {} } = {}) {
  const folder = path.resolve(base);
  const mine = path.join(usersOf(folder), String(process.pid));
  const options = { port, small, fast, say };
  const found = await withLock(lockOf(folder), async () => {
    await leaveOtherPort(folder, port);
    const database = await startDatabase(folder, options);
    livingUsers(folder);
    fs.writeFileSync(mine, signature());
    return database;
  });
  const stopWatching = watch(folder, { ...options, port: found.port });
  return {
    url: found.url,
    port: found.port,
    pid: () => runningDatabase(folder)?.pid ?? 0,
    release: async () => {
      await stopWatching();
      await withLock(lockOf(folder), async () => {
        fs.rmSync(mine, { force: true });
        if (livingUsers(folder).length === 0) await stopDatabase(folder);
      });
    },
  };
}

/** A server left running on another port (its starter was killed) makes way; one in use doesn't. */
async function leaveOtherPort(base, port) {
  const running = runningDatabase(base);
  if (!running || port === 0 || running.port === port) return;
  if (livingUsers(base).length > 0) throw new Error(`DB_PORT=${port}: the database of ${base} is in use on port ${running.port}`);
  await stopDatabase(base);
}

/** Starts the server again when its process is gone; returns what ends the watch. */
function watch(base, options) {
  let busy = Promise.resolve();
  let checking = false;
  const timer = setInterval(() => {
    if (checking || runningDatabase(base)) return;
    checking = true;
    busy = again(base, options).finally(() => {
      checking = false;
    });
  }, WATCH_MS);
  timer.unref();
  return async () => {
    clearInterval(timer);
    await busy;
  };
}

async function again(base, options) {
  try {
    await withLock(lockOf(base), async () => {
      if (runningDatabase(base)) return;
      options.say('The database stopped; starting it again');
      await startDatabase(base, options);
    });
  } catch (error) {
    options.say(error.message);
    await pause(AFTER_FAILURE_MS);
  }
}
