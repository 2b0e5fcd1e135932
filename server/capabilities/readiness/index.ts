import type { SessionBar } from '#shared/contracts/floor.ts';
import type { House } from '#shared/domain/house/state.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { dressingWanted } from '#shared/domain/readiness/dressing-wanted.ts';
import { DEFAULT_READINESS } from '#shared/domain/readiness/settings.ts';
import type { DressingWant } from '#shared/domain/runs/tonight.ts';
import type { Deps } from '#server/deps.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import { readinessCommands } from './commands.ts';
import { type ReadyAtWarmUp, readinessReadModel } from './read-model.ts';
import { readinessRoutes } from './routes.ts';
import { readinessScreen } from './screen.ts';
import { type ReadinessSources, recordsOf, surroundings } from './sources.ts';
import { readinessStore as store } from './store.ts';
import { watcher } from './watch.ts';

export type { ReadyAtWarmUp } from './read-model.ts';
export type { ReadinessSources } from './sources.ts';

export interface Readiness {
  routes: Route[];
  /** Bars of the floor: sessions of this business day with their readiness, by start. */
  upcoming(centre: CentreRef, house: House, now: number): Promise<SessionBar[]>;
  /** How many leagues and tournaments with a warm-up in [from, to) ms were ready at it. */
  readyAtWarmUp(centre: CentreRef, from: number, to: number): Promise<ReadyAtWarmUp>;
  /** One look at the near sessions of a centre, as at `now`; `mail: false` for history that is loaded. Returns how many it wrote. */
  watch(centre: CentreRef, now: number, options?: { mail: boolean }): Promise<number>;
  /** The same for every centre. */
  watchAll(now: number): Promise<void>;
  /** Lanes that sessions of this night still want dressed, and how long before warm-up they are to be ready, ms. */
  dressingWanted(centre: CentreRef, house: House, now: number): Promise<{ wants: DressingWant[]; marginMs: number }>;
  /** Sessions or leagues of a centre were changed: what is remembered of them is read anew. */
  forget(centre: CentreRef): void;
}

/** Readiness of sessions: computed when read; only the last verdict, people's words and mails are kept. */
export function createReadiness({ db, ledger, clock, config }: Pick<Deps, 'db' | 'ledger' | 'clock' | 'config'>, sources: ReadinessSources): Readiness {
  const readModel = readinessReadModel(db);
  const weightsOf = (centre: CentreRef) => store.weights(db, centre.id, DEFAULT_READINESS.weights);
  const records = (centre: CentreRef, now: number, until: number) => recordsOf(sources, weightsOf, centre, now, until);
  const kept = (centre: CentreRef, sessions: readonly string[]) => store.kept(db, centre.id, sessions);
  const screen = readinessScreen({ ledger, leagues: sources.leagues, records, kept });
  const commands = readinessCommands({ ledger, leagues: sources.leagues, records, now: () => clock.now(), changed: screen.forget });
  const watch = watcher({ ledger, notices: sources.notices, records, kept, recipients: readModel.recipients, publicUrl: config.publicUrl, changed: screen.forget });
  return {
    routes: readinessRoutes(commands, screen, sources.leagues, weightsOf),
    upcoming: screen.upcoming,
    readyAtWarmUp: readModel.readyAtWarmUp,
    watch,
    async watchAll(now) {
      for (const centre of await sources.centre.all()) await watch(centre, now);
    },
    async dressingWanted(centre, house, now) {
      const until = businessDayAt(now, centre.zone, centre.cut).to;
      const around = surroundings(centre, house, await records(centre, now, until), now);
      return { wants: dressingWanted(around, until), marginMs: around.settings.dressMarginMs };
    },
    forget: screen.forget,
  };
}
