import type { LaneSettings, OpeningHours } from '#shared/contracts/centre.ts';
import type { Deps } from '#server/deps.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import { centreCommands } from './commands.ts';
import { createGateways, type Gateways } from './gateways.ts';
import { centreRoutes } from './routes.ts';
import { centreStore, type NewCentre } from './store.ts';
import { gatewayStore } from './store-gateways.ts';

export { CLOCK_ERROR_MS, type GatewayNews } from './gateway-news.ts';
export type { GatewayView } from './gateways.ts';
export { heardNumber } from './sequences.ts';
export type { KeyHolder } from './store-gateways.ts';

export interface Centre {
  routes: Route[];
  /** The centre of a path; remembered for a second. Null: there is none. */
  bySlug(slug: string): Promise<CentreRef | null>;
  all(): Promise<CentreRef[]>;
  lanes(centre: CentreRef): Promise<LaneSettings[]>;
  /** Seven days, Monday first; minutes after local midnight. */
  opening(centre: CentreRef): Promise<OpeningHours>;
  /** A new centre with its lanes; what isn't given is common practice. */
  add(given: Pick<NewCentre, 'slug' | 'name' | 'zone' | 'lanes'> & Partial<NewCentre>): Promise<CentreRef>;
  /** A new gateway; its key is known to the caller alone. 409 `gateway.name-taken`. */
  addGateway(centre: CentreRef, name: string): Promise<{ id: string; key: string }>;
  gateways: Gateways;
  stop(): Promise<void>;
}

/** 10:00 to midnight every day, until the centre says otherwise. */
const OPENING: OpeningHours = Array.from({ length: 7 }, () => ({ from: 600, to: 1440 }));
const CUT = 4 * 60;
const TRUST_MS = 1_000;

/** The house itself: name, zone, opening hours, lanes, gateways and their keys. */
export function createCentre({ db, ledger, log, clock }: Pick<Deps, 'db' | 'ledger' | 'log' | 'clock'>): Centre {
  const store = centreStore(db);
  const gatewayRows = gatewayStore(db);
  const gateways = createGateways(gatewayRows, log);
  const remembered = new Map<string, { until: number; centre: CentreRef }>();
  const commands = centreCommands({ ledger, store, gatewayRows, gateways, forget: () => remembered.clear() });
  return {
    routes: centreRoutes({ commands, store, gatewayRows, gateways }),
    async bySlug(slug) {
      const there = remembered.get(slug);
      if (there && performance.now() < there.until) return there.centre;
      const centre = await store.bySlug(slug);
      if (centre) remembered.set(slug, { until: performance.now() + TRUST_MS, centre });
      return centre;
    },
    all: () => store.all(),
    lanes: (centre) => store.lanes(centre.id),
    opening: (centre) => store.opening(centre.id),
    add: (given) => store.add({ cut: CUT, opening: OPENING, family: 'free-fall', certifiedUntil: null, ...given }, clock.now()),
    addGateway: (centre, name) => commands.addGateway(centre, name),
    gateways,
    stop: () => gateways.stop(),
  };
}
