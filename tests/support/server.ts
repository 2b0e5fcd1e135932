import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Knex } from 'knex';
import { createApp } from '#server/app.ts';
import type { Rate } from '#server/capabilities/ingest/index.ts';
import { compose, type Slices } from '#server/compose.ts';
import type { Deps } from '#server/deps.ts';
import type { Clock } from '#server/platform/clock.ts';
import { createLedger } from '#server/platform/journal/create-ledger.ts';
import { createLog, type Logger } from '#server/platform/log.ts';
import { createHub } from '#server/platform/realtime/hub.ts';
import { startRelay } from '#server/platform/realtime/relay.ts';
import { testConfig } from './web.ts';

export interface TestServer {
  url: string;
  deps: Deps;
  slices: Slices;
  close(): Promise<void>;
}

interface Given {
  db: Knex;
  clock: Clock;
  ingestRate?: Rate;
  /** To see what a test's server complained of. */
  log?: Logger;
}

/** The whole program but for its jobs, over real HTTP and sockets, on a port of its own. */
export async function startServer({ db, clock, ingestRate, log = createLog('silent') }: Given): Promise<TestServer> {
  const deps: Deps = { db, clock, ledger: createLedger({ db, clock }), log, config: testConfig };
  const whole = compose(deps, null, ingestRate);
  const { slices } = whole;
  const server = createServer(createApp(deps, whole, { ready: () => true, strict: true }));
  const hub = createHub(server, { identify: slices.accounts.identify, centreBySlug: slices.centre.bySlug, publicUrl: null, log });
  slices.accounts.onRevoked(hub.disconnect);
  const relay = startRelay(hub, {
    db, clock, log, centreBySlug: slices.centre.bySlug, leaguesOf: slices.leagues.leagueIds, floorDelta: slices.floor.delta, gatewaysHeardAt: slices.centre.gateways.heardAt,
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    deps,
    slices,
    async close() {
      await relay.stop();
      server.closeAllConnections();
      await hub.stop();
      await whole.stop();
    },
  };
}
