import { demandAmount, demandCount, demandPositive } from './demand.ts';
import { poissonCdf } from './distributions.ts';

/** Machines that each call at `calls` per unit of time while running, mechanics who restore at `service` each. */
export type FiniteQueueInput = { machines: number; servers: number; calls: number; service: number };

export type FiniteQueue = {
  /** Probability that k machines are down, k = 0…machines. */
  down: number[];
  /** Mean number down, and down without a mechanic yet. */
  meanDown: number;
  waiting: number;
  /** Calls per unit of time that really come, as machines that are down don't call. */
  arrivals: number;
  meanWait: number;
  /** Wait and work. */
  meanTime: number;
  /** Share of machine time running. */
  availability: number;
};

/**
 * Finite-source queue (machine repair, M/M/c//N): unlike an open queue it can't be overloaded, a house has only so many lanes.
 * Source: D. Gross and C. M. Harris, Fundamentals of Queueing Theory, section on finite-source queues; C. Palm (1947).
 */
export function finiteQueue(input: FiniteQueueInput): FiniteQueue {
  const { machines, servers, calls, service } = input;
  demandPositive('machines', machines);
  demandCount('machines', machines);
  demandPositive('servers', servers);
  demandCount('servers', servers);
  demandAmount('calls', calls);
  demandPositive('service', service);
  const down = stateProbabilities(input);
  // Running machines are summed by themselves: in a house that is nearly all down, machines − meanDown would lose its digits.
  let [meanDown, waiting, running] = [0, 0, 0];
  down.forEach((chance, k) => {
    meanDown += k * chance;
    waiting += Math.max(0, k - servers) * chance;
    running += (machines - k) * chance;
  });
  const arrivals = calls * running;
  const meanWait = arrivals === 0 ? 0 : waiting / arrivals;
  return { down, meanDown, waiting, arrivals, meanWait, meanTime: meanWait + 1 / service, availability: running / machines };
}

function stateProbabilities({ machines, servers, calls, service }: FiniteQueueInput): number[] {
  // In logarithms: 64 busy lanes would leave the range of a double.
  const logs = [0];
  for (let k = 1; k <= machines; k += 1) {
    logs.push((logs[k - 1] as number) + Math.log(((machines - k + 1) * calls) / (Math.min(k, servers) * service)));
  }
  const highest = Math.max(...logs);
  const weights = logs.map((log) => Math.exp(log - highest));
  const sum = weights.reduce((all, weight) => all + weight, 0);
  return weights.map((weight) => weight / sum);
}

/**
 * Share of calls that wait at most t. A call finds the state that a house with one machine fewer is in;
 * with j ≥ c down it waits for j − c + 1 restorations at rate c·service.
 */
export function finiteAnsweredWithin(input: FiniteQueueInput, t: number): number {
  demandAmount('t', t);
  finiteQueue(input);
  if (input.machines === 1) return 1;
  const found = stateProbabilities({ ...input, machines: input.machines - 1 });
  let late = 0;
  for (let j = input.servers; j < found.length; j += 1) {
    late += (found[j] as number) * poissonCdf(j - input.servers, input.servers * input.service * t);
  }
  return 1 - late;
}
