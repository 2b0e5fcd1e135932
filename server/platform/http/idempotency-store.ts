import type { Knex } from 'knex';
import type { Clock } from '../clock.ts';
import { fromRowTime, toRowTime } from '../db/row-times.ts';
import { isDuplicate } from '../db/errors.ts';

export interface Repeatable {
  actor: string;
  key: string;
  hash: Buffer;
}

/** What is known of a key: nothing yet (ours to do), somebody is at it, done but its answer lost, or the answer. */
export type Claim =
  | { state: 'ours' }
  | { state: 'pending' }
  | { state: 'applied' }
  | { state: 'mismatch' }
  | { state: 'answered'; status: number; answer: string | null };

/** Answers are kept this long. */
export const KEPT_MS = 24 * 3_600_000;
/** A claim this old without effect belongs to a process that died: no request lives as long. */
const ABANDONED_MS = 60_000;

type Row = { actor: string; idempotency_key: string; request_hash: Buffer; state: 'pending' | 'applied' | 'answered'; status: number | null; answer: string | null; created_at: Date };

/** Rows of `idempotency`, one for (actor, key). */
export function idempotencyStore(db: Knex, clock: Clock) {
  const rows = (at: Knex) => at<Row>('idempotency');
  const own = ({ actor, key }: Repeatable) => ({ actor, idempotency_key: key });
  let sweptAt = -Infinity;

  async function sweep(): Promise<void> {
    const now = clock.now();
    if (now - sweptAt < 3_600_000) return;
    sweptAt = now;
    await rows(db).where('created_at', '<', toRowTime(now - KEPT_MS)).delete();
  }

  /** Forgets a row that no longer counts; true when one was there. */
  async function forgetSpent(what: Repeatable): Promise<boolean> {
    const now = clock.now();
    const old = await rows(db).where(own(what)).where('created_at', '<', toRowTime(now - KEPT_MS)).delete();
    const abandoned = await rows(db).where({ ...own(what), state: 'pending' }).where('created_at', '<', toRowTime(now - ABANDONED_MS)).delete();
    return old + abandoned > 0;
  }

  async function claim(what: Repeatable): Promise<Claim> {
    await sweep();
    try {
      await rows(db).insert({ ...own(what), request_hash: what.hash, state: 'pending', created_at: toRowTime(clock.now()) });
      return { state: 'ours' };
    } catch (error) {
      if (!isDuplicate(error)) throw error;
    }
    if (await forgetSpent(what)) return claim(what);
    const row = await rows(db).where(own(what)).first();
    // Let go meanwhile by the request that held it.
    if (row === undefined) return claim(what);
    if (!row.request_hash.equals(what.hash)) return { state: 'mismatch' };
    if (row.state === 'answered') return row.status === null ? { state: 'applied' } : { state: 'answered', status: row.status, answer: row.answer };
    // Between the commit and its answer a request is still under way, unless its process died there.
    return { state: row.state === 'applied' && clock.now() - fromRowTime(row.created_at) > ABANDONED_MS ? 'applied' : 'pending' };
  }

  return {
    claim,
    /** In the transaction of the effect itself. */
    applied: async (trx: Knex.Transaction, what: Repeatable): Promise<void> => {
      await rows(trx).where(own(what)).update({ state: 'applied' });
    },
    /** `answer` null: it held a secret and isn't kept. */
    answered: async (what: Repeatable, status: number, answer: string | null): Promise<void> => {
      await rows(db).where(own(what)).update({ state: 'answered', status, answer });
    },
    /** It broke. Where nothing was committed the same key may be used again; else what is known is that it was done. */
    broke: async (what: Repeatable): Promise<void> => {
      await rows(db).where({ ...own(what), state: 'pending' }).delete();
      await rows(db).where({ ...own(what), state: 'applied' }).update({ state: 'answered' });
    },
  };
}

export type IdempotencyStore = ReturnType<typeof idempotencyStore>;
