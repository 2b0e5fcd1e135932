import knex, { type Knex } from 'knex';
import { setTimeout as pause } from 'node:timers/promises';
import { Refusal } from './refusal.ts';

/** A request that takes longer than this asks whether the database still answers … */
const PATIENCE_MS = 1_200;
/** … and gives it this long. Together below the two seconds within which a caller hears that it is away. */
const PING_MS = 600;
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
    const config = (db.client as { config: Knex.Config }).config;
    ping = { beside: knex({ ...config, pool: { min: 0, max: 1, idleTimeoutMillis: 1_000 } }), underWay: null };
    pings.set(db, ping);
  }
  const { beside } = ping;
  ping.underWay ??= askOnce(beside).finally(() => (ping.underWay = null));
  return ping.underWay;
}

function askOnce(beside: Knex): Promise<boolean> {
  const answered = beside.raw('select 1').then(() => true, () => false);
  return Promise.race([answered, pause(PING_MS, false, { ref: false })]);
}
