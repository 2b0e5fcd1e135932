import { readinessContracts as c } from '#shared/contracts/readiness.ts';
import { leaguesSeenBy } from '#server/capabilities/leagues/index.ts';
import { type CentreRef, type Route, serve } from '#server/platform/http/route.ts';
import type { ReadinessCommands } from './commands.ts';
import type { ReadinessScreen } from './screen.ts';
import type { ReadinessSources } from './sources.ts';
import type { Weights } from './store.ts';

/** A session of no league, or none at all: no secretary's matter. */
const NOBODYS = 'none';

export function readinessRoutes(commands: ReadinessCommands, screen: ReadinessScreen, leagues: ReadinessSources['leagues'], weightsOf: (centre: CentreRef) => Promise<Weights>): Route[] {
  const own = {
    league: async ({ centre, params }: { centre: CentreRef; params: { session: string } }) => (await leagues.session(centre, params.session))?.leagueId ?? NOBODYS,
  };
  return [
    serve(c.list, ({ centre, actor, query, now }) => screen.list(centre, query.date, leaguesSeenBy(actor, centre), now)),
    serve(c.see, ({ centre, params, now }) => screen.see(centre, params.session, now), own),
    serve(c.confirm, async ({ centre, actor, params, now }) => {
      await commands.confirm(centre, actor, params.session);
      return screen.see(centre, params.session, now);
    }, own),
    serve(c.concern, async ({ centre, actor, params, body, now }) => {
      await commands.raise(centre, actor, params.session, { text: body.text, lane: body.lane ?? null });
      return screen.see(centre, params.session, now);
    }, own),
    serve(c.settle, async ({ centre, actor, params, body, now }) => {
      await commands.settle(centre, actor, params.session, params.concern, body.note);
      return screen.see(centre, params.session, now);
    }),
    serve(c.move, async ({ centre, params, body, now }) => {
      await commands.move(centre, params.session, body);
      return screen.see(centre, params.session, now);
    }),
    serve(c.weights, async ({ centre }) => ({ weights: await weightsOf(centre) })),
    serve(c.setWeights, async ({ centre, body }) => {
      await commands.setWeights(centre, body.weights);
      return { weights: await weightsOf(centre) };
    }),
  ];
}
