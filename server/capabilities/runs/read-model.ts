import type { Knex } from 'knex';
import type { Run } from '#shared/domain/runs/state.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { runFromRows, type RunLaneRow, type RunRow } from '#server/platform/journal/projection/runs.ts';

/** Runs that began, ended or were last heard of in a span, oldest first. */
export async function runsWithin(db: Knex, centreId: Buffer, from: number, to: number): Promise<Run[]> {
  const rows = (await db('run').where({ centre_id: centreId }).where('last_at', '>=', toRowTime(from)).where('last_at', '<', toRowTime(to)).orderBy('last_at')) as RunRow[];
  return withLanes(db, centreId, rows);
}

/** The run that had a machine's code last. */
export async function runByCode(db: Knex, centreId: Buffer, machine: string, run: string): Promise<Run | null> {
  const rows = (await db('run').where({ centre_id: centreId, machine, run }).orderBy('last_at', 'desc').limit(1)) as RunRow[];
  return (await withLanes(db, centreId, rows))[0] ?? null;
}

async function withLanes(db: Knex, centreId: Buffer, rows: RunRow[]): Promise<Run[]> {
  if (rows.length === 0) return [];
  const lanes = (await db('run_lane').where({ centre_id: centreId }).whereIn('run_key', rows.map((r) => r.run_key))) as RunLaneRow[];
  return rows.map((row) => runFromRows(row, lanes.filter((lane) => lane.run_key === row.run_key)));
}

/** Lanes that each machine has dressed, ever. */
export async function lanesDressed(db: Knex, centreId: Buffer): Promise<Map<string, number>> {
  const rows = await db('run_lane')
    .join('run', (on) => { on.on('run.centre_id', 'run_lane.centre_id').andOn('run.run_key', 'run_lane.run_key'); })
    .where({ 'run_lane.centre_id': centreId, 'outcome': 'dressed' })
    .groupBy('run.machine')
    .select<{ machine: string; lanes: number }[]>('run.machine', db.raw('count(*) as lanes'));
  return new Map(rows.map((row) => [row.machine, Number(row.lanes)]));
}
