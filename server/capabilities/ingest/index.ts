import type { Centre } from '#server/capabilities/centre/index.ts';
import type { Deps } from '#server/deps.ts';
import type { Route } from '#server/platform/http/route.ts';
import { createDoor, type Door } from './door.ts';
import { createIngestOf, type Ingest } from './ingest.ts';
import { setAsideReads } from './read-model.ts';
import { ingestRoutes } from './routes.ts';
import { setAsideCommands } from './set-aside.ts';
import { INGEST_RATE, type Rate } from './token-bucket.ts';

export { INGEST_PATH } from './door.ts';
export type { Ingest, IngestAnswer, Report } from './ingest.ts';
export type { Rate } from './token-bucket.ts';

export interface IngestSlice {
  routes: Route[];
  /** `POST /api/ingest/events`, beside the other routes. */
  door: Door;
  /** The same without HTTP: history that is loaded, with `receivedAt` = the events' own time. */
  ingest: Ingest;
}

/** What gateways send. `rate` is for measuring alone. */
export function createIngest(deps: Pick<Deps, 'db' | 'ledger' | 'clock' | 'log'>, others: { centre: Centre }, rate: Rate = INGEST_RATE): IngestSlice {
  const ingest = createIngestOf(deps.ledger, others.centre);
  return { routes: ingestRoutes(setAsideCommands(deps.ledger, setAsideReads(deps.db))), door: createDoor(deps, others.centre, ingest, rate), ingest };
}
