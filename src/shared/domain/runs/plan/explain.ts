import { at, i32 } from './cells.ts';
import type { Solution } from './exact.ts';
import type { Step } from './labels.ts';
import { lateAlone } from './late.ts';
import type { Explanation, LateSession, PlanInput } from './model.ts';
import type { MachineData, Problem } from './problem.ts';
import { advance, placeForward, setupSeconds, type Placement } from './timeline.ts';

interface Stop extends Placement {
  step: Step;
  last: number;
  leave: number;
  ready: number;
  lanes: number[];
}

/** One machine's order as early as it can be: what a late session waits for is visible only there. */
function earliest(problem: Problem, machine: MachineData, steps: readonly Step[]): Stop[] {
  const stops: Stop[] = [];
  let [time, last] = [machine.available, -1];
  for (const step of steps) {
    const ready = advance(machine.away, time, setupSeconds(problem, machine, last, step.block, step.services));
    const stop: Stop = { start: 0, end: 0, sumEnds: 0, step, last, leave: time, ready, lanes: [] };
    placeForward(problem, machine, step.block, ready, stop, stop.lanes);
    stops.push(stop);
    [time, last] = [stop.end, step.block];
  }
  return stops;
}

/** What made the machine wait at this block, if it did: the chain of causes ends here. */
function waitedFor(problem: Problem, input: PlanInput, machine: MachineData, stop: Stop): Explanation | null {
  const { block } = stop.step;
  const source = at(input.blocks, block);
  const ms = (seconds: number): number => problem.now + seconds * 1000;
  if (i32(problem.pinStart, block) >= 0 && stop.start > stop.ready) return { code: 'late.pinned-start', params: { block: source.id, at: ms(stop.start) } };
  const work = machine.work[block];
  for (let k = source.lanes.length - 1; k >= 0 && work; k -= 1) {
    const start = at(stop.lanes, 2 * k);
    const arrive = advance(machine.away, k === 0 ? stop.ready : at(stop.lanes, 2 * k - 1), i32(work.move, k));
    if (start === arrive) continue;
    const release = i32(at(problem.laneRelease, block), k);
    if (start === release) return { code: 'late.lanes-free-at', params: { block: source.id, lane: at(source.lanes, k).lane, at: ms(release) } };
    const away = (input.machines.find((known) => known.id === machine.id)?.away ?? []).some((span) => span.to === ms(start));
    return away
      ? { code: 'late.machine-away', params: { machine: machine.id, until: ms(start) } }
      : { code: 'late.lanes-closed', params: { block: source.id, lane: at(source.lanes, k).lane, until: ms(start) } };
  }
  return null;
}

/** Set-up on the way to this block that costs time. */
function wayCosts(problem: Problem, input: PlanInput, machine: MachineData, stop: Stop): Explanation[] {
  const source = input.machines.find((known) => known.id === machine.id);
  const block = at(input.blocks, stop.step.block);
  const before = stop.last < 0 ? null : at(input.blocks, stop.last);
  const found: Explanation[] = [];
  if (source && source.patternChangeMs > 0 && (before ? before.pattern : source.loadedPattern) !== block.pattern) {
    found.push({ code: 'late.pattern-change', params: { ms: source.patternChangeMs, pattern: block.pattern } });
  }
  if (source && source.productChangeMs > 0 && (before ? before.product : source.loadedProduct) !== block.product) {
    found.push({ code: 'late.product-change', params: { ms: source.productChangeMs, product: block.product } });
  }
  machine.services.forEach((service, k) => {
    if ((stop.step.services >> k) & 1) found.push({ code: 'late.service', params: { ms: service.seconds * 1000, service: service.id } });
  });
  const travel = i32(machine.travel, (stop.last + 1) * problem.n + stop.step.block);
  if (travel > 0) found.push({ code: 'late.travel', params: { ms: travel * 1000, machine: machine.id } });
  const setup = setupSeconds(problem, machine, stop.last, stop.step.block, stop.step.services);
  if (stop.ready > stop.leave + setup) found.push({ code: 'late.machine-away', params: { machine: machine.id, until: problem.now + (stop.ready - setup) * 1000 } });
  return found;
}

function chain(problem: Problem, input: PlanInput, machine: MachineData, stops: readonly Stop[], from: number): Explanation[] {
  const because: Explanation[] = [];
  for (let i = from; i >= 0; i -= 1) {
    const stop = at(stops, i);
    if (i < from) {
      const block = at(input.blocks, stop.step.block);
      because.push({ code: 'late.waits-for-block', params: { block: block.id, session: block.sessionId, machine: machine.id, until: problem.now + stop.end * 1000 } });
    }
    const wait = waitedFor(problem, input, machine, stop);
    if (wait) return [...because, wait];
    because.push(...wayCosts(problem, input, machine, stop));
  }
  if (machine.available > 0) because.push({ code: 'late.machine-available-at', params: { machine: machine.id, at: problem.now + machine.available * 1000 } });
  const stop = at(stops, from);
  if (because.length === 0) because.push({ code: 'late.dressing', params: { machine: machine.id, ms: (stop.end - stop.start) * 1000 } });
  return because;
}

/** Each late session with its reasons, from its last block back to the root. */
export function explainLate(problem: Problem, input: PlanInput, solution: Solution): LateSession[] {
  const alone = lateAlone(problem);
  const stops = problem.machines.map((machine, m) => earliest(problem, machine, at(solution.orders, m)));
  return problem.sessions.flatMap((session, s) => {
    const by = i32(solution.late, s);
    if (by <= 0) return [];
    const because: Explanation[] = by === i32(alone, s) ? [{ code: 'late.even-alone', params: { session } }] : [];
    stops.forEach((list, m) => {
      const from = list.findIndex((stop) => i32(problem.session, stop.step.block) === s && stop.end - i32(problem.due, stop.step.block) === by);
      if (from >= 0 && because.length < 2) because.push(...chain(problem, input, at(problem.machines, m), list, from));
    });
    return [{ session, byMs: by * 1000, because }];
  });
}
