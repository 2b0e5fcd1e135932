import { at as item, f64, i32 } from './cells.ts';
import { keepsOrders } from './fresh.ts';
import { Labels } from './labels.ts';
import { latenessCost, primaryCost, type MachineData, type Problem } from './problem.ts';
import { NEVER, advance, placeForward, setupSeconds, type Placement } from './timeline.ts';

/**
 * Which lateness of the sessions is the least (sessions late, then total)? One machine at a time, all
 * sets of blocks, forward in time: a state is the set done so far and its last block; a label the end
 * of that block, the lateness of every session, and what the stores have given since the last stop.
 * A session whose blocks are all in the set is closed: its lateness counts; an open one may still grow.
 */
interface Walk {
  problem: Problem;
  machine: MachineData;
  /** Costs above this are no better than a known plan. */
  ceiling: number;
  /** Unavoidable cost of the sessions that the set doesn't touch, by set. */
  floor: Float64Array;
  sessionSets: Int32Array;
  labels: Labels;
  /** Scratch: stores used, then lateness by session. */
  extra: Int32Array;
  spot: Placement;
}

/** Lateness that no plan avoids: each block alone, on the machine that would be quickest. */
export function lateAlone(problem: Problem): Int32Array {
  const alone = new Int32Array(problem.sessions.length);
  const spot: Placement = { start: 0, end: 0, sumEnds: 0 };
  for (let b = 0; b < problem.n; b += 1) {
    let end = NEVER;
    for (const machine of problem.machines) {
      if (!machine.work[b]) continue;
      let setup = NEVER;
      for (let previous = -1; previous < problem.n; previous += 1) {
        if (previous !== b) setup = Math.min(setup, i32(machine.setup, (previous + 1) * problem.n + b));
      }
      placeForward(problem, machine, b, advance(machine.away, machine.available, setup), spot);
      end = Math.min(end, spot.end);
    }
    const s = i32(problem.session, b);
    alone[s] = Math.max(i32(alone, s), end - i32(problem.due, b));
  }
  return alone.map((late) => Math.max(0, late));
}

function floorBySet(problem: Problem, alone: Int32Array, sessionSets: Int32Array): Float64Array {
  const floor = new Float64Array(1 << problem.n);
  for (let set = 0; set < floor.length; set += 1) {
    let cost = 0;
    for (let s = 0; s < alone.length; s += 1) if ((set & i32(sessionSets, s)) === 0) cost += latenessCost(i32(alone, s));
    floor[set] = cost;
  }
  return floor;
}

/** Same lateness of closed sessions, so that of equals with different late sessions all are kept. */
function sameClosed(walk: Walk, label: number, set: number): boolean {
  const { labels, extra, sessionSets } = walk;
  const stores = walk.problem.stores.length;
  for (let s = 0; s < sessionSets.length; s += 1) {
    const whole = i32(sessionSets, s);
    if ((set & whole) === whole && i32(labels.extra, label * labels.width + stores + s) !== i32(extra, stores + s)) return false;
  }
  return true;
}

/** Stores used and open sessions of the label are ≤ (sign −1) or ≥ (sign 1) the new one's. */
function openCompares(walk: Walk, label: number, set: number, sign: number): boolean {
  const { labels, extra, sessionSets } = walk;
  const stores = walk.problem.stores.length;
  for (let k = 0; k < labels.width; k += 1) {
    if (k >= stores) {
      const whole = i32(sessionSets, k - stores);
      if ((set & whole) === whole) continue;
    }
    if ((i32(labels.extra, label * labels.width + k) - i32(extra, k)) * sign < 0) return false;
  }
  return true;
}

function insert(walk: Walk, set: number, block: number, time: number, cost: number, parent: number): void {
  const { labels } = walk;
  const state = set * walk.problem.n + block;
  let previous = -1;
  for (let label = i32(labels.head, state); label >= 0; ) {
    const following = i32(labels.next, label);
    const [earlier, cheaper] = [i32(labels.time, label) - time, f64(labels.cost, label) - cost];
    const comparable = cheaper !== 0 || sameClosed(walk, label, set);
    if (earlier <= 0 && cheaper <= 0 && comparable && openCompares(walk, label, set, -1)) return;
    if (earlier >= 0 && cheaper >= 0 && comparable && openCompares(walk, label, set, 1)) labels.unlink(state, previous, label);
    else previous = label;
    label = following;
  }
  labels.push(state, time, cost, parent, 0, walk.extra);
}

function fillExtra(walk: Walk, block: number, label: number, services: number): boolean {
  const { problem, machine, labels, extra } = walk;
  const use = machine.work[block]?.use;
  for (let k = 0; k < labels.width; k += 1) extra[k] = label < 0 ? 0 : i32(labels.extra, label * labels.width + k);
  for (let k = 0; k < problem.stores.length; k += 1) {
    const filled = machine.services.some((service, j) => ((services >> j) & 1) === 1 && service.restores[k]);
    const before = filled ? 0 : label < 0 ? i32(machine.full, k) - i32(machine.level, k) : i32(extra, k);
    extra[k] = before + (use?.[k] ?? 0);
    if (i32(extra, k) > i32(machine.full, k)) return false;
  }
  return true;
}

