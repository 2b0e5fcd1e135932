import express from 'express';
import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Knex } from 'knex';
import { USUAL_RULES } from '#shared/domain/house-rules.ts';
import { createAccounts, type Accounts } from '#server/capabilities/accounts/index.ts';
import type { Config } from '#server/config.ts';
import type { Clock } from '#server/platform/clock.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { newId, toBinary } from '#server/platform/db/uuid.ts';
import { mountRoutes } from '#server/platform/http/mount.ts';
import { problems, routeUnknown } from '#server/platform/http/problem.ts';
import { requestLog } from '#server/platform/http/request-log.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import { openJournal } from '#server/platform/journal/head-store.ts';
import { secure } from '#server/platform/http/security.ts';
import { createLog } from '#server/platform/log.ts';

export const testConfig: Config = {
  port: 0, host: '127.0.0.1', databaseUrl: '', dataDir: '', smtpUrl: null, publicUrl: null, demo: false, production: false, dev: false, https: false, logLevel: 'silent',
};

/** HTTP and accounts alone, on a real port: for what every route has in common. `routes` are mounted beside those of accounts. */
export interface Web {
  url: string;
  accounts: Accounts;
  close(): Promise<void>;
}

interface Options {
  clock: Clock;
  config?: Partial<Config>;
  routes?: readonly Route[];
  strict?: boolean;
  leaguesOf?: (centre: CentreRef) => Promise<readonly string[]>;
}

export async function startWeb(db: Knex, { clock, config = {}, routes = [], strict = true, leaguesOf = async () => [] }: Options): Promise<Web> {
  const settings = { ...testConfig, ...config };
  const log = createLog('silent');
  const accounts = createAccounts({ db, clock, log, config: settings }, { leaguesOf });
  const app = express();
  secure(app, settings);
  app.use(requestLog(log));
  mountRoutes(app, [...accounts.routes, ...routes], { authenticate: accounts.authenticate, centreBySlug: (slug) => centreRow(db, slug), clock, db, log, config: settings, strict });
  app.use('/api', routeUnknown);
  app.use(problems(log));
  const server = createServer(app);
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    accounts,
    close: async () => {
      accounts.stop();
      server.closeAllConnections();
      server.close();
      await once(server, 'close');
    },
  };
}

type Row = { id: Buffer; slug: string; name: string; zone: string; cut: number; lanes: number };

async function centreRow(db: Knex, slug: string): Promise<CentreRef | null> {
  const row = await db<Row>('centre').where('slug', slug).first('id', 'slug', 'name', 'zone', 'cut', 'lanes');
  return row ? { ...row, rules: USUAL_RULES } : null;
}

let made = 0;

/** A centre row of the test's own. */
export async function makeCentre(db: Knex, clock: Clock): Promise<CentreRef> {
  made += 1;
  const id = newId(clock.now());
  const slug = `house-${id.slice(-12)}-${made}`;
  const centre: CentreRef = { id: toBinary(id), slug, name: `House ${made}`, zone: 'Europe/Berlin', cut: 240, lanes: 32, rules: USUAL_RULES };
  await db('centre').insert({ ...centre, rules: JSON.stringify(centre.rules), opening: JSON.stringify(Array.from({ length: 7 }, () => [600, 1380])), created_at: toRowTime(clock.now()) });
  await openJournal(db, centre.id);
  return centre;
}
