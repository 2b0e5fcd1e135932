import type { FloorDelta } from '#shared/contracts/floor.ts';
import type { Topic } from '#shared/realtime/events.ts';
import type { Clock } from '#server/platform/clock.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { changes } from './read-model.ts';
import { floorRoutes } from './routes.ts';
import type { FloorSources } from './sources.ts';

export { laneUnderMachine } from './lane-view.ts';
export type { FloorSources, PatternFacts } from './sources.ts';

export interface Floor {
  routes: Route[];
  /** For the relay: what of the floor changed, as it is now. */
  delta(centre: CentreRef, touched: { lanes: number[]; topics: Topic[] }): Promise<Partial<FloorDelta>>;
}

export function createFloor({ ledger, clock }: { ledger: Ledger; clock: Clock }, sources: FloorSources): Floor {
  return {
    routes: floorRoutes(ledger, sources),
    delta: async (centre, touched) => changes(sources, centre, await ledger.read(centre), clock.now(), touched),
  };
}
