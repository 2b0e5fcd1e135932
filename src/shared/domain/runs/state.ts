/** What became of one lane in a run. Volumes in whole µL; null when the machine didn't say. */
export interface RunLane {
  lane: number;
  outcome: 'dressed' | 'skipped' | 'broken-off';
  startedAt: number | null;
  finishedAt: number | null;
  aUl: number | null;
  bUl: number | null;
  cleanerUl: number | null;
  measured: boolean;
  reason: string | null;
}

export interface Run {
  /** `machine/run/begun`: the machine, the code it gave, and the time of the run's first fact (epoch ms), as machines that count from one every day give a code again. */
  key: string;
  machine: string;
  run: string;
  pattern: string | null;
  revision: number | null;
  /** Lanes in order, when announced. */
  lanes: number[] | null;
  status: 'planned' | 'under-way' | 'finished' | 'aborted' | 'cancelled';
  plannedStart: number | null;
  startedAt: number | null;
  endedAt: number | null;
  reason: string | null;
  entered: 'gateway' | 'hand';
  done: RunLane[];
  lastAt: number;
}

export interface MachineLevels {
  machine: string;
  at: number;
  tankAUl: number | null;
  tankBUl: number | null;
  cleanerUl: number | null;
  wasteUl: number | null;
  batteryPct: number | null;
}

/** `active` = planned or under way, by `machine/run`: one at a time has a code; `ended` since the last checkpoint, oldest first. Replaced, never changed in place. */
export interface RunsState {
  active: Readonly<Record<string, Run>>;
  ended: readonly Run[];
  levels: Readonly<Record<string, MachineLevels>>;
  /** Recent times a lane of each machine, ms, newest last, at most 40: its own pace. */
  paces: Readonly<Record<string, readonly number[]>>;
}

export const emptyRuns: RunsState = { active: {}, ended: [], levels: {}, paces: {} };
