import * as z from 'zod/mini';
import type { Permission } from '../policy/policy.ts';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
type Schema = z.ZodMiniType;

export interface Contract<P extends Schema = Schema, Q extends Schema = Schema, B extends Schema = Schema, R extends Schema = Schema> {
  /** Stable name, also OpenAPI's operationId: `calls.acknowledge`. */
  id: string;
  method: Method;
  /** Express style path: `/api/centres/:centre/calls/:call`. */
  path: string;
  permission: Permission;
  summary: string;
  params: P;
  query: Q;
  body: B;
  response: R;
  status: number;
  /** Codes of refusals that this route gives besides those of every route. */
  refusals: readonly string[];
}

const nothing = z.object({});
export const none = z.null();

interface Given<P, Q, B, R> {
  id: string;
  method: Method;
  path: string;
  permission: Permission;
  summary: string;
  params?: P;
  query?: Q;
  body?: B;
  response: R;
  status?: number;
  refusals?: readonly string[];
}

/** Says a route once: server (`serve`), client (`call`), OpenAPI and the tests are derived from it. */
export function contract<R extends Schema, P extends Schema = typeof nothing, Q extends Schema = typeof nothing, B extends Schema = typeof none>(
  given: Given<P, Q, B, R>,
): Contract<P, Q, B, R> {
  return {
    ...given,
    params: given.params ?? (nothing as unknown as P),
    query: given.query ?? (nothing as unknown as Q),
    body: given.body ?? (none as unknown as B),
    status: given.status ?? 200,
    refusals: given.refusals ?? [],
  };
}

export type ParamsOf<C> = C extends Contract<infer P, Schema, Schema, Schema> ? z.infer<P> : never;
export type QueryOf<C> = C extends Contract<Schema, infer Q, Schema, Schema> ? z.infer<Q> : never;
export type BodyOf<C> = C extends Contract<Schema, Schema, infer B, Schema> ? z.infer<B> : never;
export type ResponseOf<C> = C extends Contract<Schema, Schema, Schema, infer R> ? z.infer<R> : never;

/** Building blocks that every slice uses. */
export const slug = z.string().check(z.regex(/^[a-z0-9](?:[a-z0-9-]{0,38}[a-z0-9])?$/));
export const centreParams = z.object({ centre: slug });
export const uuid = z.string().check(z.regex(/^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/));
/** Epoch milliseconds from 1970 to the end of the year 9999, where MariaDB's DATETIME ends. */
export const instant = z.int().check(z.minimum(0), z.maximum(253_402_300_799_999));
/** A local calendar date, `yyyy-mm-dd`, of the years 2000 to 2999: its instants are always ours to keep. */
export const date = z.string().check(z.regex(/^2\d{3}-\d{2}-\d{2}$/));
export const laneNumber = z.int().check(z.minimum(1), z.maximum(99));
/** Lane number in a path. */
export const laneParam = z.coerce.number().check(z.int(), z.minimum(1), z.maximum(99));
/** Text as people type it: no control characters but line breaks, trimmed, never empty. */
export const line = (max: number) => z.string().check(z.trim(), z.minLength(1), z.maxLength(max), z.regex(/^[^\p{Cc}]*$/u));
export const note = (max: number) => z.string().check(z.trim(), z.maxLength(max), z.regex(/^[^\p{Cc}]*(?:[\n\r\t][^\p{Cc}]*)*$/u));
export const ok = z.object({ ok: z.literal(true) });
