export interface Rate {
  perSecond: number;
  burst: number;
}

/** 50 requests a second a key, bursts of 100. */
export const INGEST_RATE: Rate = { perSecond: 50, burst: 100 };

const BUCKETS_KEPT = 10_000;

/** One token bucket a key. `take` answers the seconds to wait, 0 when the request may pass. `now` in ms of any steady clock. */
export function tokenBuckets(rate: Rate): { take(key: string, now: number): number } {
  const buckets = new Map<string, { tokens: number; at: number }>();
  return {
    take(key, now) {
      const { tokens, at } = buckets.get(key) ?? { tokens: rate.burst, at: now };
      const filled = Math.min(rate.burst, tokens + ((now - at) / 1000) * rate.perSecond);
      const passes = filled >= 1;
      if (buckets.size >= BUCKETS_KEPT) buckets.clear();
      buckets.set(key, { tokens: passes ? filled - 1 : filled, at: now });
      return passes ? 0 : Math.ceil((1 - filled) / rate.perSecond);
    },
  };
}
