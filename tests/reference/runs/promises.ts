import { at } from '#shared/domain/runs/plan/cells.ts';
import type { Plan, PlanInput, PlanMachine, Span } from '#shared/domain/runs/plan/model.ts';

const overlaps = (spans: readonly Span[] | undefined, from: number, to: number): boolean => (spans ?? []).some((span) => span.from < to && from < span.to);

/** Time between two instants in which the machine isn't away. */
function worked(machine: PlanMachine, from: number, to: number): number {
  return (machine.away ?? []).reduce((left, span) => left - Math.max(0, Math.min(to, span.to) - Math.max(from, span.from)), to - from);
}

/**
 * Plays a plan back and lists every promise it breaks: releases, closed and away spans, one thing at a
 * time, set-up done before the start, each lane's own time, due instants of sessions called on time,
 * latest starts not before starts, criteria that add up.
 */
export function brokenPromises(input: PlanInput, plan: Plan): string[] {
  const broken: string[] = [];
  const must = (fine: boolean, what: string): void => void (fine || broken.push(what));
  const lateBy = new Map(plan.late.map((late) => [late.session, late.byMs]));
  const ends = new Map<string, number>();
  let fresh = 0;
  for (const run of plan.machines) {
    const machine = input.machines.find((known) => known.id === run.machine)!;
    let free = Math.max(machine.availableFrom, input.now);
    for (const planned of run.blocks) {
      const block = input.blocks.find((known) => known.id === planned.block)!;
      must(planned.leave >= free, `${planned.block} leaves while the machine is busy`);
      must(worked(machine, planned.leave, planned.start) >= planned.setupMs, `${planned.block} begins before its set-up is done`);
      must(planned.latestStart >= planned.start, `${planned.block} must start before it does`);
      let before = planned.start;
      planned.lanes.forEach((lane, k) => {
        const source = at(block.lanes, k);
        must(lane.lane === source.lane && lane.start >= before && lane.start >= source.release, `${planned.block} lane ${lane.lane} begins too early`);
        must(lane.end - lane.start === (block.perLaneMs[machine.id] ?? NaN) + (source.extraMs ?? 0), `${planned.block} lane ${lane.lane} takes another time`);
        must(!overlaps(machine.away, lane.start, lane.end) && !overlaps(block.closed, lane.start, lane.end), `${planned.block} lane ${lane.lane} lies in a closed span`);
        before = lane.end;
        fresh += block.warmUp - input.marginMs + (lateBy.get(block.sessionId) ?? 0) - lane.end;
      });
      must(before === planned.end, `${planned.block} ends at another time than its last lane`);
      const over = planned.end - (block.warmUp - input.marginMs);
      must(over <= (lateBy.get(block.sessionId) ?? 0), `${planned.block} is later than said`);
      ends.set(planned.block, planned.end);
      free = planned.end;
    }
  }
  must(ends.size + plan.unplanned.length === input.blocks.length, 'a block is missing');
  must(plan.criteria.sessionsLate === plan.late.length, 'sessions late don’t add up');
  must(plan.criteria.latenessMs === plan.late.reduce((sum, late) => sum + late.byMs, 0), 'lateness doesn’t add up');
  must(plan.criteria.freshnessLostMs === fresh, 'freshness doesn’t add up');
  must(plan.late.every((late) => late.because.length > 0), 'a late session without a reason');
  must(plan.bound.sessionsLate <= plan.criteria.sessionsLate, 'fewer late than the bound');
  return broken;
}
