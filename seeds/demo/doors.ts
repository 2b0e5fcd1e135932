import type { Person } from '#shared/domain/journal/fact.ts';
import type { Accounts } from '#server/capabilities/accounts/index.ts';
import type { Centre } from '#server/capabilities/centre/index.ts';
import type { IngestSlice } from '#server/capabilities/ingest/index.ts';
import type { Leagues } from '#server/capabilities/leagues/index.ts';
import type { Numbers } from '#server/capabilities/numbers/index.ts';
import type { Readiness } from '#server/capabilities/readiness/index.ts';
import type { Runs } from '#server/capabilities/runs/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

/** The slices' front doors that the demo comes in by; `answer` records what its mechanics did up to an instant. */
export interface DemoDoors {
  accounts: Accounts;
  centre: Centre;
  ingest: IngestSlice;
  leagues: Leagues;
  numbers: Numbers;
  readiness: Readiness;
  runs: Runs;
  answer(centre: CentreRef, until: number, mechanics: readonly Person[], words: readonly (string | number)[]): Promise<void>;
}
