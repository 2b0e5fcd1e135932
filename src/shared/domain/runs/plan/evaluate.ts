import { at, i32 } from './cells.ts';
import { deadlines, type Solution } from './exact.ts';
import type { Step } from './labels.ts';
import { packed, primaryCost, type MachineData, type Problem } from './problem.ts';
import { advance, NEVER, placeBackward, placeForward, retreat, setupSeconds, type Placement } from './timeline.ts';

/** Fills in the services of an order of blocks: a stop only where the next block would not last. Null: nothing helps. */
export function withServices(problem: Problem, machine: MachineData, blocks: readonly number[]): Step[] | null {
  if (problem.stores.length === 0) return blocks.map((block) => ({ block, services: 0 }));
  const left = machine.level.slice();
  const steps: Step[] = [];
  for (const block of blocks) {
    const use = machine.work[block]?.use ?? new Int32Array(left.length);
    let services = 0;
    machine.services.forEach((service, j) => {
      if (service.restores.some((restores, k) => restores && i32(left, k) < i32(use, k))) services |= 1 << j;
    });
    for (let k = 0; k < left.length; k += 1) {
      if (machine.services.some((service, j) => (services >> j) & 1 && service.restores[k])) left[k] = i32(machine.full, k);
      left[k] = i32(left, k) - i32(use, k);
      if (i32(left, k) < 0) return null;
    }
    steps.push({ block, services });
  }
  return steps;
}

/** Pins that a machine's order breaks make it worthless. */
function keepsPins(problem: Problem, machine: MachineData, steps: readonly Step[]): boolean {
  if (machine.first >= 0 && steps[0]?.block !== machine.first) return false;
  if (steps.some((step) => !machine.work[step.block])) return false;
  if (!problem.ordered) return true;
  const place = new Map(steps.map((step, i) => [step.block, i]));
  return problem.after.every((earlier, block) => earlier.every((other) => (place.get(other) ?? -1) < (place.get(block) ?? -1) || (!place.has(other) && !place.has(block))));
}

const spot: Placement = { start: 0, end: 0, sumEnds: 0 };

/** Raises `late` by this order's earliest ends; false when a pin breaks. */
export function addLateness(problem: Problem, machine: MachineData, steps: readonly Step[], late: Int32Array): boolean {
  if (!keepsPins(problem, machine, steps)) return false;
  let [time, last] = [machine.available, -1];
  for (const { block, services } of steps) {
    placeForward(problem, machine, block, advance(machine.away, time, setupSeconds(problem, machine, last, block, services)), spot);
    if (spot.end >= NEVER) return false;
    const s = i32(problem.session, block);
    if (spot.end - i32(problem.due, block) > i32(late, s)) late[s] = spot.end - i32(problem.due, block);
    [time, last] = [spot.end, block];
  }
  return true;
}

/** Packed cost of one machine's order pushed as late as the deadlines allow; Infinity when it doesn't fit. */
export function secondaryOf(problem: Problem, machine: MachineData, steps: readonly Step[], deadline: Int32Array): number {
  let cost = 0;
  let until = NEVER;
  for (let i = steps.length - 1; i >= 0; i -= 1) {
    const { block, services } = at(steps, i);
    const last = i === 0 ? -1 : at(steps, i - 1).block;
    placeBackward(problem, machine, block, Math.min(until, i32(deadline, block)), spot);
    if (spot.start <= -NEVER) return Infinity;
    const pair = (last + 1) * problem.n + block;
    const freshness = i32(problem.laneCount, block) * i32(deadline, block) - spot.sumEnds;
    cost += packed(problem, freshness, i32(machine.travel, pair) + (machine.work[block]?.travel ?? 0), i32(machine.change, pair));
    until = retreat(machine.away, spot.start, setupSeconds(problem, machine, last, block, services));
  }
  return until < machine.available ? Infinity : cost;
}

/** A whole plan's worth, from its orders; null when a pin breaks, a store can't last, or lateness costs more than `ceiling`. */
export function evaluate(problem: Problem, orders: readonly (readonly number[])[], ceiling = Infinity): Solution | null {
  const late = new Int32Array(problem.sessions.length);
  const steps: Step[][] = [];
  for (const [m, machine] of problem.machines.entries()) {
    const filled = withServices(problem, machine, orders[m] ?? []);
    if (!filled || !addLateness(problem, machine, filled, late)) return null;
    steps.push(filled);
  }
  const primary = primaryCost(late);
  if (primary > ceiling) return null;
  const deadline = deadlines(problem, late);
  let secondary = 0;
  for (const [m, machine] of problem.machines.entries()) secondary += secondaryOf(problem, machine, at(steps, m), deadline);
  return { orders: steps, late, primary, secondary };
}
