import { at } from './cells.ts';
import type { Bound } from './bound.ts';
import { compile } from './compile.ts';
import { solveExactly, type Solution } from './exact.ts';
import { evaluate } from './evaluate.ts';
import { firstSolution, improve } from './improve.ts';
import type { PlanBlock, PlanInput } from './model.ts';
import type { Problem } from './problem.ts';

/** Groups that are solved exactly before the fine search; more would not be answered at once. */
const GROUPS = 10;

const alike = (a: PlanBlock, b: PlanBlock): boolean =>
  a.sessionId === b.sessionId && a.warmUp === b.warmUp && a.pattern === b.pattern && a.product === b.product &&
  JSON.stringify([a.perLaneMs, a.usePerLane, a.closed, a.lanes.map((lane) => lane.release).at(-1)]) ===
    JSON.stringify([b.perLaneMs, b.usePerLane, b.closed, b.lanes.map((lane) => lane.release)[0]]);

/** Neighbouring blocks of the input that one machine may as well do in one go, as indices. */
function groupsOf(input: PlanInput): number[][] {
  const groups: number[][] = [];
  input.blocks.forEach((block, b) => {
    const last = groups.at(-1);
    if (last && alike(at(input.blocks, at(last, last.length - 1)), block)) last.push(b);
    else groups.push([b]);
  });
  return groups;
}

function merged(input: PlanInput, groups: readonly number[][]): PlanInput {
  const blocks = groups.map((group) => {
    const parts = group.map((b) => at(input.blocks, b));
    return { ...at(parts, 0), lanes: parts.flatMap((part) => part.lanes) };
  });
  const { previous: _, ...rest } = input;
  return { ...rest, blocks };
}

/**
 * A big night solved in the large: neighbours that belong together are joined to at most ten blocks,
 * those are planned exactly, and the answer is read back as an order of the single blocks. Null when
 * the night has too many sessions for that, or pins hold single blocks.
 */
export function coarseSolution(problem: Problem, input: PlanInput, bound: Bound): Solution | null {
  if ((input.pins ?? []).length > 0) return null;
  const groups = groupsOf(input);
  if (groups.length > GROUPS || groups.length === problem.n) return null;
  const large = compile(merged(input, groups));
  const first = firstSolution(large, bound);
  const best = solveExactly(large, first && improve(large, first, 400));
  const orders = best?.orders.map((steps) => steps.flatMap((step) => at(groups, step.block)));
  return orders ? evaluate(problem, orders) : null;
}
