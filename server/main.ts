import { createServer } from 'node:http';
import { loadDemo } from '../seeds/demo/load.ts';
import { anyCentre, demoIsLoaded } from '../seeds/demo/marker.ts';
import { createApp } from './app.ts';
import { compose } from './compose.ts';
import { configFromEnvironment } from './config.ts';
import type { Deps } from './deps.ts';
import { devClient } from './dev-client.ts';
import { systemClock } from './platform/clock.ts';
import { createDatabase } from './platform/db/database.ts';
import { migrate } from './platform/db/migrate.ts';
import { createLedger } from './platform/journal/create-ledger.ts';
import { createLog } from './platform/log.ts';
import { createPostman } from './platform/mail/postman.ts';
import { createHub } from './platform/realtime/hub.ts';
import { startRelay } from './platform/realtime/relay.ts';
import { startSchedule } from './platform/schedule/schedule.ts';

const DEMO_CENTRE = 'tarn-ferry';
const FORCED_AFTER_MS = 8_000;

const config = configFromEnvironment();
const log = createLog(config.logLevel);
const db = createDatabase(config.databaseUrl);
const clock = systemClock;
const deps: Deps = { db, clock, ledger: createLedger({ db, clock }), log, config };
const postman = config.smtpUrl === null ? null : createPostman(config.smtpUrl);
const whole = compose(deps, postman);
const { slices } = whole;

let ready = false;
let stopping: Promise<void> | null = null;
let begun: { stop(): Promise<void> }[] = [];
for (const event of ['disconnect', 'SIGTERM', 'SIGINT'] as const) process.on(event, () => void stop());

await migrate(db);
const server = createServer();
server.on('request', createApp(deps, whole, { ready: () => ready, client: config.dev ? await devClient(server) : undefined }));
const hub = createHub(server, { identify: slices.accounts.identify, centreBySlug: slices.centre.bySlug, publicUrl: config.publicUrl, log });
slices.accounts.onRevoked(hub.disconnect);
await new Promise<void>((resolve, reject) => {
  server.once('error', reject);
  server.listen(config.port, config.host, resolve);
});

if (config.demo && !(await demoIsLoaded(db)) && (await anyCentre(db)).every((slug) => slug === DEMO_CENTRE)) {
  const publicUrl = config.publicUrl ?? `http://localhost:${config.port}`;
  await loadDemo({ db, ledger: deps.ledger, dataDir: config.dataDir, publicUrl, now: clock.now(), say }, slices);
}
const relay = startRelay(hub, {
  db, clock, log, centreBySlug: slices.centre.bySlug, leaguesOf: slices.leagues.leagueIds, floorDelta: slices.floor.delta, gatewaysHeardAt: slices.centre.gateways.heardAt,
});
begun = [relay, hub, startSchedule(whole.jobs, deps)];
ready = true;
process.send?.({ type: 'ready' });

/** Not ready → clients are told to fetch again → what runs is finished → the pool is closed. */
function stop(): Promise<void> {
  stopping ??= (async () => {
    ready = false;
    setTimeout(() => process.exit(1), FORCED_AFTER_MS).unref();
    for (const part of begun) await part.stop();
    server.closeIdleConnections();
    await whole.stop();
    postman?.close();
    await db.destroy();
    process.exit(0);
  })();
  return stopping;
}

function say(text: string): void {
  if (process.send) process.send({ type: 'say', text });
  else process.stdout.write(`${text}\n`);
}
