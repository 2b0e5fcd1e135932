/** The one source of "now", passed in so that tests can hold it. Epoch milliseconds, UTC. */
export type Clock = { now(): number };

/** The machine's clock. */
export const systemClock: Clock = { now: () => Date.now() };
