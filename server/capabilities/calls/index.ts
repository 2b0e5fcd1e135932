import type { CallView } from '#shared/contracts/floor.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import type { HouseRules } from '#shared/domain/house-rules.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Centre } from '#server/capabilities/centre/index.ts';
import type { Notices } from '#server/capabilities/notices/index.ts';
import type { Deps } from '#server/deps.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import { callCommands } from './commands.ts';
import { callsReadModel } from './read-model.ts';
import { callRoutes } from './routes.ts';
import { callsScreen } from './screen.ts';
import { unansweredMails } from './unanswered.ts';
import { callView } from './view.ts';

export interface Calls {
  routes: Route[];
  /** A call as the floor shows it. */
  callView(call: Call, house: House, now: number, rules: HouseRules): CallView;
  /** Queues the one letter about each call that has waited too long at `now`; returns how many were new. */
  mailUnanswered(now: number): Promise<number>;
}

interface Others {
  centre: Pick<Centre, 'lanes' | 'all'>;
  notices: Pick<Notices, 'queueMail'>;
  /** Addresses of a centre's managers: they get the record of an unanswered call. */
  managers: (centre: CentreRef) => Promise<readonly string[]>;
}

/** Calls from raise to back running; the lockout record; what a lane had before. */
export function createCalls(deps: Pick<Deps, 'db' | 'ledger' | 'config'>, { centre, notices, managers }: Others): Calls {
  const ended = callsReadModel(deps.db);
  const screen = callsScreen(deps.ledger, ended, async (house, lane) => (await centre.lanes(house)).find((one) => one.lane === lane)?.family ?? null);
  return {
    routes: callRoutes(callCommands(deps.ledger, ended), screen),
    callView,
    mailUnanswered: unansweredMails(deps, { centres: () => centre.all(), recipients: managers, queueMail: notices.queueMail }),
  };
}
