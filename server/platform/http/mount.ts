import type { Express, Request as Incoming, RequestHandler, Response } from 'express';
import type { Knex } from 'knex';
import type { Contract, Method } from '#shared/contracts/contract.ts';
import type { Actor } from '#shared/policy/policy.ts';
import type { Config } from '../../config.ts';
import type { Clock } from '../clock.ts';
import type { Logger } from '../log.ts';
import { answerOf } from './answer.ts';
import { admitToCentre, admitToLeague, type Admission } from './admission.ts';
import { refuseCrossSite } from './cross-site.ts';
import { orAway } from './database-watch.ts';
import { once, repeatable, type Answer } from './idempotency.ts';
import { idempotencyStore, type IdempotencyStore } from './idempotency-store.ts';
import { jsonBody } from './json-body.ts';
import { sendProblem } from './problem.ts';
import { Refusal } from './refusal.ts';
import type { CentreRef, HttpSide, Request, Route } from './route.ts';
import { validate } from './validate.ts';

export interface HttpDeps {
  /** Who sends this Cookie header. */
  authenticate: (cookies: string | undefined) => Promise<Actor>;
  centreBySlug: (slug: string) => Promise<CentreRef | null>;
  clock: Clock;
  db: Knex;
  log: Logger;
  config: Pick<Config, 'publicUrl'>;
  /** Tests: a field that the contract doesn't name is an error instead of being left out. */
  strict?: boolean;
}

/** Mounts every route with all that routes have in common; a known path with another method answers 405. */
export function mountRoutes(app: Express, routes: readonly Route[], deps: HttpDeps): void {
  const store = idempotencyStore(deps.db, deps.clock);
  const sameSite = refuseCrossSite(deps.config.publicUrl);
  const methods = new Map<string, Method[]>();
  for (const route of routes) {
    const { method, path } = route.contract;
    const known = methods.get(path) ?? [];
    if (known.includes(method)) throw new Error(`Two routes for ${method} ${path}`);
    methods.set(path, [...known, method]);
    app[verbOf(method)](path, sameSite, handlerOf(route, deps, store));
  }
  for (const [path, known] of methods) app.all(path, methodNotAllowed(known));
}

type Verb = 'get' | 'post' | 'put' | 'patch' | 'delete';
const verbOf = (method: Method): Verb => method.toLowerCase() as Verb;

function methodNotAllowed(known: readonly Method[]): RequestHandler {
  return (req, res, next) => {
    res.setHeader('Allow', known.join(', '));
    next(new Refusal(405, 'method.not-allowed', { method: req.method, allowed: known.join(', ') }));
  };
}

function handlerOf(route: Route, deps: HttpDeps, store: IdempotencyStore): RequestHandler {
  const { contract } = route;
  return async (req, res) => {
    res.setHeader('Cache-Control', 'no-store');
    const http = httpSide(req, res);
    try {
      await orAway(deps.db, async () => {
        const admitted = await admitToCentre(contract, await deps.authenticate(http.cookies), req.params, deps.centreBySlug);
        const body = await jsonBody(contract, req, res);
        const request = await requestOf(route, admitted, { req, body, http, now: deps.clock.now() });
        const run = async (): Promise<Answer> => ({ status: contract.status, json: answerOf(contract, await route.handle(request), deps.strict ?? false) });
        const what = repeatable(changes(contract) ? req.get('idempotency-key') : undefined, admitted.actor, { method: req.method, path: req.originalUrl, body });
        return what === null ? run() : once(store, what, route.secret ?? false, String(req.id), run);
      }).then((answer) => write(res, answer));
    } catch (error) {
      if (!showToBrowser(req, res, error)) sendProblem(req, res, error, deps.log);
    }
  };
}

const changes = (contract: Contract): boolean => contract.method !== 'GET';

type Raw = { req: Incoming; body: unknown; http: HttpSide; now: number };

async function requestOf(route: Route, { actor, centre }: Admission, { req, body, http, now }: Raw): Promise<Request<Contract>> {
  const { contract } = route;
  const parsed = validate<{ params: unknown; query: unknown; body: unknown }>({
    params: { schema: contract.params, value: req.params, part: 'path' },
    query: { schema: contract.query, value: req.query, part: 'query' },
    body: { schema: contract.body, value: body, part: 'body' },
  });
  await admitToLeague(route, { actor, centre }, parsed.params as Record<string, unknown>);
  // Routes without a centre in their path never look at it.
  return { actor, centre: centre as CentreRef, now, http, ...parsed };
}

function httpSide(req: Incoming, res: Response): HttpSide {
  return {
    cookies: req.headers.cookie,
    address: req.ip ?? 'unknown',
    agent: req.get('user-agent') ?? '',
    setCookie: (cookie) => void res.append('Set-Cookie', cookie),
    redirect: (location) => void res.location(location),
  };
}

function write(res: Response, { status, json }: Answer): void {
  if (res.headersSent) return;
  const type = status >= 400 ? 'application/problem+json' : 'application/json';
  res.status(status);
  if (json === null) res.end();
  else res.type(type).send(json);
}

/** A link that people open themselves and that leads nowhere: the sign-in page says why. Everything under /api is for programs. */
function showToBrowser(req: Incoming, res: Response, error: unknown): boolean {
  if (!(error instanceof Refusal) || req.path.startsWith('/api/') || req.accepts(['json', 'html']) !== 'html') return false;
  res.redirect(303, `/sign-in?because=${encodeURIComponent(error.code)}`);
  return true;
}
