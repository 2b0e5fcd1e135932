import { useSyncExternalStore } from 'react';

/**
 * Elapsed clocks run on server time: the device's own clock plus an offset. A message says the server's time as it was
 * sent, so each only bounds the offset from below; the largest of the last few is the least delayed one.
 */
const KEPT = 10;
/** A correction larger than this is shown at once, not at the next tick. */
const JUMP_MS = 500;
const offsets: number[] = [];
let offset = 0;

/** Takes a server time (epoch ms) that has just arrived. */
export function heardServerTime(at: number): void {
  offsets.push(at - Date.now());
  if (offsets.length > KEPT) offsets.shift();
  const before = offset;
  offset = Math.max(...offsets);
  if (Math.abs(offset - before) > JUMP_MS) for (const ticker of tickers.values()) tick(ticker);
}

/** Now, as the server's clock says (epoch ms). */
export const serverNow = (): number => Date.now() + offset;

type Listener = () => void;
interface Ticker {
  every: number;
  now: number;
  listeners: Set<Listener>;
  timer: ReturnType<typeof setInterval> | null;
}
const tickers = new Map<number, Ticker>();

function tickerOf(every: number): Ticker {
  const known = tickers.get(every);
  if (known) return known;
  const made: Ticker = { every, now: serverNow(), listeners: new Set(), timer: null };
  tickers.set(every, made);
  return made;
}

function tick(ticker: Ticker): void {
  ticker.now = serverNow();
  for (const listener of ticker.listeners) listener();
}

function subscribeTo(ticker: Ticker): (listener: Listener) => () => void {
  return (listener) => {
    ticker.listeners.add(listener);
    ticker.timer ??= setInterval(() => tick(ticker), ticker.every);
    if (ticker.listeners.size === 1) ticker.now = serverNow();
    return () => {
      ticker.listeners.delete(listener);
      if (ticker.listeners.size > 0 || ticker.timer === null) return;
      clearInterval(ticker.timer);
      ticker.timer = null;
    };
  };
}

/** Server time that ticks every `every` ms (default a second); one timer per interval for the whole page. */
export function useNow(every = 1000): number {
  const ticker = tickerOf(every);
  return useSyncExternalStore(subscriptionOf(ticker), () => ticker.now);
}

const subscriptions = new WeakMap<Ticker, ReturnType<typeof subscribeTo>>();
function subscriptionOf(ticker: Ticker): ReturnType<typeof subscribeTo> {
  const known = subscriptions.get(ticker) ?? subscribeTo(ticker);
  subscriptions.set(ticker, known);
  return known;
}
