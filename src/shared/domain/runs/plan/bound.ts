import { at, f64, i32 } from './cells.ts';
import { lateAlone } from './late.ts';
import { LATE_SESSION, latenessCost, primaryCost, type MachineData, type Problem } from './problem.ts';

/** What no plan undercuts. */
export interface Bound {
  sessionsLate: number;
  /** Seconds; holds for plans with exactly `sessionsLate` late sessions. */
  lateness: number;
  /** Seconds; holds for every plan, however many sessions it makes late. */
  latenessOfAny: number;
  /** Sessions in the order in which the relaxed night finishes them: a good order to begin with. */
  order: number[];
}

/** Sessions looked at together; beyond it they are bounded in groups by due instant. */
const GROUP = 12;

/** Seconds a machine works between two instants. */
function openSeconds(machine: MachineData, from: number, to: number): number {
  let open = Math.max(0, to - from);
  for (let k = 0; k < machine.away.length; k += 2) open -= Math.max(0, Math.min(to, i32(machine.away, k + 1)) - Math.max(from, i32(machine.away, k)));
  return open;
}

/** The night with lanes as a liquid: which end can a set of sessions not undercut? */
class Relaxed {
  /** Distinct releases, latest first. */
  private readonly releases: number[];
  /** Per machine, its quickest lane: no machine finishes lanes faster. */
  private readonly quickest: number[];
  /** Per set and release: lanes free exactly then, and the seconds of the quickest machine for them. */
  private readonly lanes: Int32Array;
  private readonly work: Float64Array;
  readonly ends: Int32Array;

  constructor(
    private readonly problem: Problem,
    sessions: readonly number[],
  ) {
    const blocks = sessions.flatMap((s) => at(problem.sessionBlocks, s));
    this.releases = [...new Set(blocks.flatMap((b) => [...at(problem.laneRelease, b)]))].sort((x, y) => y - x);
    this.quickest = problem.machines.map((machine) => Math.min(...blocks.flatMap((b) => [...(machine.work[b]?.dress ?? [])])));
    const size = (1 << sessions.length) * this.releases.length;
    this.lanes = new Int32Array(size);
    this.work = new Float64Array(size);
    this.ends = new Int32Array(1 << sessions.length);
    sessions.forEach((s, i) => this.addSession(s, 1 << i));
    for (let set = 1; set < this.ends.length; set += 1) this.ends[set] = this.end(set);
  }

  private addSession(s: number, set: number): void {
    const { problem, releases } = this;
    for (const b of at(problem.sessionBlocks, s)) {
      at(problem.laneRelease, b).forEach((release, k) => {
        const cell = set * releases.length + releases.indexOf(release);
        const seconds = Math.min(...problem.machines.map((machine) => machine.work[b]?.dress[k] ?? Infinity));
        this.lanes[cell] = i32(this.lanes, cell) + 1;
        this.work[cell] = f64(this.work, cell) + seconds;
      });
    }
  }

  /** Could the machines do so many lanes, and so much work, between two instants? */
  private enough(from: number, to: number, lanes: number, work: number): boolean {
    let [count, seconds] = [0, 0];
    this.problem.machines.forEach((machine, m) => {
      const open = openSeconds(machine, Math.max(from, machine.available), to);
      seconds += open;
      const quickest = at(this.quickest, m);
      if (quickest < Infinity) count += quickest > 0 ? Math.floor(open / quickest) : lanes;
    });
    return count >= lanes && seconds >= work;
  }

  /** Least instant ≥ `from` by which lanes free at or after `release` can be done. */
  private endFrom(release: number, from: number, lanes: number, work: number): number {
    let [low, step] = [Math.max(from, release), 64];
    if (this.enough(release, low, lanes, work)) return low;
    while (!this.enough(release, low + step, lanes, work)) step *= 2;
    let high = low + step;
    while (low + 1 < high) {
      const middle = Math.floor((low + high) / 2);
      if (this.enough(release, middle, lanes, work)) high = middle;
      else low = middle;
    }
    return high;
  }

  /** Least end of every lane of a set (bit mask over the sessions): preemptive, without travel; needs the smaller sets first. */
  private end(set: number): number {
    const [low, size] = [set & -set, this.releases.length];
    const rest = set ^ low;
    let end = Math.max(i32(this.ends, rest), i32(this.ends, rest === 0 ? 0 : low));
    let [lanes, work] = [0, 0];
    for (let r = 0; r < size; r += 1) {
      const cell = set * size + r;
      if (rest !== 0) {
        this.lanes[cell] = i32(this.lanes, rest * size + r) + i32(this.lanes, low * size + r);
        this.work[cell] = f64(this.work, rest * size + r) + f64(this.work, low * size + r);
      }
      lanes += i32(this.lanes, cell);
      work += f64(this.work, cell);
      if (i32(this.lanes, cell) > 0) end = this.endFrom(at(this.releases, r), end, lanes, work);
    }
    return end;
  }
}

interface GroupBound {
  cost: number;
  latenessOfAny: number;
  order: number[];
}

/** Least cost of the relaxed night for one group: whichever session ends k-th ends no earlier than the first k together can. */
function groupBound(problem: Problem, sessions: readonly number[], alone: Int32Array): GroupBound {
  const relaxed = new Relaxed(problem, sessions);
  const sets = 1 << sessions.length;
  const cost = new Float64Array(sets).fill(Infinity);
  const any = new Float64Array(sets).fill(Infinity);
  const last = new Int32Array(sets);
  [cost[0], any[0]] = [0, 0];
  const due = sessions.map((s) => Math.max(...at(problem.sessionBlocks, s).map((b) => i32(problem.due, b))));
  for (let set = 1; set < sets; set += 1) {
    const end = i32(relaxed.ends, set);
    for (let i = 0; i < sessions.length; i += 1) {
      if (!((set >> i) & 1)) continue;
      const late = Math.max(i32(alone, at(sessions, i)), end - at(due, i));
      const total = f64(cost, set ^ (1 << i)) + latenessCost(late);
      if (total < f64(cost, set)) [cost[set], last[set]] = [total, i];
      any[set] = Math.min(f64(any, set), f64(any, set ^ (1 << i)) + late);
    }
  }
  const order: number[] = [];
  for (let set = sets - 1; set > 0; set ^= 1 << i32(last, set)) order.unshift(at(sessions, i32(last, set)));
  return { cost: f64(cost, sets - 1), latenessOfAny: f64(any, sets - 1), order };
}

/**
 * Lower bound: lanes may be interrupted and shared between machines at will, travel and changes cost
 * nothing, a machine is never slower than its quickest lane. Over the order in which sessions end, by
 * dynamic programming; more than 12 sessions are cut into groups by due instant, each alone on the machines.
 */
export function lowerBound(problem: Problem): Bound {
  const alone = lateAlone(problem);
  const dueOf = (s: number): number => Math.min(...at(problem.sessionBlocks, s).map((b) => i32(problem.due, b)));
  const byDue = problem.sessions.map((_, s) => s).sort((a, b) => dueOf(a) - dueOf(b) || a - b);
  const groups: GroupBound[] = [];
  for (let from = 0; from < byDue.length; from += GROUP) groups.push(groupBound(problem, byDue.slice(from, from + GROUP), alone));
  const cost = Math.max(primaryCost(alone), groups.reduce((sum, group) => sum + group.cost, 0));
  return {
    sessionsLate: Math.floor(cost / LATE_SESSION),
    lateness: cost % LATE_SESSION,
    latenessOfAny: groups.reduce((sum, group) => sum + group.latenessOfAny, 0),
    order: groups.flatMap((group) => group.order),
  };
}
