import { createHash } from 'node:crypto';
import type { Actor } from '#shared/policy/policy.ts';
import { withBeforeCommit } from '../db/before-commit.ts';
import type { IdempotencyStore, Repeatable } from './idempotency-store.ts';
import { problemOf, refusalOf } from './problem.ts';
import { Refusal } from './refusal.ts';

/** An answer before it is written: JSON text, or null for none. */
export interface Answer {
  status: number;
  json: string | null;
}

const KEY = /^[\x21-\x7e]{1,200}$/;
const WAIT_S = 1;

/** The repeatable request that a header and an actor make, or null: nobody's requests, and those without a key, run each time. */
export function repeatable(header: string | undefined, actor: Actor, request: { method: string; path: string; body: unknown }): Repeatable | null {
  if (header === undefined || actor.kind !== 'user') return null;
  if (!KEY.test(header)) throw new Refusal(422, 'idempotency.key-invalid');
  const hash = createHash('sha256').update(JSON.stringify([request.method, request.path, request.body ?? null])).digest();
  return { actor: `user:${actor.id}`, key: header, hash };
}

/**
 * Runs `work` once for a key and answers the same to every repeat. That the effect has happened is written in the effect's own
 * transaction, so that a crash right after the commit doesn't do it twice; the answer follows. Refusals are answers too; a 5xx
 * lets the key go.
 */
export async function once(store: IdempotencyStore, what: Repeatable, secret: boolean, requestId: string, work: () => Promise<Answer>): Promise<Answer> {
  const claim = await store.claim(what);
  if (claim.state === 'mismatch') throw new Refusal(422, 'idempotency.mismatch');
  if (claim.state === 'pending') throw new Refusal(409, 'idempotency.under-way', { retryAfterS: WAIT_S });
  if (claim.state === 'applied' || (claim.state === 'answered' && secret)) throw new Refusal(409, 'idempotency.answer-lost');
  if (claim.state === 'answered') return { status: claim.status, json: claim.answer };
  return first(store, what, secret, requestId, work);
}

async function first(store: IdempotencyStore, what: Repeatable, secret: boolean, requestId: string, work: () => Promise<Answer>): Promise<Answer> {
  const answer = await attempt(store, what, requestId, work);
  await store.answered(what, answer.status, secret && answer.status < 400 ? null : answer.json);
  return answer;
}

async function attempt(store: IdempotencyStore, what: Repeatable, requestId: string, work: () => Promise<Answer>): Promise<Answer> {
  try {
    return await withBeforeCommit((trx) => store.applied(trx, what), work);
  } catch (error) {
    const refusal = refusalOf(error);
    if (refusal === null || refusal.status >= 500 || refusal.status === 429) {
      await store.broke(what).catch(() => undefined);
      throw error;
    }
    return { status: refusal.status, json: JSON.stringify(problemOf(refusal, requestId)) };
  }
}
