import type { IncomingMessage, ServerResponse } from 'node:http';
import { parseInstant } from '#shared/domain/journal/rfc3339.ts';
import { decide } from '#shared/policy/policy.ts';
import type { Centre, KeyHolder } from '#server/capabilities/centre/index.ts';
import type { Deps } from '#server/deps.ts';
import { newId } from '#server/platform/db/uuid.ts';
import { orAway } from '#server/platform/http/database-watch.ts';
import { problemOf, refusalOf } from '#server/platform/http/problem.ts';
import { Refusal } from '#server/platform/http/refusal.ts';
import { readBody } from './body.ts';
import type { Ingest } from './ingest.ts';
import { type Rate, tokenBuckets } from './token-bucket.ts';

export type Door = (request: IncomingMessage, response: ServerResponse) => Promise<void>;

const BEARER = /^Bearer +([\x21-\x7e]{1,200}) *$/i;

/**
 * `POST /api/ingest/events`. Apart from the other routes, as its body is larger, has media types of its own, and comes thousands of
 * times a second; the policy table decides here too.
 */
export function createDoor(deps: Pick<Deps, 'db' | 'clock' | 'log'>, { gateways }: Pick<Centre, 'gateways'>, ingest: Ingest, rate: Rate): Door {
  const buckets = tokenBuckets(rate);

  async function holderOf(request: IncomingMessage): Promise<KeyHolder> {
    const key = BEARER.exec(request.headers.authorization ?? '')?.[1];
    const holder = key === undefined ? null : await orAway(deps.db, () => gateways.holderOf(key));
    const actor = holder ? { kind: 'gateway' as const, gateway: holder.gateway.id, name: holder.gateway.name, centre: holder.centre.slug } : { kind: 'nobody' as const };
    if (!holder || decide('events.report', actor, { centre: holder.centre.slug }) !== 'ok') throw new Refusal(401, 'gateway.key-required');
    if (holder.revoked) throw new Refusal(403, 'gateway.key-revoked');
    const wait = buckets.take(key ?? '', performance.now());
    if (wait > 0) throw new Refusal(429, 'gateway.too-many', { retryAfterS: wait });
    return holder;
  }

  async function answer(request: IncomingMessage): Promise<string> {
    if (request.method !== 'POST') throw new Refusal(405, 'method.not-allowed', { method: request.method ?? '', allowed: 'POST' });
    const from = await holderOf(request);
    const elements = await readBody(request);
    const header = request.headers['gateway-time'];
    const gatewayTime = header === undefined ? null : parseInstant(String(header));
    if (header !== undefined && gatewayTime === null) throw new Refusal(400, 'events.gateway-time');
    try {
      return JSON.stringify(await ingest({ from, elements, receivedAt: deps.clock.now(), gatewayTime }));
    } catch (error) {
      if (error instanceof RangeError) throw new Refusal(400, 'events.not-cloudevents');
      throw error;
    }
  }

  return async (request, response) => {
    response.setHeader('Cache-Control', 'no-store');
    response.setHeader('X-Content-Type-Options', 'nosniff');
    try {
      send(response, 200, 'application/json', await answer(request));
    } catch (error) {
      refuse(request, response, error, deps.log);
    }
  };
}

function refuse(request: IncomingMessage, response: ServerResponse, error: unknown, log: Deps['log']): void {
  const refusal = refusalOf(error);
  const id = newId();
  if (!refusal || refusal.status === 503) log[refusal ? 'warn' : 'error']({ err: error, request: id, path: request.url }, refusal?.code ?? 'unexpected');
  const wait = refusal?.params['retryAfterS'];
  if (wait !== undefined) response.setHeader('Retry-After', String(wait));
  if (refusal?.status === 401) response.setHeader('WWW-Authenticate', 'Bearer realm="lanewright"');
  if (refusal?.status === 405) response.setHeader('Allow', 'POST');
  // What is left of a body that isn't read must not stand for the next request.
  if (!request.complete) response.setHeader('Connection', 'close');
  send(response, refusal?.status ?? 500, 'application/problem+json', JSON.stringify(problemOf(refusal ?? { status: 500, code: 'unexpected' }, id)));
  request.resume();
}

function send(response: ServerResponse, status: number, type: string, json: string): void {
  response.writeHead(status, { 'Content-Type': `${type}; charset=utf-8`, 'Content-Length': Buffer.byteLength(json) });
  response.end(json);
}

export const INGEST_PATH = '/api/ingest/events';
