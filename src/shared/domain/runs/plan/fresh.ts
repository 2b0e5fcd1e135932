import { f64, i32 } from './cells.ts';
import { Labels, type Step } from './labels.ts';
import { packed, type MachineData, type Problem } from './problem.ts';
import { advance, NEVER, placeBackward, retreat, setupSeconds, type Placement } from './timeline.ts';

/**
 * One machine, all sets of blocks, deadlines that must hold: the least (freshness lost, travel,
 * changes) of each set. Built from the end of the night backwards: a state is the set of blocks done
 * last and the first of them; a label the latest start of that first block and the cost so far. A later
 * start and a smaller cost are better; stores count what is needed until the next stop.
 */
export interface FreshTable {
  /** By set; Infinity: it can't be done in time. */
  best: Float64Array;
  /** The machine's order for a set whose best is finite. */
  order: (set: number) => Step[];
}

interface Walk {
  problem: Problem;
  machine: MachineData;
  deadline: Int32Array;
  ceiling: number;
  labels: Labels;
  need: Int32Array;
  spot: Placement;
}

const serviceMasks = (problem: Problem, machine: MachineData): number => (problem.stores.length === 0 ? 1 : 1 << machine.services.length);

/** Which stores a bit mask of services makes good. */
function restored(machine: MachineData, services: number, store: number): boolean {
  return machine.services.some((service, k) => ((services >> k) & 1) === 1 && service.restores[store] === true);
}

/** Needs before `block`, given those after it and the services between; false when more than a full store. */
function needsBefore(walk: Walk, block: number, after: number, services: number): boolean {
  const { machine, labels, need } = walk;
  const use = machine.work[block]?.use;
  for (let k = 0; k < labels.width; k += 1) {
    const later = after < 0 || restored(machine, services, k) ? 0 : i32(labels.extra, after * labels.width + k);
    const all = later + (use?.[k] ?? 0);
    if (all > i32(machine.full, k)) return false;
    need[k] = all;
  }
  return true;
}

/** Puts `block` before the set of a label (−1: the empty set), with services in between. */
function prepend(walk: Walk, block: number, set: number, first: number, label: number, services: number): void {
  const { problem, machine, labels, spot } = walk;
  const work = machine.work[block];
  if (!work) return;
  if (!needsBefore(walk, block, label, services)) return;
  let until = i32(walk.deadline, block);
  let cost = 0;
  if (label >= 0) {
    const leave = retreat(machine.away, -i32(labels.time, label), setupSeconds(problem, machine, block, first, services));
    if (leave < until) until = leave;
    const pair = (block + 1) * problem.n + first;
    cost = f64(labels.cost, label) + packed(problem, 0, i32(machine.travel, pair), i32(machine.change, pair));
  }
  placeBackward(problem, machine, block, until, spot);
  if (spot.start < machine.available) return;
  const freshness = i32(problem.laneCount, block) * i32(walk.deadline, block) - spot.sumEnds;
  cost += packed(problem, freshness, work.travel, 0);
  if (cost > walk.ceiling) return;
  labels.insert((set | (1 << block)) * problem.n + block, -spot.start, cost, label, services, walk.need);
}

/** Cost of a complete order that begins with this label, and the services before its first block. */
function begin(walk: Walk, first: number, label: number): { cost: number; services: number } {
  const { problem, machine, labels } = walk;
  const start = -i32(labels.time, label);
  if (machine.first >= 0 && machine.first !== first) return { cost: Infinity, services: 0 };
  for (let services = 0; services < serviceMasks(problem, machine); services += 1) {
    let enough = true;
    for (let k = 0; k < labels.width; k += 1) {
      if (!restored(machine, services, k) && i32(labels.extra, label * labels.width + k) > i32(machine.level, k)) enough = false;
    }
    if (!enough || advance(machine.away, machine.available, setupSeconds(problem, machine, -1, first, services)) > start) continue;
    const cost = f64(labels.cost, label) + packed(problem, 0, i32(machine.travel, first), i32(machine.change, first));
    return { cost: cost > walk.ceiling ? Infinity : cost, services };
  }
  return { cost: Infinity, services: 0 };
}

