import { MemoryStore, ipKeyGenerator, type Options } from 'express-rate-limit';
import { Refusal } from '../http/refusal.ts';

const WINDOW_MS = 15 * 60_000;
/** Wrong passwords in a window, of one account from wherever, and from one address whatever the account: a house has one address for all. */
const PER_ACCOUNT = 10;
const PER_ADDRESS = 50;

/** Counts failed sign-ins in this process; a restart forgets them. */
export interface FailureLimit {
  /**
   * Runs a try and counts it beforehand, so that a hundred at once are counted too; a success takes its own count back. Throws a 429 without running
   * it where a limit is reached.
   */
  attempt<T>(who: { account: string; address: string }, work: () => Promise<T | null>): Promise<T | null>;
  stop(): void;
}

/** Limits for sign-in, on the store of express-rate-limit. */
export function failureLimit(): FailureLimit {
  const counters = [
    { store: newStore(), limit: PER_ADDRESS, keyOf: (who: { address: string }) => ipKeyGenerator(who.address) },
    { store: newStore(), limit: PER_ACCOUNT, keyOf: (who: { account: string }) => who.account.toLowerCase() },
  ];
  return {
    async attempt(who, work) {
      const counted: { store: MemoryStore; key: string }[] = [];
      const uncount = () => Promise.all(counted.map(({ store, key }) => store.decrement(key)));
      for (const { store, limit, keyOf } of counters) {
        const key = keyOf(who);
        const { totalHits, resetTime } = await store.increment(key);
        counted.push({ store, key });
        if (totalHits > limit) {
          await uncount();
          throw new Refusal(429, 'session.too-many-tries', { retryAfterS: secondsUntil(resetTime) });
        }
      }
      try {
        const result = await work();
        if (result !== null) await uncount();
        return result;
      } catch (error) {
        // Neither right nor wrong: the database was away, say.
        await uncount();
        throw error;
      }
    },
    stop: () => counters.forEach(({ store }) => store.shutdown()),
  };
}

function newStore(): MemoryStore {
  const store = new MemoryStore();
  store.init({ windowMs: WINDOW_MS } as Options);
  return store;
}

function secondsUntil(resetTime: Date | undefined): number {
  return Math.max(1, Math.ceil(((resetTime?.getTime() ?? Date.now() + WINDOW_MS) - Date.now()) / 1000));
}
