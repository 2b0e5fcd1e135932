import { pairsOf } from '#shared/domain/leagues/lanes.ts';
import { firstOverlap } from '#shared/domain/leagues/overlap.ts';
import { conflict, invalid, notFound, Refusal } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Decision, Ledger } from '#server/platform/journal/ledger.ts';
import type { Evening } from './rows.ts';
import { leagueStore as store } from './store.ts';

export type Trx = Parameters<Parameters<Ledger['decide']>[1]>[2];

/** A decision that writes sessions, and what goes with them; it is no fact of the journal. */
export const saved = <R>(centre: CentreRef, evenings: readonly Evening[], result: R, also?: (trx: Trx) => Promise<void>): Decision<R> => ({
  facts: [], topics: ['leagues', 'sessions'], result: () => result,
  write: async (trx) => {
    await also?.(trx);
    await store.saveEvenings(trx, centre.id, evenings);
  },
});

export async function openLeague(trx: Trx, centre: CentreRef, id: string): Promise<void> {
  const league = await store.league(trx, centre.id, id);
  if (!league) throw notFound('league.unknown');
  if (league.endedAt !== null) throw conflict('league.ended', { at: league.endedAt });
}

export async function openEvening(trx: Trx, centre: CentreRef, id: string, now: number): Promise<Evening> {
  const evening = await store.evening(trx, centre.id, id);
  if (!evening) throw notFound('booking.unknown');
  if (evening.status === 'cancelled') throw conflict('booking.cancelled');
  if (evening.endAt <= now) throw conflict('booking.past');
  return evening;
}

export function checkedLanes(given: readonly number[], evening: Evening, centre: CentreRef, pointer = '/lanes'): number[] {
  const lanes = [...new Set(given)].sort((a, b) => a - b);
  if (lanes.some((lane) => lane < 1 || lane > centre.lanes)) throw invalid('league.lanes-outside-house', pointer, { from: lanes[0] ?? 0, to: lanes.at(-1) ?? 0, house: centre.lanes });
  const whole = lanes.length === 2 * pairsOf(lanes).length;
  if (evening.kind === 'league' && !whole) throw invalid('league.lanes-whole-pairs', pointer, { from: lanes[0] ?? 0, to: lanes.at(-1) ?? 0 });
  return lanes;
}

/** Refuses what somebody else has booked, naming the earliest one. */
export async function refuseTaken(trx: Trx, centre: CentreRef, evenings: readonly Evening[], pointer: string): Promise<void> {
  const wanted = evenings.filter((evening) => evening.status === 'booked');
  if (wanted.length === 0) return;
  const ids = new Set(evenings.map((evening) => evening.id));
  const from = Math.min(...wanted.map((evening) => evening.warmUpAt));
  const to = Math.max(...wanted.map((evening) => evening.endAt));
  const others = (await store.bookedBetween(trx, centre.id, from, to)).filter((other) => !ids.has(other.id));
  const asBooked = (evening: Evening) => ({ id: evening.id, lanes: evening.lanes, from: evening.warmUpAt, to: evening.endAt });
  for (const evening of wanted) {
    const found = firstOverlap(asBooked(evening), [...others, ...wanted].map(asBooked));
    if (!found) continue;
    const other = [...others, ...wanted].find((one) => one.id === found.other.id);
    const params = { name: other?.name ?? '', from: found.lanes[0] ?? 0, to: found.lanes.at(-1) ?? 0, date: other?.date ?? '' };
    throw new Refusal(409, 'league.lanes-taken', params, [{ pointer, code: 'league.lanes-taken', params }]);
  }
}
