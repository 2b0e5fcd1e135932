import type { BookingForm } from '#shared/contracts/leagues.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { invalid, Refusal } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { HouseAt, Ledger, LedgerOptions } from '#server/platform/journal/ledger.ts';
import { checkedLanes, openEvening, refuseTaken, saved } from './guards.ts';
import { bookingEvening, startOf } from './nights.ts';
import type { Evening } from './rows.ts';
import { leagueStore as store } from './store.ts';

/** Judges a move under the lock: the house as it is, and what else is booked over that time. Throws a Refusal. */
export type MoveGuard = (house: HouseAt, now: number, session: Evening, booked: readonly Evening[]) => void;

/** Time that has passed isn't booked any more: nobody could make it ready, and nights that are over keep their figures. */
const pastTime = (date: string): Refusal => new Refusal(409, 'booking.past', { date }, [{ pointer: '/date', code: 'booking.past', params: { date } }]);

/** Single sessions: booked, moved, cancelled. */
export function sessionCommands(ledger: Pick<Ledger, 'decide'>) {
  return {
    book: (centre: CentreRef, form: BookingForm, options?: LedgerOptions): Promise<Evening> =>
      ledger.decide(centre, async (_house, now, trx) => {
        const evening = bookingEvening(form, centre, now);
        if (evening.endAt <= now) throw pastTime(form.date);
        await refuseTaken(trx, centre, [evening], '/fromLane');
        return saved(centre, [evening], evening);
      }, options),

    /** Other lanes or another time for one session; it may begin as it does, or later than now. */
    move: (centre: CentreRef, id: string, to: { lanes: number[]; date: string; startMinutes: number }): Promise<Evening> =>
      ledger.decide(centre, async (_house, now, trx) => {
        const before = await openEvening(trx, centre, id, now);
        const startAt = startOf(to.date, to.startMinutes, centre);
        const by = startAt - before.startAt;
        if (by !== 0 && startAt < now) throw pastTime(to.date);
        const after: Evening = {
          ...before, lanes: checkedLanes(to.lanes, before, centre), startAt, warmUpAt: before.warmUpAt + by, endAt: before.endAt + by,
          date: businessDayAt(startAt, centre.zone, centre.cut).date, changed: true,
        };
        await refuseTaken(trx, centre, [after], '/lanes');
        return saved(centre, [after], after);
      }),

    /** One pair of a session for another; `guard` may refuse for what the house says of the new pair. */
    movePair: (centre: CentreRef, id: string, fromPair: number, toPair: number, guard: MoveGuard): Promise<Evening> =>
      ledger.decide(centre, async (house, now, trx) => {
        const before = await openEvening(trx, centre, id, now);
        const lanes = before.lanes.filter((lane) => lane !== fromPair && lane !== fromPair + 1);
        if (lanes.length === before.lanes.length) throw invalid('readiness.pair-not-of-session', '/fromPair', { pair: fromPair });
        const after: Evening = { ...before, lanes: checkedLanes([...lanes, toPair, toPair + 1], before, centre, '/toPair'), changed: true };
        await refuseTaken(trx, centre, [after], '/toPair');
        guard(house, now, before, await store.bookedBetween(trx, centre.id, now - 86_400_000, before.endAt));
        return saved(centre, [after], after);
      }),

    cancel: (centre: CentreRef, id: string): Promise<Evening> =>
      ledger.decide(centre, async (_house, now, trx) => {
        const after: Evening = { ...(await openEvening(trx, centre, id, now)), status: 'cancelled', changed: true };
        return saved(centre, [after], after);
      }),
  };
}
export type SessionCommands = ReturnType<typeof sessionCommands>;
