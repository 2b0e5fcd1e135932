import type { BodyOf, Contract, ParamsOf, QueryOf, ResponseOf } from '#shared/contracts/contract.ts';
import type { HouseRules } from '#shared/domain/house-rules.ts';
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
  rules: HouseRules;
}

/** What sign-in and the wall's link need of HTTP itself; no other handler does. */
export interface HttpSide {
  /** The request's cookies as sent; undefined: none. */
  cookies: string | undefined;
  /** Address of the caller, and how its program calls itself. */
  address: string;
  agent: string;
  /** Puts a `Set-Cookie` header on the answer. */
  setCookie(cookie: string): void;
  /** Answers with `Location` (303); the result of the handler must then be null. */
  redirect(location: string): void;
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
  http: HttpSide;
}

/** One route ready to be mounted: made by `serve(contract, handler)`. */
export interface Route {
  contract: Contract;
  /** League that a request is about, where the policy row asks for it; undefined: none. */
  league?: (request: { centre: CentreRef; params: Record<string, unknown> }) => Promise<string | undefined>;
  handle: (request: Request<Contract>) => Promise<unknown>;
  /** The answer holds a secret that is shown once: it isn't kept for a repeat with the same Idempotency-Key. */
  secret?: boolean;
}

export interface ServeOptions<C> {
  league?: (request: { centre: CentreRef; params: ParamsOf<C> }) => Promise<string | undefined>;
  secret?: boolean;
}

/** Binds a handler to its contract. `league` says which league's matter a request is (policy: a secretary's own only). */
export function serve<C extends Contract>(
  contract: C,
  handle: (request: Request<C>) => Promise<ResponseOf<C>>,
  options: ServeOptions<C> = {},
): Route {
  return { contract, handle: handle, league: options.league as Route['league'], secret: options.secret };
}
