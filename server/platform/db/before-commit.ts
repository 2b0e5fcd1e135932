import type { Knex } from 'knex';
import { AsyncLocalStorage } from 'node:async_hooks';

/** Written inside every unit of work of one request, last before its commit. */
type BeforeCommit = (trx: Knex.Transaction) => Promise<void>;

const current = new AsyncLocalStorage<BeforeCommit | undefined>();

/** Runs `work` so that each unit of work begun in it also does `last` in its transaction: both are kept or neither. */
export const withBeforeCommit = <T>(last: BeforeCommit, work: () => Promise<T>): Promise<T> => current.run(last, work);

/** For a worker that serves many requests and was woken by one: what that one adds isn't the others'. */
export const withoutBeforeCommit = <T>(work: () => T): T => current.run(undefined, work);

/** What the present request adds, for a queue to carry along with its own work. */
export const addedBeforeCommit = (): BeforeCommit | undefined => current.getStore();

/** For `unitOfWork` alone. */
export const beforeCommit = async (trx: Knex.Transaction): Promise<void> => current.getStore()?.(trx);
