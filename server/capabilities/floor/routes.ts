import { floorContracts as c } from '#shared/contracts/floor.ts';
import { personOf } from '#server/platform/http/person.ts';
import { type CentreRef, type Route, serve } from '#server/platform/http/route.ts';
import type { HouseAt, Ledger } from '#server/platform/journal/ledger.ts';
import { laneDecisions as decide, laneOf, run } from './commands.ts';
import { laneNow, snapshot } from './read-model.ts';
import type { FloorSources } from './sources.ts';

export function floorRoutes(ledger: Ledger, sources: FloorSources): Route[] {
  const shown = (centre: CentreRef, house: HouseAt, lane: number, now: number) => laneNow(sources, centre, house, laneOf(house, lane), now);
  const act = async (centre: CentreRef, lane: number, now: number, decision: Parameters<typeof run>[2]) => ({
    lane: await shown(centre, await run(ledger, centre, decision), lane, now),
  });
  return [
    serve(c.snapshot, async ({ centre, now }) => snapshot(sources, centre, await ledger.read(centre), now)),
    serve(c.open, ({ centre, params, body, actor, now }) => act(centre, params.lane, now, decide.open(params.lane, body, personOf(actor)))),
    serve(c.close, ({ centre, params, actor, now }) => act(centre, params.lane, now, decide.close(params.lane, personOf(actor)))),
    serve(c.outOfService, ({ centre, params, body, actor, now }) => act(centre, params.lane, now, decide.outOfService(params.lane, body.reason, personOf(actor)))),
    serve(c.backInService, ({ centre, params, actor, now }) => act(centre, params.lane, now, decide.backInService(params.lane, personOf(actor)))),
    serve(c.move, async ({ centre, params, body, actor, now }) => {
      const after = await run(ledger, centre, decide.move(params.lane, body.to, personOf(actor)));
      return { from: await shown(centre, after, params.lane, now), to: await shown(centre, after, body.to, now) };
    }),
    serve(c.enter, async ({ centre, params, body, actor }) => {
      await run(ledger, centre, decide.enterCounts(params.lane, body, personOf(actor)));
      return { ok: true as const };
    }),
  ];
}
