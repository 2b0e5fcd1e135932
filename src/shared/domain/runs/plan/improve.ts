import { at, i32 } from './cells.ts';
import type { Bound } from './bound.ts';
import { buildBackward, buildForward } from './construct.ts';
import { deadlines, type Solution } from './exact.ts';
import { evaluate } from './evaluate.ts';
import type { Problem } from './problem.ts';

/** Fewer and shorter lateness first, then the packed second cost. */
export const better = (a: Solution, b: Solution | null): boolean => !b || a.primary < b.primary || (a.primary === b.primary && a.secondary < b.secondary);

const blocksOf = (solution: Solution): number[][] => solution.orders.map((steps) => steps.map((step) => step.block));

/** Ranks to build by: the relaxed night's order of sessions, due, due less work, release. */
function ranks(problem: Problem, bound: Bound): number[][] {
  const place = new Map(bound.order.map((s, i) => [s, i]));
  const blocks = Array.from({ length: problem.n }, (_, b) => b);
  const work = (b: number): number => Math.min(...problem.machines.map((machine) => machine.work[b]?.total ?? Infinity));
  const inOrder = (key: (b: number) => number): number[] => blocks.map(key);
  return [
    inOrder((b) => place.get(i32(problem.session, b)) ?? 0),
    inOrder((b) => i32(problem.due, b)),
    inOrder((b) => i32(problem.due, b) - work(b)),
    inOrder((b) => problem.laneRelease[b]?.[0] ?? 0),
  ];
}

/** The best of several ways to build. */
export function firstSolution(problem: Problem, bound: Bound): Solution | null {
  let best: Solution | null = null;
  const consider = (orders: number[][] | null): void => {
    const solution = orders && evaluate(problem, orders);
    if (solution && better(solution, best)) best = solution;
  };
  for (const rank of ranks(problem, bound)) for (const patience of [0, 180]) consider(buildForward(problem, rank, patience));
  consider(buildBackward(problem, problem.due));
  const found = best as Solution | null;
  if (found) consider(buildBackward(problem, deadlines(problem, found.late)));
  return best;
}

/** Whole sessions are moved by halves first, then in smaller pieces. */
const LENGTHS = [8, 4, 2, 1];

/** Exchanging every pair pays while blocks are few and long. */
const SWAP_BLOCKS = 20;

/**
 * First improvement by moving stretches of neighbours of an order to another place, on the
 * same or another machine, until nothing helps or the tries are used up. Counted tries, not time: the
 * same night gives the same plan.
 */
export function improve(problem: Problem, start: Solution, tries: number): Solution {
  let best = start;
  let left = tries;
  let improved = true;
  while (improved && left > 0) {
    improved = false;
    if (problem.n <= SWAP_BLOCKS) {
      const swapped = swaps(problem, best);
      left -= (problem.n * (problem.n - 1)) / 2;
      improved = swapped !== best;
      best = swapped;
    }
    for (const length of LENGTHS) {
      const found = sweep(problem, best, length, left);
      left = found.left;
      if (found.solution === best) continue;
      best = found.solution;
      improved = true;
    }
  }
  return best;
}

/** Tries to exchange every two blocks, wherever they stand. */
function swaps(problem: Problem, start: Solution): Solution {
  let best = start;
  for (let a = 0; a < problem.n; a += 1) {
    for (let b = a + 1; b < problem.n; b += 1) {
      const orders = blocksOf(best).map((order) => order.map((block) => (block === a ? b : block === b ? a : block)));
      const solution = evaluate(problem, orders, best.primary);
      if (solution && better(solution, best)) best = solution;
    }
  }
  return best;
}

function sweep(problem: Problem, start: Solution, length: number, tries: number): { solution: Solution; left: number } {
  let best = start;
  let left = tries;
  for (let b = 0; b < problem.n && left > 0; b += 1) {
    const orders = blocksOf(best);
    const m = orders.findIndex((order) => order.includes(b));
    const from = at(orders, m).indexOf(b);
    if (from + length > at(orders, m).length) continue;
    const moved = at(orders, m).splice(from, length);
    const next = bestPlace(problem, orders, moved, { m, from }, best, left);
    left = next.left;
    best = next.solution;
  }
  return { solution: best, left };
}

function bestPlace(problem: Problem, orders: number[][], moved: number[], origin: { m: number; from: number }, known: Solution, tries: number): { solution: Solution; left: number } {
  let best = known;
  let left = tries;
  for (let m = 0; m < orders.length; m += 1) {
    const order = at(orders, m);
    if (moved.some((b) => !at(problem.machines, m).work[b])) continue;
    for (let place = 0; place <= order.length && left > 0; place += 1) {
      if (m === origin.m && place === origin.from) continue;
      order.splice(place, 0, ...moved);
      const solution = evaluate(problem, orders, best.primary);
      order.splice(place, moved.length);
      left -= 1;
      if (solution && better(solution, best)) best = solution;
    }
  }
  return { solution: best, left };
}
