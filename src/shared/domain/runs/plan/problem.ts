import type { Store } from '../lasting.ts';

/** Whole seconds from `now`; spans sorted, disjoint, as from, to, from, to … */
export type SpanCells = Int32Array;

/** One block on one machine. */
export interface Work {
  /** Per lane: seconds of moving before it, and of dressing. */
  move: Int32Array;
  dress: Int32Array;
  total: number;
  /** Sum over lanes of the seconds from the lane's end to the block's end, when nothing interrupts. */
  tail: number;
  /** Latest first start that waits for no lane; earliest possible end. */
  minStart: number;
  minEnd: number;
  /** Closed lanes and machine away, together; empty means the short formulas hold. */
  closed: SpanCells;
  travel: number;
  /** Per store of the problem. */
  use: Int32Array;
}

export interface MachineData {
  id: string;
  available: number;
  away: SpanCells;
  /** Per block; null: can't, or a pin says elsewhere. */
  work: (Work | null)[];
  /** [(previous + 1) × n + next] seconds; previous −1 is where the machine stands. */
  setup: Int32Array;
  travel: Int32Array;
  change: Int32Array;
  services: { id: string; seconds: number; restores: boolean[] }[];
  /** Per store: at first, and when full; both above the reserve. */
  level: Int32Array;
  full: Int32Array;
  /** A block that must come first; −1: none. */
  first: number;
}

/** A plan's input in whole numbers. Blocks, machines and sessions are indices. */
export interface Problem {
  n: number;
  now: number;
  machines: MachineData[];
  laneCount: Int32Array;
  laneRelease: Int32Array[];
  session: Int32Array;
  sessions: string[];
  sessionBlocks: number[][];
  due: Int32Array;
  /** Exact start asked by a person; −1: none. */
  pinStart: Int32Array;
  /** Blocks that must stand earlier on the same machine. */
  after: number[][];
  /** Whether any block has such a pin. */
  ordered: boolean;
  stores: Store[];
  /** Multipliers that pack (freshness, travel, changes) into one safe integer, in that order. */
  pack: { travel: number; change: number };
}

/** Sessions late first, then total lateness: one safe integer. */
export const LATE_SESSION = 2 ** 40;

export const latenessCost = (seconds: number): number => (seconds > 0 ? LATE_SESSION + seconds : 0);

/** Cost of the lateness of every session, seconds. */
export function primaryCost(late: ArrayLike<number>): number {
  let cost = 0;
  for (let s = 0; s < late.length; s += 1) cost += latenessCost(late[s] ?? 0);
  return cost;
}

export const packed = (problem: Problem, freshness: number, travel: number, changes: number): number =>
  (freshness * problem.pack.travel + travel) * problem.pack.change + changes;

export function unpacked(problem: Problem, cost: number): { freshness: number; travel: number; changes: number } {
  const changes = cost % problem.pack.change;
  const rest = (cost - changes) / problem.pack.change;
  const travel = rest % problem.pack.travel;
  return { freshness: (rest - travel) / problem.pack.travel, travel, changes };
}
