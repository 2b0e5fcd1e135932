import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Deps } from '#server/deps.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import type { Notices } from '../notices/index.ts';
import { issue, issueDue } from './report.ts';
import { numbersRoutes } from './routes.ts';
import type { NumbersSources } from './sources.ts';
import { tonight } from './tonight.ts';

export type { NumbersSources } from './sources.ts';

export interface Numbers {
  routes: Route[];
  /** Tonight's figures for the floor; made anew at most every three seconds. */
  tonight(centre: CentreRef, house: House, now: number): Promise<FloorSnapshot['tonight']>;
  /** Issues every night report that is due; mails only the latest. A centre whose report fails keeps no other from its own; then throws AggregateError. */
  issueDue(now: number): Promise<void>;
  /** Issues the report of one date without mail, for nights that were loaded. */
  issueQuietly(centre: CentreRef, date: string, now: number): Promise<void>;
}

const TONIGHT_MS = 3_000;

export function createNumbers(deps: Pick<Deps, 'db' | 'ledger'>, sources: NumbersSources, notices: Notices, centres: () => Promise<CentreRef[]>): Numbers {
  const night = { db: deps.db, ledger: deps.ledger, sources };
  const made = new Map<string, { at: number; figures: Promise<FloorSnapshot['tonight']> }>();
  return {
    routes: numbersRoutes(night),
    tonight(centre, house, now) {
      const before = made.get(centre.slug);
      if (before && now - before.at < TONIGHT_MS && now >= before.at) return before.figures;
      const figures = tonight(sources, centre, house, now);
      made.set(centre.slug, { at: now, figures });
      return figures;
    },
    async issueDue(now) {
      const failed: unknown[] = [];
      for (const centre of await centres()) await issueDue({ ...night, notices }, centre, now).catch((error: unknown) => failed.push(error));
      if (failed.length > 0) throw new AggregateError(failed, `the night report of ${failed.length} centres failed`);
    },
    async issueQuietly(centre, date, now) {
      await issue({ ...night, notices }, centre, date, now, false);
    },
  };
}