/** Appends `block` after the set of a label (−1: nothing yet), with services on the way. */
function append(walk: Walk, block: number, set: number, last: number, label: number, services: number): void {
  const { problem, machine, labels, extra, spot } = walk;
  if (!fillExtra(walk, block, label, services)) return;
  const from = label < 0 ? machine.available : i32(labels.time, label);
  placeForward(problem, machine, block, advance(machine.away, from, setupSeconds(problem, machine, last, block, services)), spot);
  if (spot.end >= NEVER) return;
  const s = i32(problem.session, block);
  const slot = problem.stores.length + s;
  extra[slot] = Math.max(i32(extra, slot), spot.end - i32(problem.due, block));
  const whole = i32(walk.sessionSets, s);
  const now = set | (1 << block);
  const cost = (label < 0 ? 0 : f64(labels.cost, label)) + ((now & whole) === whole ? latenessCost(i32(extra, slot)) : 0);
  if (cost + openCost(walk, now) + f64(walk.floor, now) > walk.ceiling) return;
  insert(walk, now, block, spot.end, cost, label);
}

function openCost(walk: Walk, set: number): number {
  const stores = walk.problem.stores.length;
  let cost = 0;
  for (let s = 0; s < walk.sessionSets.length; s += 1) {
    const whole = i32(walk.sessionSets, s);
    if ((set & whole) !== 0 && (set & whole) !== whole) cost += latenessCost(i32(walk.extra, stores + s));
  }
  return cost;
}

function extendSet(walk: Walk, set: number): void {
  const { problem, machine, labels } = walk;
  const masks = problem.stores.length === 0 ? 1 : 1 << machine.services.length;
  for (let block = 0; block < problem.n; block += 1) {
    if ((set >> block) & 1 || !machine.work[block]) continue;
    if (!item(problem.after, block).every((earlier) => (set >> earlier) & 1)) continue;
    if (set === 0) {
      if (machine.first >= 0 && machine.first !== block) continue;
      for (let services = 0; services < masks; services += 1) append(walk, block, 0, -1, -1, services);
      continue;
    }
    for (let last = 0; last < problem.n; last += 1) {
      if (!((set >> last) & 1)) continue;
      for (let label = i32(labels.head, set * problem.n + last); label >= 0; label = i32(labels.next, label)) {
        for (let services = 0; services < masks; services += 1) append(walk, block, set, last, label, services);
      }
    }
  }
}

/** Lateness by session, one array each, that a machine can reach with each set; undefined: none below the ceiling. */
export function lateFronts(problem: Problem, m: number, ceiling: number): (Int32Array[] | undefined)[] {
  const machine = item(problem.machines, m);
  const sessionSets = Int32Array.from(problem.sessionBlocks, (blocks) => blocks.reduce((set, b) => set | (1 << b), 0));
  const stores = problem.stores.length;
  const width = stores + problem.sessions.length;
  const labels = new Labels((1 << problem.n) * problem.n, width);
  const floor = floorBySet(problem, lateAlone(problem), sessionSets);
  const walk: Walk = { problem, machine, ceiling, floor, sessionSets, labels, extra: new Int32Array(width), spot: { start: 0, end: 0, sumEnds: 0 } };
  const fronts = new Array<Int32Array[] | undefined>(1 << problem.n);
  if (machine.first < 0) fronts[0] = [new Int32Array(problem.sessions.length)];
  for (let set = 0; set < 1 << problem.n; set += 1) {
    extendSet(walk, set);
    if (set === 0 || !keepsOrders(problem, set) || (machine.first >= 0 && !((set >> machine.first) & 1))) continue;
    let front: Int32Array[] | undefined;
    for (let last = 0; last < problem.n; last += 1) {
      for (let label = i32(labels.head, set * problem.n + last); label >= 0; label = i32(labels.next, label)) {
        front = joinFront(front, labels.extra.slice(label * width + stores, (label + 1) * width));
      }
    }
    fronts[set] = front;
  }
  return fronts;
}

/** Keeps the vectors of which none is ≤ another in every session. */
export function joinFront(front: Int32Array[] | undefined, late: Int32Array): Int32Array[] {
  const below = (a: Int32Array, b: Int32Array): boolean => a.every((value, s) => value <= i32(b, s));
  if (!front) return [late];
  if (front.some((known) => below(known, late))) return front;
  return [...front.filter((known) => !below(late, known)), late];
}

/** The cheapest unions of two machines' lateness, and all vectors that reach it. */
export interface LateOptimum {
  cost: number;
  vectors: Int32Array[];
}

export function offer(optimum: LateOptimum, late: Int32Array): void {
  const cost = primaryCost(late);
  if (cost > optimum.cost) return;
  if (cost < optimum.cost) [optimum.cost, optimum.vectors] = [cost, []];
  if (!optimum.vectors.some((known) => known.every((value, s) => value === i32(late, s)))) optimum.vectors.push(late);
}

export const worse = (a: Int32Array, b: Int32Array): Int32Array => a.map((value, s) => Math.max(value, i32(b, s)));
