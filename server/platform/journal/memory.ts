import type { Knex } from 'knex';
import { HOUSE_FOLD_VERSION } from '#shared/domain/house/fold.ts';
import { emptyHouse } from '#shared/domain/house/state.ts';
import type { CentreRef } from '../http/route.ts';
import { applied, begunAt, type Day, type Days, houseOf, newDay } from './days.ts';
import { type Head, readCheckpoints } from './head-store.ts';
import { readFacts } from './journal-store.ts';
import type { HouseAt } from './ledger.ts';
import { rebuilt } from './rebuild.ts';
import type { Memory } from './remembered.ts';

export const houseAt = (memory: Memory): HouseAt => ({ state: houseOf(memory.days), seq: memory.seq, epoch: memory.epoch });

/**
 * The memory as of the locked head: as it was; with what another node recorded meanwhile; or loaded from the newest checkpoint and
 * the journal since. Folds of another version than the stored rows: everything is folded anew, under a new epoch.
 */
export async function upToDate(trx: Knex.Transaction, centre: CentreRef, memory: Memory | null, head: Head): Promise<Memory> {
  if (head.foldVersion !== HOUSE_FOLD_VERSION) return rebuilt(trx, centre, head);
  if (!memory || memory.epoch !== head.epoch || memory.seq > head.seq) return loaded(trx, centre, head);
  if (memory.seq === head.seq) return memory;
  const facts = await readFacts(trx, centre.id, { after: memory.seq });
  const earlier = await earlierDays(trx, centre, memory.days, facts[0]?.time ?? Infinity);
  const days = begunAt([...earlier, ...memory.days] as unknown as Days, head.checkpointAt);
  return { ...memory, seq: head.seq, days: applied(days, facts) };
}

async function loaded(trx: Knex.Transaction, centre: CentreRef, head: Head): Promise<Memory> {
  const [checkpoint] = await readCheckpoints(trx, centre.id, 0, Infinity, true);
  const start: Day = checkpoint ? newDay(checkpoint.at, checkpoint.state) : newDay(0, emptyHouse(centre.lanes));
  const facts = await readFacts(trx, centre.id, { from: start.from, to: Infinity });
  return { seq: head.seq, epoch: head.epoch, days: applied([start], facts), lateAt: 0 };
}

/** Days before those in memory, back to an instant, read from their checkpoints and the journal; none when they reach that far. */
export async function earlierDays(trx: Knex.Transaction, centre: CentreRef, days: Days, instant: number): Promise<Day[]> {
  const end = days[0].from;
  if (instant >= end) return [];
  const [start] = await readCheckpoints(trx, centre.id, 0, Math.min(instant + 1, end), true);
  const first = start ? newDay(start.at, start.state) : newDay(0, emptyHouse(centre.lanes));
  const later = await readCheckpoints(trx, centre.id, first.from + 1, end);
  const facts = await readFacts(trx, centre.id, { from: first.from, to: end });
  return [...applied([first, ...later.map((c) => newDay(c.at, c.state))], facts)];
}
