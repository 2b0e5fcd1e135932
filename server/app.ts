import express, { type Express, type RequestHandler } from 'express';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { allContracts } from '#shared/contracts/index.ts';
import { INGEST_PATH } from './capabilities/ingest/index.ts';
import type { Composition } from './compose.ts';
import type { Deps } from './deps.ts';
import { databaseAnswers } from './platform/http/database-watch.ts';
import { mountRoutes } from './platform/http/mount.ts';
import { openApiRoute } from './platform/http/openapi.ts';
import { problems, routeUnknown } from './platform/http/problem.ts';
import { requestLog } from './platform/http/request-log.ts';
import { secure } from './platform/http/security.ts';

const CLIENT = fileURLToPath(new URL('../dist', import.meta.url));
const YEAR_MS = 31_536_000_000;

export interface AppOptions {
  /** Migrations are done, the demo is loaded, and nobody asked to stop. */
  ready(): boolean;
  /** Development: Vite serves the client from its sources. */
  client?: RequestHandler;
  /** Tests: a field that a contract doesn't name is an error instead of being left out. */
  strict?: boolean;
}

/** The whole of HTTP: health, gateways' door, the API and the client. */
export function createApp(deps: Deps, { slices, routes }: Composition, options: AppOptions): Express {
  const { db, clock, log, config } = deps;
  const app = express();
  app.get('/livez', (_req, res) => void res.type('text').send('ok'));
  app.get('/readyz', async (_req, res) => {
    const fit = options.ready() && (await databaseAnswers(db));
    res.status(fit ? 200 : 503).type('text').send(fit ? 'ready' : 'not ready');
  });
  app.all(INGEST_PATH, (req, res) => void slices.ingest.door(req, res));
  secure(app, config);
  app.use(requestLog(log));
  mountRoutes(app, [...routes, openApiRoute(allContracts, '0.1.0')], {
    authenticate: slices.accounts.authenticate, centreBySlug: slices.centre.bySlug, clock, db, log, config, strict: options.strict,
  });
  app.use('/api', routeUnknown);
  if (options.client) app.use(options.client);
  else serveClient(app);
  app.use(problems(log));
  return app;
}

/** The built client: hashed files for a year, everything else asked for anew; unknown paths are the client's own. */
function serveClient(app: Express): void {
  app.use('/assets', express.static(join(CLIENT, 'assets'), { maxAge: YEAR_MS, immutable: true, fallthrough: false }));
  app.use(express.static(CLIENT, { maxAge: 0, index: false }));
  app.get(/^\/(?!api\/|assets\/)/, (_req, res) => {
    const page = join(CLIENT, 'index.html');
    if (!existsSync(page)) return void res.status(503).type('text').send('The client has not been built. Run: npm run build');
    res.setHeader('Cache-Control', 'no-cache');
    res.sendFile(page);
  });
}
