import type { BodyOf, Contract, ParamsOf, QueryOf, ResponseOf } from '#shared/contracts/contract.ts';
import type { Actor } from '#shared/policy/policy.ts';

/** A centre as every request in its path sees it. */
export interface CentreRef {
  id: Buffer;
  slug: string;
  name: string;
  zone: string;
  /** Minutes after local midnight at which a business day begins. */
  cut: number;
  lanes: number;
}

/** What a handler gets: already authenticated, allowed by the policy table, and validated. */
export interface Request<C> {
  actor: Actor;
  /** The centre of the path; null on routes without one. */
  centre: CentreRef;
  params: ParamsOf<C>;
  query: QueryOf<C>;
  body: BodyOf<C>;
  /** Server time, epoch ms. */
  now: number;
}

/** One route ready to be mounted: made by `serve(contract, handler)`. */
export interface Route {
  contract: Contract;
  /** League that a request is about, where the policy row asks for it; undefined: none. */
  league?: (request: { centre: CentreRef; params: Record<string, unknown> }) => Promise<string | undefined>;
  handle: (request: Request<Contract>) => Promise<unknown>;
}

/** Binds a handler to its contract. `league` says which league's matter a request is (policy: a secretary's own only). */
export function serve<C extends Contract>(
  contract: C,
  handle: (request: Request<C>) => Promise<ResponseOf<C>>,
  options: { league?: (request: { centre: CentreRef; params: ParamsOf<C> }) => Promise<string | undefined> } = {},
): Route {
  return { contract, handle: handle as Route['handle'], league: options.league as Route['league'] };
}
