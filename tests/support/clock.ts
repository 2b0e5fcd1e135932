import type { Clock } from '#server/platform/clock.ts';

/** A clock that stands still until the test moves it. */
export type FixedClock = Clock & {
  /** Moves by this many milliseconds and returns the new now. */
  advance(ms: number): number;
  /** Jumps to an ISO instant. */
  set(iso: string): number;
};

/** A clock standing at this ISO instant. */
export function fixedClock(iso: string): FixedClock {
  let at = instantOf(iso);
  return {
    now: () => at,
    advance: (ms) => (at += ms),
    set: (next) => (at = instantOf(next)),
  };
}

function instantOf(iso: string): number {
  const at = Date.parse(iso);
  if (Number.isNaN(at)) throw new Error(`'${iso}' isn't an ISO instant`);
  return at;
}
