import { at, i32 } from './cells.ts';
import type { MachineData, Problem } from './problem.ts';
import { advance, NEVER, placeBackward, placeForward, retreat, setupSeconds, type Placement } from './timeline.ts';

const mayFollow = (problem: Problem, b: number, done: readonly boolean[]): boolean => at(problem.after, b).every((earlier) => done[earlier] === true);

interface Candidate {
  block: number;
  start: number;
  end: number;
  setup: number;
}

const spot: Placement = { start: 0, end: 0, sumEnds: 0 };

function candidates(problem: Problem, machine: MachineData, time: number, last: number, done: readonly boolean[]): Candidate[] {
  const list: Candidate[] = [];
  for (let b = 0; b < problem.n; b += 1) {
    if (done[b] || !machine.work[b] || !mayFollow(problem, b, done)) continue;
    if (last < 0 && machine.first >= 0 && machine.first !== b) continue;
    const setup = setupSeconds(problem, machine, last, b, 0);
    placeForward(problem, machine, b, advance(machine.away, time, setup), spot);
    if (spot.end < NEVER) list.push({ block: b, start: spot.start, end: spot.end, setup });
  }
  return list;
}

/**
 * Builds orders from the beginning of the night: the machine that is free first takes, among the blocks
 * that it could begin within `patience` seconds of the earliest, the one of the highest rank, then the
 * least set-up. `rank` per block, smaller first. Null when something can't be placed.
 */
export function buildForward(problem: Problem, rank: readonly number[], patience: number): number[][] | null {
  const orders: number[][] = problem.machines.map(() => []);
  const time = problem.machines.map((machine) => machine.available);
  const done = new Array<boolean>(problem.n).fill(false);
  for (let placed = 0; placed < problem.n; placed += 1) {
    let best: (Candidate & { m: number }) | null = null;
    const machines = problem.machines.map((_, m) => m).sort((a, b) => at(time, a) - at(time, b) || a - b);
    for (const m of machines) {
      const list = candidates(problem, at(problem.machines, m), at(time, m), at(orders, m).at(-1) ?? -1, done);
      if (list.length === 0) continue;
      const earliest = Math.min(...list.map((c) => c.start));
      if (best && best.start <= earliest + patience) continue;
      const near = list.filter((c) => c.start <= earliest + patience);
      best = { ...near.reduce((a, b) => (prefers(rank, b, a) ? b : a)), m };
    }
    if (!best) return null;
    at(orders, best.m).push(best.block);
    time[best.m] = best.end;
    done[best.block] = true;
  }
  return orders;
}

function prefers(rank: readonly number[], a: Candidate, b: Candidate): boolean {
  return at(rank, a.block) - at(rank, b.block) < 0 || (at(rank, a.block) === at(rank, b.block) && (a.setup < b.setup || (a.setup === b.setup && a.start < b.start)));
}

/** Builds orders from the end of the night: each step gives the block that can end latest to the machine that lets it. */
export function buildBackward(problem: Problem, deadline: Int32Array): number[][] | null {
  const orders: number[][] = problem.machines.map(() => []);
  const begin = problem.machines.map(() => NEVER);
  const done = new Array<boolean>(problem.n).fill(false);
  for (let placed = 0; placed < problem.n; placed += 1) {
    let best: { b: number; m: number; start: number; end: number; setup: number } | null = null;
    for (const [m, machine] of problem.machines.entries()) {
      for (let b = 0; b < problem.n; b += 1) {
        if (done[b] || !machine.work[b]) continue;
        const next = at(orders, m)[0];
        const setup = next === undefined ? 0 : setupSeconds(problem, machine, b, next, 0);
        const until = next === undefined ? NEVER : retreat(machine.away, at(begin, m), setup);
        placeBackward(problem, machine, b, Math.min(until, i32(deadline, b)), spot);
        if (spot.start <= -NEVER) continue;
        if (!best || spot.end > best.end || (spot.end === best.end && setup < best.setup)) best = { b, m, start: spot.start, end: spot.end, setup };
      }
    }
    if (!best) return null;
    at(orders, best.m).unshift(best.b);
    begin[best.m] = best.start;
    done[best.b] = true;
  }
  return orders;
}
