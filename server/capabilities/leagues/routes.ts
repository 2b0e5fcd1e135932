import type { LeagueView } from '#shared/contracts/leagues.ts';
import { leagueContracts as c } from '#shared/contracts/leagues.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import type { Actor } from '#shared/policy/policy.ts';
import { notFound } from '#server/platform/http/refusal.ts';
import { type CentreRef, type Route, serve } from '#server/platform/http/route.ts';
import type { LeagueCommands } from './commands.ts';
import type { SessionCommands } from './session-commands.ts';
import type { PatternName } from './nights.ts';
import { bookingView, type LeaguesReadModel } from './read-model.ts';

/** Leagues that somebody may see: a secretary's own; null: all. */
export function leaguesSeenBy(actor: Actor, centre: CentreRef): readonly string[] | null {
  const place = actor.kind === 'user' ? actor.memberships.find((membership) => membership.centre === centre.slug) : undefined;
  return place?.role === 'secretary' ? place.leagues : null;
}

export function leagueRoutes(commands: LeagueCommands & SessionCommands, readModel: LeaguesReadModel, patternsOf: (centre: CentreRef) => Promise<readonly PatternName[]>): Route[] {
  const detail = async (centre: CentreRef, id: string, now: number): Promise<{ league: LeagueView; sessions: ReturnType<typeof bookingView>[] }> => {
    const found = await readModel.league(centre, id, now);
    if (!found) throw notFound('league.unknown');
    return found;
  };
  const own = { league: async ({ params }: { params: { league: string } }) => params.league };
  return [
    serve(c.list, async ({ centre, actor, now }) => ({
      leagues: await readModel.leagues(centre, now, leaguesSeenBy(actor, centre)), lanes: centre.lanes, zone: centre.zone,
      patterns: (await patternsOf(centre)).map(({ code, name, revisions }) => ({ code, name, revisions: [...revisions] })),
    })),
    serve(c.see, ({ centre, params, now }) => detail(centre, params.league, now), own),
    serve(c.create, async ({ centre, body, now }) => detail(centre, await commands.create(centre, body), now)),
    serve(c.change, async ({ centre, params, body, now }) => {
      await commands.change(centre, params.league, body);
      return detail(centre, params.league, now);
    }),
    serve(c.end, async ({ centre, params, now }) => {
      await commands.end(centre, params.league);
      return detail(centre, params.league, now);
    }),
    serve(c.bookings, async ({ centre, query, now }) => {
      const date = query.date ?? businessDayAt(now, centre.zone, centre.cut).date;
      return { date, bookings: (await readModel.ofDate(centre, date)).map(bookingView) };
    }),
    serve(c.book, async ({ centre, body }) => bookingView(await commands.book(centre, body))),
    serve(c.move, async ({ centre, params, body }) => bookingView(await commands.move(centre, params.session, body))),
    serve(c.cancel, async ({ centre, params }) => bookingView(await commands.cancel(centre, params.session))),
  ];
}
