import type { CallView } from '#shared/contracts/floor.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Deps } from '#server/deps.ts';
import type { Route } from '#server/platform/http/route.ts';
import { callCommands } from './commands.ts';
import { callsReadModel } from './read-model.ts';
import { callRoutes } from './routes.ts';
import { callsScreen, type FamilyOfLane } from './screen.ts';
import { callView } from './view.ts';

export type { FamilyOfLane } from './screen.ts';

export interface Calls {
  routes: Route[];
  /** A call as the floor shows it. */
  callView(call: Call, house: House, now: number): CallView;
}

export function createCalls(deps: Pick<Deps, 'db' | 'ledger'>, others: { familyOfLane: FamilyOfLane }): Calls {
  const ended = callsReadModel(deps.db);
  const screen = callsScreen(deps.ledger, ended, others.familyOfLane);
  return { routes: callRoutes(callCommands(deps.ledger, ended), screen), callView };
}
