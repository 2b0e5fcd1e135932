import type { LaneState } from '#shared/domain/floor/state.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Topic } from '#shared/realtime/events.ts';
import type { Touched } from './head-store.ts';
import type { TableChanges } from './projection/changes.ts';

/** What of a lane a session's readiness rests on; counts come too often to be told one by one. */
const readinessOf = (lane: LaneState): readonly unknown[] => [
  lane.power, lane.stop, lane.outOfService, lane.dressed, lane.brokenOff, lane.bumpers, lane.use?.from, lane.use?.kind,
];
const differs = (a: readonly unknown[], b: readonly unknown[]): boolean => a.some((value, i) => value !== b[i]);

const TOPIC_OF: Record<string, Topic> = { lane_state: 'floor', lane_use: 'floor', quarter_counter: 'figures', call: 'calls', run: 'runs', run_lane: 'runs' };

/** What screens show otherwise after a unit of work: lanes by number, and topics. */
export function touchedBy(before: House, after: House, changes: readonly TableChanges[], topics: Iterable<Topic>): Touched {
  const touched = new Set<Topic>(topics);
  const lanes = new Set<number>();
  for (const { projection, written, gone } of changes) {
    const topic = TOPIC_OF[projection.table];
    if (topic) touched.add(topic);
    for (const row of [...written, ...gone]) {
      if (projection.table === 'lane_state' && typeof row['lane'] === 'number') lanes.add(row['lane']);
      if (projection.table === 'call') for (const lane of JSON.parse(String(row['lanes_held'])) as number[]) lanes.add(lane);
      if (projection.table === 'call' && typeof row['lane'] === 'number') lanes.add(row['lane']);
    }
  }
  if (before.runs !== after.runs) touched.add('runs');
  for (const lane of underMachines(before, after)) lanes.add(lane);
  const readiness = before.calls !== after.calls || before.runs.active !== after.runs.active || before.runs.ended !== after.runs.ended
    || after.floor.some((lane, i) => lane !== before.floor[i] && differs(readinessOf(lane), before.floor[i] ? readinessOf(before.floor[i]) : []));
  if (readiness) touched.add('sessions');
  return { lanes: [...lanes].sort((a, b) => a - b), topics: [...touched] };
}

/** Lanes of runs that changed: which of them the machine is on follows from the run, no row of the lane says it. */
function underMachines(before: House, after: House): number[] {
  const keys = new Set([...Object.keys(before.runs.active), ...Object.keys(after.runs.active)]);
  const changed = [...keys].filter((key) => before.runs.active[key] !== after.runs.active[key]);
  return changed.flatMap((key) => [...(before.runs.active[key]?.lanes ?? []), ...(after.runs.active[key]?.lanes ?? [])]);
}