/** Order pins: what must come earlier on the machine is not yet in the set that is done last. */
function mayPrepend(problem: Problem, block: number, set: number): boolean {
  if ((set >> block) & 1) return false;
  if (!problem.ordered) return true;
  for (let other = 0; other < problem.n; other += 1) {
    if ((set >> other) & 1) continue;
    if (other !== block && problem.after[other]?.includes(block)) return false;
  }
  return true;
}

/** A set that holds one end of an order pin without the other is no machine's work. */
export function keepsOrders(problem: Problem, set: number): boolean {
  return !problem.ordered || problem.after.every((earlier, block) => earlier.every((other) => ((set >> block) & 1) === ((set >> other) & 1)));
}

function closeSet(walk: Walk, set: number, best: Float64Array, chosen: Int32Array, opening: Uint8Array): void {
  const { problem, machine, labels } = walk;
  if (!keepsOrders(problem, set) || (machine.first >= 0 && !((set >> machine.first) & 1))) return;
  for (let first = 0; first < problem.n; first += 1) {
    if (!((set >> first) & 1)) continue;
    for (let label = i32(labels.head, set * problem.n + first); label >= 0; label = i32(labels.next, label)) {
      const opened = begin(walk, first, label);
      if (opened.cost < f64(best, set)) [best[set], chosen[set], opening[set]] = [opened.cost, label, opened.services];
    }
  }
}

/** The order that ends in a label's chain; a label's services lie between its block and the one after it. */
function readOrder(labels: Labels, blockOf: Int32Array, label: number, opening: number): Step[] {
  const steps: Step[] = [];
  let services = opening;
  for (let at = label; at >= 0; at = i32(labels.parent, at)) {
    steps.push({ block: i32(blockOf, at), services });
    services = labels.services[at] ?? 0;
  }
  return steps;
}

function extendSet(walk: Walk, set: number): void {
  const { problem, machine, labels } = walk;
  const masks = serviceMasks(problem, machine);
  for (let block = 0; block < problem.n; block += 1) {
    if (!mayPrepend(problem, block, set) || !machine.work[block]) continue;
    if (set === 0) prepend(walk, block, 0, -1, -1, 0);
    for (let first = 0; first < problem.n; first += 1) {
      if (!((set >> first) & 1)) continue;
      for (let label = i32(labels.head, set * problem.n + first); label >= 0; label = i32(labels.next, label)) {
        for (let services = 0; services < masks; services += 1) prepend(walk, block, set, first, label, services);
      }
    }
  }
}

/** Fills the table; `ceiling` cuts what costs more than a plan already known. `deadline` in seconds, per block. */
export function freshTable(problem: Problem, m: number, deadline: Int32Array, ceiling: number): FreshTable {
  const machine = problem.machines[m] as MachineData;
  const sets = 1 << problem.n;
  const labels = new Labels(sets * problem.n, problem.stores.length);
  const walk: Walk = { problem, machine, deadline, ceiling, labels, need: new Int32Array(labels.width), spot: { start: -NEVER, end: 0, sumEnds: 0 } };
  const best = new Float64Array(sets).fill(Infinity);
  const chosen = new Int32Array(sets).fill(-1);
  const opening = new Uint8Array(sets);
  if (machine.first < 0) best[0] = 0;
  for (let set = 0; set < sets; set += 1) {
    if (set > 0) closeSet(walk, set, best, chosen, opening);
    extendSet(walk, set);
  }
  return {
    best,
    order: (set) => readOrder(labels, blockOfLabels(labels, problem.n), i32(chosen, set), opening[set] ?? 0),
  };
}

/** The block of each label, from the state whose chain holds it; dropped labels are no parents of kept ones. */
function blockOfLabels(labels: Labels, n: number): Int32Array {
  const blockOf = new Int32Array(labels.count).fill(-1);
  labels.head.forEach((head, state) => {
    for (let at = head; at >= 0; at = i32(labels.next, at)) blockOf[at] = state % n;
  });
  return blockOf;
}
