import { describe, expect, it } from 'vitest';
import { INGEST_RATE, tokenBuckets } from './token-bucket.ts';

describe('requests of one key', () => {
  it('lets a burst of 100 pass, then 50 a second', () => {
    const { take } = tokenBuckets(INGEST_RATE);
    const at = (now: number, count: number) => Array.from({ length: count }, () => take('key', now)).filter((wait) => wait === 0).length;
    expect(at(0, 150)).toBe(100);
    expect(at(100, 150)).toBe(5);
    expect(at(1_100, 150)).toBe(50);
    expect(at(60_000, 150)).toBe(100);
  });

  it('says how long to wait, and keeps keys apart', () => {
    const { take } = tokenBuckets({ perSecond: 0.5, burst: 1 });
    expect([take('a', 0), take('a', 0), take('b', 0), take('a', 1_000), take('a', 2_000)]).toEqual([0, 2, 0, 1, 0]);
  });
});
