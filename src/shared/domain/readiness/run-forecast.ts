import { pairOf } from '../equipment.ts';
import { paceOf } from '../runs/lane-time.ts';
import type { Run, RunsState } from '../runs/state.ts';
import type { ReadinessSettings } from './settings.ts';
import type { RunOnLane } from './situation.ts';

/** Lanes of a run that it still has to dress, in order. */
export function lanesLeft(run: Run): number[] {
  return (run.lanes ?? []).filter((lane) => !run.done.some((done) => done.lane === lane));
}

/** The run that a machine works on comes first, then planned ones by their start. */
const inOrder = (a: Run, b: Run): number =>
  Number(b.status === 'under-way') - Number(a.status === 'under-way') || (a.plannedStart ?? 0) - (b.plannedStart ?? 0) || a.key.localeCompare(b.key, 'en');

/**
 * When each run reaches and leaves each of its lanes, by its machine's pace. A lane is begun when the machine is there,
 * the plan says so, and both lanes of its pair are free (`pairFreeAt` by the pair's odd lane, ms; null or absent: nothing is in the way).
 */
export function forecastRuns(runs: RunsState, pairFreeAt: ReadonlyMap<number, number>, now: number, settings: ReadinessSettings): RunOnLane[] {
  const free = new Map<string, number>();
  return Object.values(runs.active).sort(inOrder).flatMap((run) => {
    const pace = paceOf(runs, run.machine, settings.usualPaceMs);
    const from = Math.max(free.get(run.machine) ?? 0, beginOf(run, now));
    const lanes = along(run, from, pace, pairFreeAt, now);
    free.set(run.machine, lanes.at(-1)?.doneAt ?? from);
    return lanes;
  });
}

function beginOf(run: Run, now: number): number {
  if (run.status === 'planned') return Math.max(now, run.plannedStart ?? now);
  const lastDone = run.done.reduce<number | null>((last, done) => Math.max(last ?? 0, done.finishedAt ?? 0) || last, null);
  return lastDone ?? run.startedAt ?? now;
}

function along(run: Run, from: number, pace: number, pairFreeAt: ReadonlyMap<number, number>, now: number): RunOnLane[] {
  let at = from;
  return lanesLeft(run).map((lane, index) => {
    const startAt = Math.max(at, pairFreeAt.get(pairOf(lane)) ?? 0);
    const onLane = run.status === 'under-way' && index === 0 && startAt <= now;
    const doneAt = Math.max(now, startAt + pace);
    at = doneAt;
    return {
      key: run.key, run: run.run, machine: run.machine, status: run.status === 'planned' ? 'planned' as const : 'under-way' as const,
      pattern: run.pattern, revision: run.revision, lane, startAt, doneAt, onLane, place: index + 1, lastAt: run.lastAt,
    };
  });
}

/** Of the runs that will dress a lane, the one whose film lies there at warm-up: the last that ends in time, else the first. */
export function runFor(lane: number, forecast: readonly RunOnLane[], warmUpAt: number): RunOnLane | null {
  const mine = forecast.filter((run) => run.lane === lane).sort((a, b) => a.doneAt - b.doneAt);
  return mine.findLast((run) => run.doneAt <= warmUpAt) ?? mine[0] ?? null;
}
