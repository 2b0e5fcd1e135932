import type { Amounts, Store, Stores } from '../lasting.ts';

/** From `from` up to, not including, `to`; instants in UTC ms. */
export interface Span {
  from: number;
  to: number;
}

/** Getting from one lane to another that isn't its neighbour; a move to the neighbour is part of the time a lane. */
export interface TravelTime {
  fixedMs: number;
  /** For every lane beyond the neighbour. */
  perLaneMs: number;
}

/** One stop that makes stores good: refilling, charging. */
export interface Service {
  id: string;
  ms: number;
  restores: readonly Store[];
}

export interface PlanMachine {
  id: string;
  /** Earliest instant at which it can begin to move. */
  availableFrom: number;
  /** Where it stands; null is its room, one fixed travel from everywhere. */
  atLane: number | null;
  loadedPattern: string | null;
  loadedProduct: string | null;
  travel: TravelTime;
  patternChangeMs: number;
  productChangeMs: number;
  services: readonly Service[];
  /** A store that isn't listed never runs out. */
  stores: Stores;
  /** Nobody to run it, or it is needed elsewhere. */
  away?: readonly Span[];
}

export interface BlockLane {
  lane: number;
  /** The pair is free (release.ts). */
  release: number;
  /** Beyond the time a lane: a broken-off lane is cleaned before it is done again. */
  extraMs?: number;
}

/**
 * Lanes dressed one after the other by one machine with one pattern, in the order given. A lane isn't
 * interrupted; between two lanes the machine may wait.
 */
export interface PlanBlock {
  id: string;
  sessionId: string;
  lanes: readonly BlockLane[];
  warmUp: number;
  pattern: string;
  product: string;
  /** By machine id; a machine that can't lay the pattern is absent. */
  perLaneMs: Readonly<Record<string, number>>;
  /** What a lane takes out of a machine's stores, by machine id. */
  usePerLane?: Readonly<Record<string, Amounts>>;
  /** Play on these lanes in between: no lane of the block is dressed then. */
  closed?: readonly Span[];
}

/**
 * What a person holds fast. `start`: begins exactly then (or when its first lane is free, if later);
 * `machine`; `order`: both on one machine, the first before the second; `first`: next on its machine.
 */
export type Pin =
  | { kind: 'start'; block: string; at: number }
  | { kind: 'machine'; block: string; machine: string }
  | { kind: 'first'; block: string; machine: string }
  | { kind: 'order'; before: string; after: string };

export interface PlanInput {
  now: number;
  /** Lanes are to be ready this long before warm-up. */
  marginMs: number;
  machines: readonly PlanMachine[];
  blocks: readonly PlanBlock[];
  pins?: readonly Pin[];
  /** The plan in force: among equals the new one changes as little as possible. Block ids in order. */
  previous?: readonly { machine: string; blocks: readonly string[] }[];
}

/** In the order in which they count; the next one decides only among equals. */
export interface Criteria {
  /** Sessions with a lane that isn't ready by warm-up less margin. */
  sessionsLate: number;
  /** Sum over sessions of how much later than that the last lane is ready. */
  latenessMs: number;
  /** Sum over lanes of the time from dressed to the session's ready instant (lane-milliseconds). */
  freshnessLostMs: number;
  travelMs: number;
  /** Blocks that stand after another one, or on another machine, than in the previous plan. */
  changes: number;
}

export interface LaneTime {
  lane: number;
  start: number;
  end: number;
}

export interface PlannedBlock {
  block: string;
  session: string;
  /** When the machine must leave for it, what it does on the way. */
  leave: number;
  setupMs: number;
  travelMs: number;
  patternChange: boolean;
  productChange: boolean;
  services: string[];
  start: number;
  end: number;
  lanes: LaneTime[];
  /** Warm-up less margin. */
  due: number;
  /** Begun later than this, in this order, `breaksFirst` isn't ready by its warm-up (or by the instant promised here). */
  latestStart: number;
  breaksFirst: string;
}

export interface MachinePlan {
  machine: string;
  blocks: PlannedBlock[];
}

/** A code with its parameters; wording in text/en/plan.ts. Instants stay numbers. */
export interface Explanation {
  code: PlanCode;
  params: Record<string, number | string>;
}

export type PlanCode =
  | 'late.even-alone' | 'late.waits-for-block' | 'late.lanes-free-at' | 'late.machine-available-at' | 'late.machine-away'
  | 'late.lanes-closed' | 'late.pinned-start' | 'late.pattern-change' | 'late.product-change' | 'late.service' | 'late.travel' | 'late.dressing'
  | 'block.no-machine' | 'block.no-pattern' | 'block.exceeds-store' | 'pins.conflict' | 'stores.run-out';

export interface LateSession {
  session: string;
  byMs: number;
  /** From the late block back to the root. */
  because: Explanation[];
}

export interface Plan {
  machines: MachinePlan[];
  criteria: Criteria;
  /** Which criteria no other plan of these whole blocks can better, each among those equal before it. */
  proven: { sessionsLate: boolean; lateness: boolean; freshness: boolean; travel: boolean };
  /** What no plan can undercut; where `sessionsLate` is reached, lateness among plans that reach it. */
  bound: { sessionsLate: number; latenessMs: number };
  method: 'exact' | 'heuristic';
  late: LateSession[];
  /** Blocks that no plan can hold; their sessions aren't ready. */
  unplanned: { block: string; session: string; because: Explanation[] }[];
}

export const EXACT_BLOCKS = 14;
export const MAX_MACHINES = 3;
