import type { Knex } from 'knex';
import { pastCall, type PastCall } from '#shared/domain/calls/history.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import { type Equipment, pairOf } from '#shared/domain/equipment.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { toBinary } from '#server/platform/db/uuid.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { callFromRow, type CallRow } from '#server/platform/journal/projection/calls.ts';

type Row = CallRow & { centre_id: Buffer };

/** More ended calls of one day than this are no list any more. */
const ENDED_MAX = 500;

/** Ended calls live in the table only; open ones are read from the ledger. */
export function callsReadModel(db: Knex) {
  const closed = (centre: CentreRef, on: Knex = db) => on<Row, Row[]>('call').where({ centre_id: centre.id, status: 'closed' });
  return {
    /** One ended call by its id; inside a unit of work, through its transaction. */
    async find(centre: CentreRef, id: string, on?: Knex): Promise<Call | null> {
      const [row] = await closed(centre, on).where('id', toBinary(id)).limit(1);
      return row ? callFromRow(row) : null;
    },

    /** Ended in [from, to), the newest first. */
    async endedBetween(centre: CentreRef, from: number, to: number): Promise<Call[]> {
      const rows = await closed(centre).where('last_at', '>=', toRowTime(from)).where('last_at', '<', toRowTime(to)).orderBy('last_at', 'desc').limit(ENDED_MAX);
      return rows.map(callFromRow);
    },

    /** Last ended calls of a lane, and of what it shares with its pair, raised before `before`, the newest first. */
    async lastOnLane(centre: CentreRef, lane: number, before: number, limit = 6): Promise<PastCall[]> {
      const rows = await closed(centre)
        .whereIn('lane', [pairOf(lane), pairOf(lane) + 1])
        .where('raised_at', '<', toRowTime(before))
        .whereRaw("(lane = ? or scope = 'pair')", [lane])
        .orderBy('raised_at', 'desc')
        .limit(limit);
      return rows.map((row) => pastCall(callFromRow(row)));
    },

    /** How often each cause ended a call on one kind of equipment since `from`. */
    async causeTimes(centre: CentreRef, equipment: Equipment, from: number): Promise<Record<string, number>> {
      const rows: { cause: string; times: number }[] = await closed(centre)
        .where({ equipment })
        .where('raised_at', '>=', toRowTime(from))
        .whereNotNull('cause')
        .groupBy('cause')
        .select('cause', db.raw('count(*) as times'));
      return Object.fromEntries(rows.map((row) => [row.cause, row.times]));
    },
  };
}
export type CallsReadModel = ReturnType<typeof callsReadModel>;
