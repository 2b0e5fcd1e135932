import type { Knex } from 'knex';
import type { CountKind, LaneUseKind } from '#shared/domain/equipment.ts';
import type { Span } from '#shared/domain/numbers/spans.ts';
import type { LaneNight, NightInput } from '#shared/domain/numbers/night/input.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { callFromRow, type CallRow } from '#server/platform/journal/projection/calls.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';

interface UseRow {
  lane: number;
  kind: LaneUseKind;
  from_at: Date;
  to_at: Date | null;
  last_delivery_at: Date | null;
}
interface OutRow {
  lane: number;
  from_at: Date;
  to_at: Date | null;
}
interface CounterRow {
  lane: number;
  quarter_at: Date;
  kind: CountKind;
  opened: number;
  deliveries: number;
  cycles: number;
  frames: number;
  frames_estimated: number;
  games: number;
}
interface DressedRow {
  lane: number;
  started_at: Date;
  finished_at: Date;
  a_ul: number | null;
  b_ul: number | null;
}

/** Everything the tables hold of one business day, lane by lane, and its calls. */
export async function nightRows(db: Knex, centre: CentreRef, day: Span): Promise<Pick<NightInput, 'lanes' | 'calls'>> {
  const [from, to] = [toRowTime(day.from), toRowTime(day.to)];
  const within = (table: string) => db(table).where({ centre_id: centre.id }).where('from_at', '<', to).where((q) => { void q.whereNull('to_at').orWhere('to_at', '>', from); });
  const [uses, outs, counters, dressed, calls] = await Promise.all([
    within('lane_use') as unknown as Promise<UseRow[]>,
    within('lane_out') as unknown as Promise<OutRow[]>,
    db('quarter_counter').where({ centre_id: centre.id }).where('quarter_at', '>=', from).where('quarter_at', '<', to) as unknown as Promise<CounterRow[]>,
    db('run_lane').where({ centre_id: centre.id, outcome: 'dressed' }).where('finished_at', '>', from).where('finished_at', '<=', to) as unknown as Promise<DressedRow[]>,
    callsWithin(db, centre, from, to),
  ]);
  const lanes = Array.from({ length: centre.lanes }, (_, i): LaneNight => {
    const lane = i + 1;
    const of = <R extends { lane: number }>(rows: R[]): R[] => rows.filter((row) => row.lane === lane);
    return {
      lane,
      uses: of(uses).map((u) => ({ kind: u.kind, from: u.from_at.getTime(), to: u.to_at?.getTime() ?? null, lastDeliveryAt: u.last_delivery_at?.getTime() ?? null })),
      outs: of(outs).map((o) => ({ from: o.from_at.getTime(), to: o.to_at?.getTime() ?? null })),
      counts: of(counters).map((c) => ({
        quarter: c.quarter_at.getTime(), kind: c.kind, opened: Number(c.opened), deliveries: c.deliveries, cycles: c.cycles, frames: c.frames,
        framesEstimated: c.frames_estimated, games: c.games,
      })),
      dressings: of(dressed).map((d) => ({ from: d.started_at.getTime(), to: d.finished_at.getTime(), ul: d.a_ul === null ? null : d.a_ul + (d.b_ul ?? 0) })),
    };
  });
  return { lanes, calls };
}

/** Raised in the span, or raised in the week before it and still standing or out of service in it. */
async function callsWithin(db: Knex, centre: CentreRef, from: Date, to: Date): Promise<NightInput['calls']> {
  const weekBefore = new Date(from.getTime() - 7 * 86_400_000);
  const rows = (await db('call')
    .where({ centre_id: centre.id })
    .where('raised_at', '>=', weekBefore)
    .where('raised_at', '<', to)
    .where((q) => { void q.where('raised_at', '>=', from).orWhereNot('status', 'closed').orWhere('last_at', '>', from); })
    .orderBy('raised_at')) as CallRow[];
  return rows.map(callFromRow);
}

export interface LaneWeeks {
  lane: number;
  frames: number;
  stops: number;
}

/** Scored frames by lane over a span, warm-up left out, and the calls on pinsetters raised in it. */
export async function laneWeeks(db: Knex, centre: CentreRef, span: Span): Promise<{ frames: Map<number, number>; calls: NightInput['calls'] }> {
  const [from, to] = [toRowTime(span.from), toRowTime(span.to)];
  const sums = await db('quarter_counter')
    .where({ centre_id: centre.id })
    .where('quarter_at', '>=', from)
    .where('quarter_at', '<', to)
    .whereNot('kind', 'warmup')
    .groupBy('lane')
    .select<{ lane: number; frames: number }[]>('lane', db.raw('cast(sum(frames) as signed) as frames'));
  const rows = (await db('call').where({ centre_id: centre.id, equipment: 'pinsetter' }).where('raised_at', '>=', from).where('raised_at', '<', to)) as CallRow[];
  return { frames: new Map(sums.map((s) => [s.lane, Number(s.frames)])), calls: rows.map(callFromRow) };
}
