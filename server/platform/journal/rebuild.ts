import type { Knex } from 'knex';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { HOUSE_FOLD_VERSION } from '#shared/domain/house/fold.ts';
import type { Fact } from '#shared/domain/journal/fact.ts';
import { newId } from '../db/uuid.ts';
import type { CentreRef } from '../http/route.ts';
import { applied, begun, type Days, firstDays, lastOf } from './days.ts';
import { type Head, saveCheckpoints, saveHead } from './head-store.ts';
import { groupedBy } from './grouped.ts';
import { readFacts } from './journal-store.ts';
import type { Memory } from './remembered.ts';
import { changesBetween, PROJECTIONS, writeChanges } from './projection/changes.ts';

/** Journal read at once, ms of event time: a fortnight of a busy house is some 300,000 facts. */
const PIECE_MS = 14 * 24 * 3_600_000;

async function* wholeJournal(db: Knex, centre: CentreRef): AsyncGenerator<Fact[]> {
  const ends = await db('journal').where({ centre_id: centre.id, status: 'applied' }).min<Date | null>({ from: 'time_at' }).max({ to: 'time_at' });
  const [span] = ends as unknown as { from: Date | null; to: Date | null }[];
  if (!span?.from || !span.to) return;
  for (let from = span.from.getTime(); from <= span.to.getTime(); from += PIECE_MS) yield await readFacts(db, centre.id, { from, to: from + PIECE_MS });
}

/** The journal folded from its beginning, day by day; `each` sees what a day's facts made of the day before. */
export async function replay(db: Knex, centre: CentreRef, each: (before: Days, after: Days, facts: readonly Fact[]) => Promise<void> | void): Promise<Days> {
  let days = firstDays(centre.lanes);
  for await (const piece of wholeJournal(db, centre)) {
    for (const facts of groupedBy(piece, (fact) => businessDayAt(fact.time, centre.zone, centre.cut).from).values()) {
      const before: Days = [lastOf(begun([lastOf(days)], centre, facts[0]?.time ?? 0))];
      days = applied(before, facts);
      await each(before, days, facts);
    }
  }
  return days;
}

/** Folds the whole journal anew under the centre's lock: every row written afresh, a new epoch for the screens. */
export async function rebuilt(trx: Knex.Transaction, centre: CentreRef, head: Head): Promise<Memory> {
  for (const { table } of PROJECTIONS) await trx.raw(`delete from \`${table}\` where centre_id = ?`, [centre.id]);
  await trx.raw('delete from stream_checkpoint where centre_id = ?', [centre.id]);
  const days = await replay(trx, centre, async (before, after) => {
    await writeChanges(trx, centre.id, head.seq, changesBetween(before, after));
    const { from, timeline } = after[0];
    if (from > 0) await saveCheckpoints(trx, centre.id, [{ at: from, state: timeline.base }], from);
  });
  const next = { seq: head.seq, epoch: newId(), foldVersion: HOUSE_FOLD_VERSION, checkpointAt: lastOf(days).from };
  await saveHead(trx, centre, next);
  return { seq: next.seq, epoch: next.epoch, days, lateAt: 0 };
}
