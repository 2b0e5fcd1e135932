import knex, { type Knex } from 'knex';
import { setTimeout as pause } from 'node:timers/promises';
import { isDatabaseAway } from '../db/errors.ts';
import { Refusal } from './refusal.ts';

/** A request that takes longer than this asks whether the database still answers … */
const PATIENCE_MS = 1_200;
/** … and gives it this long, together below the two seconds within which a caller hears that it is away … */
const PING_MS = 600;
/** … in slices: an answer that lay waiting while this process was busy is read before the next one ends … */
const SLICES = 6;
/** … and a slice that ended so late begins the count anew, as this process was busy, not the database; a busy process decides at last. */
const LATE_MS = 30;
const MOST_SLICES = 40;
const LAX_MS = 10_000;
const RETRY_S = 2;

/**
 * Runs `work`, but doesn't hang with a database that accepts connections and says nothing (frozen, or behind a dead link). What was
 * begun may still be done: a caller repeats it with its Idempotency-Key.
 */
export async function orAway<T>(db: Knex, work: () => Promise<T>): Promise<T> {
  const done = new AbortController();
  const result = work().finally(() => done.abort());
  return Promise.race([result, awayFrom(db, done.signal)]);
}

/** Rejects when the database stops answering; never resolves. */
function awayFrom(db: Knex, done: AbortSignal): Promise<never> {
  return new Promise((_, reject) => {
    const look = async (): Promise<void> => {
      while (!done.aborted) {
        await pause(PATIENCE_MS, undefined, { signal: done, ref: false });
        if (!(await databaseAnswers(db)) && !done.aborted) return reject(new Refusal(503, 'database.away', { retryAfterS: RETRY_S }));
      }
    };
    // Aborted while it waited: the work is done.
    look().catch(() => undefined);
  });
}

/** One connection beside the pool: a pool that is busy isn't a database that is away. */
const pings = new WeakMap<Knex, { beside: Knex; underWay: Promise<boolean> | null }>();

/** Does the database answer within 600 ms? Those who ask at the same time share one question. */
export async function databaseAnswers(db: Knex): Promise<boolean> {
  let ping = pings.get(db);
  if (ping === undefined) {
    const { config } = db.client as { config: Omit<Knex.Config, 'connection'> & { connection: { password?: string } } };
    // Its own limits lie beyond ours: they run while this process is busy with other things. Knex hides the password from a spread.
    const connection = { ...config.connection, password: config.connection.password, connectTimeout: LAX_MS };
    ping = { beside: knex({ ...config, connection, acquireConnectionTimeout: LAX_MS, pool: { min: 0, max: 1, idleTimeoutMillis: 1_000 } }), underWay: null };
    pings.set(db, ping);
  }
  const { beside } = ping;
  ping.underWay ??= askOnce(beside).finally(() => (ping.underWay = null));
  return ping.underWay;
}

async function askOnce(beside: Knex): Promise<boolean> {
  let answer: boolean | null = null;
  beside.raw('select 1').then(() => (answer = true), (error: unknown) => (answer = !isDatabaseAway(error)));
  for (let [slice, punctual] = [0, 0]; punctual < SLICES && slice < MOST_SLICES && answer === null; slice += 1) {
    const from = performance.now();
    await pause(PING_MS / SLICES, undefined, { ref: false });
    punctual = performance.now() - from < PING_MS / SLICES + LATE_MS ? punctual + 1 : 0;
  }
  return answer === true;
}
