import type { House } from '#shared/domain/house/state.ts';
import type { Run, RunLane } from '#shared/domain/runs/state.ts';
import { json, type Projection, time, unshared } from './rows.ts';

const runsOf = (house: House): Run[] => [...house.runs.ended, ...Object.values(house.runs.active)];
const changed = (house: House, other: House | null): readonly Run[] =>
  other?.runs === house.runs ? [] : unshared(runsOf(house), other ? runsOf(other) : []);

export const runs: Projection = {
  table: 'run',
  key: ['run_key'],
  columns: ['machine', 'run', 'pattern', 'revision', 'lanes', 'status', 'planned_start', 'started_at', 'ended_at', 'reason', 'entered', 'last_at'],
  rows: (house, other) => changed(house, other).map((run) => ({
    run_key: run.key, machine: run.machine, run: run.run, pattern: run.pattern, revision: run.revision, lanes: json(run.lanes), status: run.status,
    planned_start: time(run.plannedStart), started_at: time(run.startedAt), ended_at: time(run.endedAt), reason: run.reason, entered: run.entered,
    last_at: new Date(run.lastAt),
  })),
};

export const runLanes: Projection = {
  table: 'run_lane',
  key: ['run_key', 'lane'],
  columns: ['position', 'outcome', 'started_at', 'finished_at', 'a_ul', 'b_ul', 'cleaner_ul', 'measured', 'reason'],
  rows: (house, other) => changed(house, other).flatMap((run) => run.done.map((lane, position) => ({
    run_key: run.key, lane: lane.lane, position, outcome: lane.outcome, started_at: time(lane.startedAt), finished_at: time(lane.finishedAt),
    a_ul: lane.aUl, b_ul: lane.bUl, cleaner_ul: lane.cleanerUl, measured: lane.measured, reason: lane.reason,
  }))),
};

export interface RunRow {
  run_key: string;
  machine: string;
  run: string;
  pattern: string | null;
  revision: number | null;
  lanes: number[] | null;
  status: Run['status'];
  planned_start: Date | null;
  started_at: Date | null;
  ended_at: Date | null;
  reason: string | null;
  entered: Run['entered'];
  last_at: Date;
}

export interface RunLaneRow {
  run_key: string;
  lane: number;
  position: number;
  outcome: RunLane['outcome'];
  started_at: Date | null;
  finished_at: Date | null;
  a_ul: number | null;
  b_ul: number | null;
  cleaner_ul: number | null;
  measured: boolean;
  reason: string | null;
}

const at = (value: Date | null): number | null => value?.getTime() ?? null;

/** A run as the house had it, from its row and those of its lanes. */
export function runFromRows(row: RunRow, lanes: readonly RunLaneRow[]): Run {
  return {
    key: row.run_key, machine: row.machine, run: row.run, pattern: row.pattern, revision: row.revision, lanes: row.lanes, status: row.status,
    plannedStart: at(row.planned_start), startedAt: at(row.started_at), endedAt: at(row.ended_at), reason: row.reason, entered: row.entered,
    done: [...lanes].sort((a, b) => a.position - b.position).map((lane) => ({
      lane: lane.lane, outcome: lane.outcome, startedAt: at(lane.started_at), finishedAt: at(lane.finished_at), aUl: lane.a_ul, bUl: lane.b_ul,
      cleanerUl: lane.cleaner_ul, measured: lane.measured, reason: lane.reason,
    })),
    lastAt: row.last_at.getTime(),
  };
}
