import { i32 } from './cells.ts';
import type { MachineData, Problem, SpanCells, Work } from './problem.ts';

/** "Can't": later than any plan. */
export const NEVER = 2 ** 30;

/** When a set-up of so many seconds is over, begun at the earliest at `from`; it rests while the machine is away. */
export function advance(away: SpanCells, from: number, seconds: number): number {
  if (seconds === 0 || away.length === 0) return from + seconds;
  let [t, left] = [from, seconds];
  for (let k = 0; k < away.length; k += 2) {
    const [begin, end] = [i32(away, k), i32(away, k + 1)];
    if (end <= t) continue;
    if (begin >= t + left) break;
    left -= Math.max(0, begin - t);
    t = end;
  }
  return t + left;
}

/** The latest instant from which `advance` ends by `until`. */
export function retreat(away: SpanCells, until: number, seconds: number): number {
  if (seconds === 0 || away.length === 0) return until - seconds;
  let [t, left] = [until, seconds];
  for (let k = away.length - 2; k >= 0; k -= 2) {
    const [begin, end] = [i32(away, k), i32(away, k + 1)];
    if (begin >= t) continue;
    if (end <= t - left) break;
    left -= Math.max(0, t - end);
    t = begin;
  }
  return t - left;
}

/** Earliest start ≥ `from` at which an uninterrupted piece fits outside the closed spans. */
export function fitAfter(closed: SpanCells, from: number, seconds: number): number {
  let t = from;
  for (let k = 0; k < closed.length; k += 2) {
    if (i32(closed, k) >= t + seconds) break;
    if (i32(closed, k + 1) > t) t = i32(closed, k + 1);
  }
  return t;
}

/** Latest end ≤ `until` at which an uninterrupted piece fits outside the closed spans. */
export function fitBefore(closed: SpanCells, until: number, seconds: number): number {
  let t = until;
  for (let k = closed.length - 2; k >= 0; k -= 2) {
    if (i32(closed, k + 1) <= t - seconds) break;
    if (i32(closed, k) < t) t = i32(closed, k);
  }
  return t;
}

/** Where a block lies: start of its first lane, end of its last, sum of its lanes' ends. */
export interface Placement {
  start: number;
  end: number;
  sumEnds: number;
}

/** As early as possible from `ready` on; end NEVER when a pinned start has passed. `lanes` collects start, end per lane. */
export function placeForward(problem: Problem, machine: MachineData, b: number, ready: number, out: Placement, lanes?: number[]): void {
  const work = machine.work[b] as Work;
  const pin = i32(problem.pinStart, b);
  if (pin < 0 && work.closed.length === 0 && !lanes) {
    out.start = ready > work.minStart ? ready : work.minStart;
    out.end = out.start + work.total;
    out.sumEnds = 0;
    return;
  }
  if (pin >= 0 && ready > pin) {
    out.end = NEVER;
    return;
  }
  const release = problem.laneRelease[b] as Int32Array;
  let t = Math.max(ready, pin);
  out.sumEnds = 0;
  for (let k = 0; k < release.length; k += 1) {
    const free = Math.max(advance(machine.away, t, i32(work.move, k)), i32(release, k));
    const start = fitAfter(work.closed, free, i32(work.dress, k));
    if (k === 0) {
      if (pin >= 0 && start > pin) {
        out.end = NEVER;
        return;
      }
      out.start = start;
    }
    t = start + i32(work.dress, k);
    out.sumEnds += t;
    lanes?.push(start, t);
  }
  out.end = t;
}

/** As late as possible with its end ≤ `until`; start −NEVER when it doesn't fit after its releases. */
export function placeBackward(problem: Problem, machine: MachineData, b: number, until: number, out: Placement, lanes?: number[]): void {
  const work = machine.work[b] as Work;
  const pin = i32(problem.pinStart, b);
  if (pin >= 0) {
    placeForward(problem, machine, b, pin, out, lanes);
    if (out.end > until) out.start = -NEVER;
    return;
  }
  const count = i32(problem.laneCount, b);
  if (work.closed.length === 0 && !lanes) {
    out.end = until;
    out.start = until - work.total;
    out.sumEnds = count * until - work.tail;
    if (out.start < work.minStart) out.start = -NEVER;
    return;
  }
  placeLanesBackward(problem, machine, b, until, out, lanes);
}

function placeLanesBackward(problem: Problem, machine: MachineData, b: number, until: number, out: Placement, lanes?: number[]): void {
  const work = machine.work[b] as Work;
  const release = problem.laneRelease[b] as Int32Array;
  let t = until;
  out.sumEnds = 0;
  for (let k = release.length - 1; k >= 0; k -= 1) {
    const end = fitBefore(work.closed, t, i32(work.dress, k));
    const start = end - i32(work.dress, k);
    if (start < i32(release, k)) {
      out.start = -NEVER;
      return;
    }
    if (k === release.length - 1) out.end = end;
    out.sumEnds += end;
    out.start = start;
    lanes?.unshift(start, end);
    t = retreat(machine.away, start, i32(work.move, k));
  }
}

/** Seconds of set-up from `previous` (−1: where the machine stands) to `next`, with the services of a bit mask. */
export function setupSeconds(problem: Problem, machine: MachineData, previous: number, next: number, services: number): number {
  let seconds = i32(machine.setup, (previous + 1) * problem.n + next);
  for (let k = 0; services >> k; k += 1) if ((services >> k) & 1) seconds += machine.services[k]?.seconds ?? 0;
  return seconds;
}
