import type { LeagueForm } from '#shared/contracts/leagues.ts';
import { newId } from '#server/platform/db/uuid.ts';
import { invalid } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger, LedgerOptions } from '#server/platform/journal/ledger.ts';
import { openLeague, refuseTaken, saved } from './guards.ts';
import { checkedNights, type PatternName, seasonEvenings } from './nights.ts';
import { leagueStore as store } from './store.ts';

/** Leagues and their seasons. Each writer decides under the centre's lock, so that no two bookings ever hold one lane at one moment. */
export function leagueCommands(ledger: Pick<Ledger, 'decide'>, patternsOf: (centre: CentreRef) => Promise<readonly PatternName[]>) {
  return {
    async create(centre: CentreRef, form: LeagueForm, options?: LedgerOptions): Promise<string> {
      const nights = checkedNights(form, centre, await patternsOf(centre));
      return ledger.decide(centre, async (_house, now, trx) => {
        if (await store.nameTaken(trx, centre.id, form.name, null)) throw invalid('league.name-taken', '/name', { name: form.name });
        const id = newId(now);
        const evenings = seasonEvenings(id, form, nights, [], centre, now);
        await refuseTaken(trx, centre, evenings, '/fromLane');
        return saved(centre, evenings, id, (own) => store.insertLeague(own, centre.id, id, form, now));
      }, options);
    },

    async change(centre: CentreRef, id: string, form: LeagueForm): Promise<void> {
      const patterns = await patternsOf(centre);
      return ledger.decide(centre, async (_house, now, trx) => {
        await openLeague(trx, centre, id);
        const nights = checkedNights(form, centre, patterns);
        if (await store.nameTaken(trx, centre.id, form.name, id)) throw invalid('league.name-taken', '/name', { name: form.name });
        const evenings = seasonEvenings(id, form, nights, await store.eveningsOfLeague(trx, centre.id, id), centre, now);
        await refuseTaken(trx, centre, evenings, '/fromLane');
        return saved(centre, evenings, undefined, (own) => store.updateLeague(own, centre.id, id, form));
      });
    },

    end: (centre: CentreRef, id: string): Promise<void> =>
      ledger.decide(centre, async (_house, now, trx) => {
        await openLeague(trx, centre, id);
        const ahead = (await store.eveningsOfLeague(trx, centre.id, id)).filter((evening) => evening.status === 'booked' && evening.warmUpAt > now);
        return saved(centre, ahead.map((evening) => ({ ...evening, status: 'cancelled' as const })), undefined, (own) => store.endLeague(own, centre.id, id, now));
      }),
  };
}
export type LeagueCommands = ReturnType<typeof leagueCommands>;
