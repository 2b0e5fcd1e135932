import type { Knex } from 'knex';
import { setTimeout as pause } from 'node:timers/promises';
import { beforeCommit } from './before-commit.ts';
import { isDuplicate, isLostRace } from './errors.ts';

/** How a unit of work is repeated. */
export type UnitOfWorkOptions = {
  /** Tries at most, the first included. */
  attempts?: number;
  /**
   * Keys (index names) on which a duplicate means "somebody else wrote the same
   * meanwhile; look again": the whole work is repeated. Any other duplicate is
   * the caller's to answer.
   */
  repeatOnDuplicate?: readonly string[];
};

const ATTEMPTS = 5;
/** Waits before the 2nd, 3rd … try double from here, with jitter so that two losers don't meet again. */
const FIRST_PAUSE_MS = 5;

/**
 * Runs `work` in one transaction and commits. A lost race (deadlock, lock wait,
 * changed since read) rolls back and repeats the whole of `work`, which must
 * therefore read anything it decides on through `trx` and do nothing outside.
 * Read what you are about to write with `FOR UPDATE` or write with
 * `WHERE version = ?`: a plain read followed by a write loses updates.
 */
export async function unitOfWork<T>(
  db: Knex,
  work: (trx: Knex.Transaction) => Promise<T>,
  options: UnitOfWorkOptions = {},
): Promise<T> {
  const attempts = options.attempts ?? ATTEMPTS;
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await db.transaction(async (trx) => {
        const result = await work(trx);
        await beforeCommit(trx);
        return result;
      });
    } catch (error) {
      if (attempt >= attempts || !mayRepeat(error, options.repeatOnDuplicate ?? [])) throw error;
      await pause(FIRST_PAUSE_MS * 2 ** (attempt - 1) * (0.5 + Math.random()));
    }
  }
}

function mayRepeat(error: unknown, keys: readonly string[]): boolean {
  return isLostRace(error) || keys.some((key) => isDuplicate(error, key));
}
