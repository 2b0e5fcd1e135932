import type { CallDetail } from '#shared/contracts/calls.ts';
import { callContracts as c } from '#shared/contracts/calls.ts';
import { type CentreRef, type Route, serve } from '#server/platform/http/route.ts';
import type { CallCommands, Done } from './commands.ts';
import * as rules from './rules.ts';
import type { CallsScreen } from './screen.ts';

type Family = CallDetail['family'];

/** Every route of calls: a rule decides, the answer is the call as its page shows it. */
export function callRoutes(commands: CallCommands, screen: CallsScreen): Route[] {
  const shown = async (centre: CentreRef, done: Promise<Done>): Promise<CallDetail> => screen.detail(centre, await done);
  const ruled = (contract: typeof c.acknowledge, rule: rules.Rule): Route =>
    serve(contract, ({ centre, actor, params }) => shown(centre, commands.work(centre, actor, params.call, rule)));
  const family = (centre: CentreRef, call: string): Promise<Family> => screen.familyOf(centre, call);
  return [
    serve(c.list, ({ centre, now }) => screen.list(centre, now)),
    serve(c.see, ({ centre, params, now }) => screen.see(centre, params.call, now)),
    serve(c.raise, ({ centre, actor, body }) => shown(centre, commands.raise(centre, actor, body))),
    ruled(c.acknowledge, rules.acknowledge),
    ruled(c.takeOver, rules.takeOver),
    ruled(c.onLane, rules.onLane),
    serve(c.clear, async ({ centre, actor, params, body }) =>
      shown(centre, commands.work(centre, actor, params.call, rules.clear(body.cause, body.note, await family(centre, params.call))))),
    serve(c.park, ({ centre, actor, params, body }) => shown(centre, commands.work(centre, actor, params.call, rules.park(body.reason, body.until)))),
    ruled(c.unpark, rules.unpark),
    serve(c.outOfService, ({ centre, actor, params, body }) => shown(centre, commands.work(centre, actor, params.call, rules.outOfService(body.reason)))),
    serve(c.backInService, async ({ centre, actor, params, body }) =>
      shown(centre, commands.work(centre, actor, params.call, rules.backInService(body.cause, body.note, await family(centre, params.call))))),
    ruled(c.lockoutBegin, rules.lockoutBegin),
    serve(c.lockoutStep, ({ centre, actor, params, body }) => shown(centre, commands.work(centre, actor, params.call, rules.lockoutStep(body.step, body.done)))),
    ruled(c.lockoutRelease, rules.lockoutRelease),
    serve(c.lockoutLeftBehind, ({ centre, actor, params, body }) =>
      shown(centre, commands.work(centre, actor, params.call, rules.lockoutLeftBehind(body.procedure)))),
  ];
}
