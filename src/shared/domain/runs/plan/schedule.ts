import { at, i32 } from './cells.ts';
import { deadlines, type Solution } from './exact.ts';
import type { Step } from './labels.ts';
import type { MachinePlan, PlanInput, PlannedBlock } from './model.ts';
import type { MachineData, Problem } from './problem.ts';
import { NEVER, placeBackward, retreat, setupSeconds, type Placement } from './timeline.ts';

interface Placed extends Placement {
  leave: number;
  lanes: number[];
}

/** Pushes one machine's order as late as the deadlines allow, last block first; seconds. */
function pushLate(problem: Problem, machine: MachineData, steps: readonly Step[], deadline: Int32Array): Placed[] {
  const placed: Placed[] = [];
  let until = NEVER;
  for (let i = steps.length - 1; i >= 0; i -= 1) {
    const { block, services } = at(steps, i);
    const spot: Placed = { start: 0, end: 0, sumEnds: 0, leave: 0, lanes: [] };
    placeBackward(problem, machine, block, Math.min(until, i32(deadline, block)), spot, spot.lanes);
    spot.leave = retreat(machine.away, spot.start, setupSeconds(problem, machine, i === 0 ? -1 : at(steps, i - 1).block, block, services));
    until = spot.leave;
    placed.unshift(spot);
  }
  return placed;
}

/** A late session keeps its promise instead of its warm-up. */
function promises(problem: Problem, input: PlanInput, due: Int32Array): Int32Array {
  return due.map((promised, b) => Math.max(promised, Math.floor((at(input.blocks, b).warmUp - problem.now) / 1000)));
}

interface Latest {
  start: number;
  breaks: string;
}

/** Latest start of each block in this order, and the session that a later one would break first. */
function latestStarts(problem: Problem, machine: MachineData, steps: readonly Step[], promised: Int32Array): Latest[] {
  const placed = pushLate(problem, machine, steps, promised);
  const latest: Latest[] = [];
  for (let i = steps.length - 1; i >= 0; i -= 1) {
    const { block } = at(steps, i);
    const next = placed[i + 1];
    const held = next !== undefined && next.leave < i32(promised, block);
    latest.unshift({ start: at(placed, i).start, breaks: held ? at(latest, 0).breaks : at(problem.sessions, i32(problem.session, block)) });
  }
  return latest;
}

function plannedBlock(problem: Problem, input: PlanInput, machine: MachineData, pair: { last: number; step: Step }, spot: Placed, latest: Latest): PlannedBlock {
  const { last, step } = pair;
  const block = at(input.blocks, step.block);
  const source = input.machines.find((known) => known.id === machine.id);
  const before = last < 0 ? null : at(input.blocks, last);
  const ms = (seconds: number): number => problem.now + seconds * 1000;
  return {
    block: block.id, session: block.sessionId, leave: ms(spot.leave),
    setupMs: setupSeconds(problem, machine, last, step.block, step.services) * 1000,
    travelMs: i32(machine.travel, (last + 1) * problem.n + step.block) * 1000,
    patternChange: (before ? before.pattern : source?.loadedPattern) !== block.pattern,
    productChange: (before ? before.product : source?.loadedProduct) !== block.product,
    services: machine.services.flatMap((service, k) => ((step.services >> k) & 1 ? [service.id] : [])),
    start: ms(spot.start), end: ms(spot.end),
    lanes: block.lanes.map((lane, k) => ({ lane: lane.lane, start: ms(at(spot.lanes, 2 * k)), end: ms(at(spot.lanes, 2 * k + 1)) })),
    due: ms(i32(problem.due, step.block)), latestStart: ms(latest.start), breaksFirst: latest.breaks,
  };
}

/** A solution as instants: every block begins as late as it may without making a session later than it must be. */
export function schedule(problem: Problem, input: PlanInput, solution: Solution): MachinePlan[] {
  const deadline = deadlines(problem, solution.late);
  const promised = promises(problem, input, deadline);
  return problem.machines.map((machine, m) => {
    const steps = at(solution.orders, m);
    const placed = pushLate(problem, machine, steps, deadline);
    const latest = latestStarts(problem, machine, steps, promised);
    const blocks = steps.map((step, i) => plannedBlock(problem, input, machine, { last: i === 0 ? -1 : at(steps, i - 1).block, step }, at(placed, i), at(latest, i)));
    return { machine: machine.id, blocks };
  });
}
