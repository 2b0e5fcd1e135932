import { demandAmount, demandCount, demandOpenUnit, demandPositive } from './demand.ts';
import { missing, type Missing } from './missing.ts';

/** Offered load a = arrivals ÷ service rate (erlangs) to c servers: share of arrivals that find all busy and go away. */
export function erlangB(load: number, servers: number): number {
  demandAmount('load', load);
  demandCount('servers', servers);
  let blocked = 1;
  for (let i = 1; i <= servers; i += 1) blocked = (load * blocked) / (i + load * blocked);
  return blocked;
}

/** Probability that an arrival waits when it stays; missing 'overloaded' when the load isn't below the servers. */
export function erlangC(load: number, servers: number): { value: number } | Missing<'overloaded'> {
  const blocked = erlangB(load, servers);
  if (load >= servers) return missing('overloaded');
  return { value: (servers * blocked) / (servers - load * (1 - blocked)) };
}

/** Rates per one unit of time, and how many mechanics. */
export type QueueInput = { arrivals: number; service: number; servers: number };

export type Queue = {
  load: number;
  utilisation: number;
  /** Probability that a call waits. */
  waits: number;
  /** Mean wait, and mean time in the system (wait and work), in the unit of the rates. */
  meanWait: number;
  meanTime: number;
  /** Mean number waiting and in the system; by Little's law arrivals × the times. */
  waiting: number;
  inSystem: number;
  /** Probability that nobody is there. */
  empty: number;
};

/**
 * Calls at random, work times exponential, c mechanics, first come first served (M/M/c).
 * Sources: A. K. Erlang (1917); D. Gross and C. M. Harris, Fundamentals of Queueing Theory, chapter 2.
 */
export function queue({ arrivals, service, servers }: QueueInput): Queue | Missing<'overloaded'> {
  demandAmount('arrivals', arrivals);
  demandPositive('service', service);
  const load = arrivals / service;
  const waits = erlangC(load, servers);
  if (waits.value === null) return waits;
  const meanWait = waits.value / (servers * service - arrivals);
  const meanTime = meanWait + 1 / service;
  return {
    load,
    utilisation: load / servers,
    waits: waits.value,
    meanWait,
    meanTime,
    waiting: arrivals * meanWait,
    inSystem: arrivals * meanTime,
    empty: emptyProbability(load, servers),
  };
}

function emptyProbability(load: number, servers: number): number {
  let [sum, term] = [0, 1];
  for (let i = 0; i < servers; i += 1) {
    sum += term;
    term *= load / (i + 1);
  }
  return 1 / (sum + (term * servers) / (servers - load));
}

/** Share of calls whose wait is at most t: 1 − C·exp(−(cμ − λ)t). */
export function answeredWithin(input: QueueInput, t: number): { value: number } | Missing<'overloaded'> {
  demandAmount('t', t);
  const state = queue(input);
  if (!('waits' in state)) return state;
  return { value: 1 - state.waits * Math.exp(-(input.servers * input.service - input.arrivals) * t) };
}

/** The wait that a share p of calls doesn't exceed; 0 when at least that share doesn't wait. */
export function waitQuantile(input: QueueInput, p: number): { value: number } | Missing<'overloaded'> {
  demandOpenUnit('p', p);
  const state = queue(input);
  if (!('waits' in state)) return state;
  if (1 - state.waits >= p) return { value: 0 };
  return { value: Math.log(state.waits / (1 - p)) / (input.servers * input.service - input.arrivals) };
}

/** Fewest mechanics so that at least a share of calls is answered within t. */
export function serversNeeded(arrivals: number, service: number, t: number, share: number): number {
  demandAmount('arrivals', arrivals);
  demandPositive('service', service);
  demandOpenUnit('share', share);
  for (let servers = Math.floor(arrivals / service) + 1; ; servers += 1) {
    const answered = answeredWithin({ arrivals, service, servers }, t);
    if (answered.value !== null && answered.value >= share) return servers;
  }
}
