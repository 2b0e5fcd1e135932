import type { Knex } from 'knex';
import type { Config } from './config.ts';
import type { Clock } from './platform/clock.ts';
import type { Ledger } from './platform/journal/ledger.ts';
import type { Logger } from './platform/log.ts';

/** What every slice may use. Other slices' front doors are passed beside it, along declared edges, by `compose.ts`. */
export interface Deps {
  db: Knex;
  clock: Clock;
  ledger: Ledger;
  log: Logger;
  config: Config;
}
