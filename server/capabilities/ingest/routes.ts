import { ingestContracts } from '#shared/contracts/ingest.ts';
import { personOf } from '#server/platform/http/person.ts';
import { type Route, serve } from '#server/platform/http/route.ts';
import type { setAsideCommands } from './set-aside.ts';

/** What Settings asks; gateways have a door of their own (door.ts). */
export const ingestRoutes = (commands: ReturnType<typeof setAsideCommands>): Route[] => [
  serve(ingestContracts.setAside, async ({ centre }) => ({ events: await commands.list(centre) })),
  serve(ingestContracts.apply, ({ centre, body, actor, now }) => commands.apply(centre, body.events, personOf(actor), now)),
];
