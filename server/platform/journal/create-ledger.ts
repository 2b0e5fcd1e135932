import type { Knex } from 'knex';
import type { Clock } from '../clock.ts';
import { addedBeforeCommit } from '../db/before-commit.ts';
import { isDatabaseAway } from '../db/errors.ts';
import { Refusal } from '../http/refusal.ts';
import type { CentreRef } from '../http/route.ts';
import { CentreQueue } from './centre-queue.ts';
import { readFacts } from './journal-store.ts';
import type { Decision, EntryResult, Ledger } from './ledger.ts';
import type { Work, WorkOf } from './work.ts';

/** Nobody waits longer for a database that is away. */
const DEADLINE_MS = 1_900;

const away = (): Refusal => new Refusal(503, 'database.away', { retryAfterS: 2 });
const asRefusal = (error: unknown): unknown => (isDatabaseAway(error) ? away() : error);

/** Waits for an answer no longer than this. What was begun may still be committed: a repeat is then a duplicate, or refused as done. */
function within<T>(ms: number, start: (answer: (value: T) => void, fail: (error: unknown) => void) => void): Promise<T> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => reject(away()), ms);
    const fail = (error: unknown) => {
      clearTimeout(timer);
      reject(asRefusal(error));
    };
    start((value) => {
      clearTimeout(timer);
      resolve(value);
    }, fail);
  });
}

type Decide<R> = (...given: Parameters<WorkOf<'decision'>['decide']>) => Promise<Decision<R>> | Decision<R>;

/** What the request adds to its unit of work (that its Idempotency-Key is used up) goes with its own decision, if that changes anything. */
function withOwnLast<R>(decide: Decide<R>): Decide<R> {
  const last = addedBeforeCommit();
  if (last === undefined) return decide;
  return async (...given) => {
    const decision = await decide(...given);
    if (decision.facts.length === 0 && !decision.write) return decision;
    return { ...decision, write: async (trx, seq) => {
      await decision.write?.(trx, seq);
      await last(trx);
    } };
  };
}

/** The ledger upon one database; see `Ledger`. One per process and database: it holds what the process remembers of each centre. */
export function createLedger({ db, clock }: { db: Knex; clock: Clock }): Ledger {
  const queues = new Map<string, CentreQueue>();
  const queueOf = (centre: CentreRef): CentreQueue => {
    const key = centre.id.toString('hex');
    const queue = queues.get(key) ?? new CentreQueue(db, centre);
    queues.set(key, queue);
    return queue.of(centre);
  };
  const wait = <T>(centre: CentreRef, ms: number, work: (answer: (value: T) => void, fail: (error: unknown) => void) => Work): Promise<T> =>
    within<T>(ms, (answer, fail) => queueOf(centre).add(work(answer, fail)));
  return {
    read: (centre) => within(DEADLINE_MS, (answer, fail) => void queueOf(centre).read(clock.now()).then(answer, fail)),
    submit: (centre, entries, receivedAt, options) =>
      wait<EntryResult[]>(centre, options?.deadlineMs ?? DEADLINE_MS, (answer, fail) => ({ kind: 'device', now: receivedAt, entries, answer, fail })),
    decide: (centre, decide, options) =>
      wait(centre, options?.deadlineMs ?? DEADLINE_MS, (answer, fail) => ({
        kind: 'decision', now: options?.now ?? clock.now(), decide: withOwnLast(decide), answer: answer as WorkOf<'decision'>['answer'], fail,
      })),
    mend: (centre, events, by) => wait<number>(centre, DEADLINE_MS, (answer, fail) => ({ kind: 'mended', now: clock.now(), events, by, answer, fail })),
    facts: (centre, from, to) => within(DEADLINE_MS, (answer, fail) => void readFacts(db, centre.id, { from, to }).then(answer, fail)),
  };
}
