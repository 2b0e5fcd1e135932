import { at, f64, i32 } from './cells.ts';
import { freshTable, type FreshTable } from './fresh.ts';
import type { Step } from './labels.ts';
import { joinFront, lateAlone, lateFronts, offer, worse, type LateOptimum } from './late.ts';
import { primaryCost, type Problem } from './problem.ts';

/** A plan in short: per machine its blocks in order, the lateness of each session, the packed second cost. */
export interface Solution {
  orders: Step[][];
  late: Int32Array;
  primary: number;
  secondary: number;
}

export interface ExactSolution extends Solution {
  /** False when more equally late outcomes exist than were looked at for freshness. */
  freshProven: boolean;
}

/** Equally good outcomes with other sessions late: ties to the second are rare, and each costs a run of freshTable. */
const TIES = 48;

/** Every way to give `set` to the first two of three machines is tried once: 3^n pairs in all. */
function forEachPart(set: number, visit: (part: number) => void): void {
  for (let part = set; ; part = (part - 1) & set) {
    visit(part);
    if (part === 0) return;
  }
}

type Fronts = (Int32Array[] | undefined)[];

function unite(a: Fronts, b: Fronts, set: number, ceiling: number): Int32Array[] | undefined {
  let front: Int32Array[] | undefined;
  forEachPart(set, (part) => {
    const [left, right] = [a[part], b[set ^ part]];
    if (!left || !right) return;
    for (const x of left) {
      for (const y of right) {
        const late = worse(x, y);
        if (primaryCost(late) <= ceiling) front = joinFront(front, late);
      }
    }
  });
  return front;
}

/** The least lateness over all ways to share the blocks, with every vector that reaches it. */
function leastLate(problem: Problem, ceiling: number): LateOptimum {
  const all = (1 << problem.n) - 1;
  const fronts = problem.machines.map((_, m) => lateFronts(problem, m, ceiling));
  const optimum: LateOptimum = { cost: Infinity, vectors: [] };
  const [first, second, third] = [fronts[0], fronts[1], fronts[2]];
  if (!first) return optimum;
  if (!second) {
    first[all]?.forEach((late) => offer(optimum, late));
    return optimum;
  }
  const offerPairs = (pairs: Int32Array[] | undefined, others: Int32Array[] | undefined): void => {
    for (const x of pairs ?? []) for (const y of others ?? []) offer(optimum, worse(x, y));
  };
  if (!third) {
    forEachPart(all, (part) => offerPairs(first[part], second[all ^ part]));
    return optimum;
  }
  forEachPart(all, (rest) => {
    const last = third[all ^ rest];
    if (last) offerPairs(unite(first, second, rest, Math.min(ceiling, optimum.cost)), last);
  });
  return optimum;
}

interface Share {
  cost: number;
  sets: number[];
}

/** The cheapest way to share the blocks between the machines' tables; the first of equals. */
function cheapestShare(tables: readonly FreshTable[], all: number): Share {
  const best: Share = { cost: Infinity, sets: [] };
  const consider = (cost: number, sets: number[]): void => {
    if (cost < best.cost) [best.cost, best.sets] = [cost, sets];
  };
  const [first, second, third] = [at(tables, 0).best, tables[1]?.best, tables[2]?.best];
  if (!second) consider(f64(first, all), [all]);
  else if (!third) forEachPart(all, (part) => consider(f64(first, part) + f64(second, all ^ part), [part, all ^ part]));
  else {
    forEachPart(all, (rest) => {
      const last = f64(third, all ^ rest);
      if (last >= best.cost) return;
      forEachPart(rest, (part) => {
        const cost = last + f64(first, part) + f64(second, rest ^ part);
        if (cost < best.cost) consider(cost, [part, rest ^ part, all ^ rest]);
      });
    });
  }
  return best;
}

export function deadlines(problem: Problem, late: Int32Array): Int32Array {
  return problem.due.map((due, b) => due + i32(late, i32(problem.session, b)));
}

/**
 * Proven best of all plans of these whole blocks: first the least lateness, forward; then, with that
 * lateness as deadlines, the least freshness lost, travel and changes, backward, so that every block
 * begins as late as it may. `known` is a plan already found; it only cuts the search. Null: the pins
 * contradict each other.
 */
export function solveExactly(problem: Problem, known: Solution | null): ExactSolution | null {
  const all = (1 << problem.n) - 1;
  const alone = lateAlone(problem);
  const unavoidable = known !== null && known.primary === primaryCost(alone);
  const optimum = unavoidable ? { cost: known.primary, vectors: [alone] } : leastLate(problem, known?.primary ?? Infinity);
  let ceiling = known && known.primary === optimum.cost ? known.secondary : Infinity;
  let best: ExactSolution | null = null;
  for (const late of optimum.vectors.slice(0, TIES)) {
    const deadline = deadlines(problem, late);
    const tables = problem.machines.map((_, m) => freshTable(problem, m, deadline, ceiling));
    const share = cheapestShare(tables, all);
    if (share.cost === Infinity || (best && share.cost >= best.secondary)) continue;
    ceiling = Math.min(ceiling, share.cost);
    best = {
      orders: share.sets.map((set, m) => (set === 0 ? [] : at(tables, m).order(set))),
      late, primary: optimum.cost, secondary: share.cost, freshProven: true,
    };
  }
  if (best) best.freshProven = optimum.vectors.length <= TIES;
  return best;
}
