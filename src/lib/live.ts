import { useSyncExternalStore } from 'react';

/**
 * How live the screen is. Heartbeats come every 2 s; one missed is nothing yet. `since` is the server time of the last word
 * (epoch ms): what is on screen is as of then.
 */
export type Liveness = { state: 'starting' | 'live' | 'reconnecting' | 'stale'; since: number | null; database: 'ok' | 'away' };

/** Silence after which the screen says "reconnecting" (a beat and its grace), and after which it is stale (10 s, said in time). */
export const RECONNECTING_AFTER_MS = 4000;
export const CUT_SHOWN_AFTER_MS = 2000;
export const STALE_AFTER_MS = 9000;
/** The same where the server itself says that the database is away: it noticed that up to two seconds late. */
export const AWAY_AFTER_MS = 6000;

interface Heard {
  /** Monotonic ms of the last good word, of the cut (null: connected), and of the start. */
  good: number | null;
  cut: number | null;
  start: number;
  since: number | null;
  database: 'ok' | 'away';
}

/** Pure: the state that follows from what was heard when. */
export function livenessOf(heard: Heard, now: number): Liveness {
  const silence = now - (heard.good ?? heard.start);
  const rest = { since: heard.since, database: heard.database };
  if (silence >= (heard.database === 'away' ? AWAY_AFTER_MS : STALE_AFTER_MS)) return { state: 'stale', ...rest };
  const cutShown = heard.cut !== null && now - heard.cut >= CUT_SHOWN_AFTER_MS;
  if (cutShown || silence >= RECONNECTING_AFTER_MS) return { state: 'reconnecting', ...rest };
  return { state: heard.good === null ? 'starting' : 'live', ...rest };
}

const heard: Heard = { good: null, cut: null, start: performance.now(), since: null, database: 'ok' };
let shown: Liveness = livenessOf(heard, performance.now());
const listeners = new Set<() => void>();
let timer: ReturnType<typeof setInterval> | null = null;

function refresh(): void {
  const next = livenessOf(heard, performance.now());
  const same = next.state === shown.state && next.database === shown.database && (next.state === 'live' || next.since === shown.since);
  if (same) return;
  shown = next;
  for (const listener of listeners) listener();
}

/** A heartbeat or snapshot arrived, said at server time `at`. While the database is away nothing on screen gets newer. */
export function heardWord(at: number, database: 'ok' | 'away'): void {
  heard.database = database;
  heard.cut = null;
  if (database === 'ok') {
    heard.good = performance.now();
    heard.since = at;
  }
  refresh();
}

export function linkCut(): void {
  heard.cut ??= performance.now();
  refresh();
}

/** Another centre or a fresh start: nothing has been heard yet. */
export function linkStarted(): void {
  Object.assign(heard, { good: null, cut: null, start: performance.now(), since: null, database: 'ok' });
  refresh();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  timer ??= setInterval(refresh, 250);
  return () => {
    listeners.delete(listener);
    if (listeners.size > 0 || timer === null) return;
    clearInterval(timer);
    timer = null;
  };
}

export const useLiveness = (): Liveness => useSyncExternalStore(subscribe, () => shown);
