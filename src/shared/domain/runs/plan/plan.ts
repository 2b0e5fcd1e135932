import { lowerBound, type Bound } from './bound.ts';
import { coarseSolution } from './coarse.ts';
import { compile } from './compile.ts';
import { solveExactly, type Solution } from './exact.ts';
import { explainLate } from './explain.ts';
import { better, firstSolution, improve } from './improve.ts';
import { EXACT_BLOCKS, MAX_MACHINES, type Criteria, type Plan, type PlanInput } from './model.ts';
import { LATE_SESSION, unpacked, type Problem } from './problem.ts';
import { schedule } from './schedule.ts';
import { screen, type Screened } from './screen.ts';

/** Moves tried before the exact solver takes over, and where it can't. */
const TRIES_BEFORE_EXACT = 600;
const TRIES = 3000;

interface Solved {
  solution: Solution;
  proven: Plan['proven'];
  bound: Plan['bound'];
  method: Plan['method'];
}

function criteriaOf(problem: Problem, solution: Solution): Criteria {
  const { freshness, travel, changes } = unpacked(problem, solution.secondary);
  return {
    sessionsLate: Math.floor(solution.primary / LATE_SESSION),
    latenessMs: (solution.primary % LATE_SESSION) * 1000,
    freshnessLostMs: freshness * 1000, travelMs: travel * 1000, changes,
  };
}

function exactly(problem: Problem, bound: Bound): Solved | null {
  const first = firstSolution(problem, bound);
  const solution = solveExactly(problem, first && improve(problem, first, TRIES_BEFORE_EXACT));
  if (!solution) return null;
  const { sessionsLate, latenessMs } = criteriaOf(problem, solution);
  return {
    solution, method: 'exact', bound: { sessionsLate, latenessMs },
    proven: { sessionsLate: true, lateness: true, freshness: solution.freshProven, travel: solution.freshProven },
  };
}

function heuristically(problem: Problem, input: PlanInput, bound: Bound): Solved | null {
  const found = [firstSolution(problem, bound), coarseSolution(problem, input, bound)].filter((solution) => solution !== null);
  const start = found.reduce<Solution | null>((best, solution) => (better(solution, best) ? solution : best), null);
  if (!start) return null;
  const solution = improve(problem, start, TRIES);
  const { sessionsLate, latenessMs } = criteriaOf(problem, solution);
  const few = sessionsLate === bound.sessionsLate;
  const least = (few ? bound.lateness : bound.latenessOfAny) * 1000;
  return {
    solution, method: 'heuristic', bound: { sessionsLate: bound.sessionsLate, latenessMs: least },
    proven: { sessionsLate: few, lateness: few && latenessMs === least, freshness: false, travel: false },
  };
}

const NOTHING: Criteria = { sessionsLate: 0, latenessMs: 0, freshnessLostMs: 0, travelMs: 0, changes: 0 };

function unsolved(input: PlanInput, unplanned: Screened['unplanned']): Plan {
  const code = (input.pins ?? []).length > 0 ? ('pins.conflict' as const) : ('stores.run-out' as const);
  const rest = input.blocks.map((block) => ({ block: block.id, session: block.sessionId, because: [{ code, params: {} }] }));
  return {
    machines: input.machines.map((machine) => ({ machine: machine.id, blocks: [] })), criteria: NOTHING, method: 'exact', late: [],
    proven: { sessionsLate: false, lateness: false, freshness: false, travel: false }, bound: { sessionsLate: 0, latenessMs: 0 },
    unplanned: [...unplanned, ...rest],
  };
}

/**
 * The order in which a night's lanes are dressed: fewest sessions late, then least total lateness, then
 * least freshness lost, then least travel, then fewest changes against the plan in force. Up to 14 blocks
 * the answer is proven best of all plans of these whole blocks; beyond that it comes with a lower bound.
 * The same input gives the same plan. A what-if is the same call with another input.
 * @throws RangeError with no machine or more than three.
 */
export function makePlan(input: PlanInput): Plan {
  if (input.machines.length < 1 || input.machines.length > MAX_MACHINES) throw new RangeError('one to three machines');
  const screened = screen(input);
  if (screened.input.blocks.length === 0) {
    const empty = unsolved(screened.input, screened.unplanned);
    return { ...empty, proven: { sessionsLate: true, lateness: true, freshness: true, travel: true } };
  }
  const problem = compile(screened.input);
  const placeable = screened.input.blocks.every((_, b) => problem.machines.some((machine) => machine.work[b]));
  if (!placeable) return unsolved(screened.input, screened.unplanned);
  const bound = lowerBound(problem);
  const solved = problem.n <= EXACT_BLOCKS ? exactly(problem, bound) : heuristically(problem, screened.input, bound);
  if (!solved) return unsolved(screened.input, screened.unplanned);
  return {
    machines: schedule(problem, screened.input, solved.solution),
    criteria: criteriaOf(problem, solved.solution),
    proven: solved.proven, bound: solved.bound, method: solved.method,
    late: explainLate(problem, screened.input, solved.solution),
    unplanned: screened.unplanned,
  };
}

/** How far lateness may lie above the best possible, ms; 0 when proven ("within 4 min of the best possible"). */
export const gapMs = (plan: Plan): number => Math.max(0, plan.criteria.latenessMs - plan.bound.latenessMs);

/** What one plan costs against another, criterion by criterion, second less first: the price of a pin. */
export function planCost(first: Plan, second: Plan): Criteria {
  const keys = Object.keys(NOTHING) as (keyof Criteria)[];
  return Object.fromEntries(keys.map((key) => [key, second.criteria[key] - first.criteria[key]])) as unknown as Criteria;
}
