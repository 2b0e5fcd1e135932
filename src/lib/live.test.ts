import { describe, expect, it } from 'vitest';
import { livenessOf } from './live.ts';

const heard = { good: 10_000, cut: null, start: 0, since: 1, database: 'ok' as const };
const at = (now: number, change: object = {}) => livenessOf({ ...heard, ...change }, now).state;

describe('how live the screen is', () => {
  it('says nothing for a missed beat, then reconnecting, then stale within ten seconds', () => {
    expect([at(10_000), at(13_900), at(14_000), at(18_900), at(19_000)]).toEqual(['live', 'live', 'reconnecting', 'reconnecting', 'stale']);
  });
  it('a cut link is said after two seconds, not before', () => {
    expect([at(12_000, { cut: 10_100 }), at(12_100, { cut: 10_100 })]).toEqual(['live', 'reconnecting']);
  });
  it('a database that is said to be away is stale sooner: the server noticed late', () => {
    expect([at(15_900, { database: 'away' }), at(16_000, { database: 'away' })]).toEqual(['reconnecting', 'stale']);
  });
  it('a server that never answered becomes stale too', () => {
    expect([at(100, { good: null }), at(5000, { good: null }), at(9600, { good: null })]).toEqual(['starting', 'reconnecting', 'stale']);
  });
});
