import type { Knex } from 'knex';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { Decision, DeviceEntry, EntryResult, HouseAt, MendedEvent } from './ledger.ts';

interface Waiting {
  /** Received time of events, server time of a decision; epoch ms. */
  now: number;
  fail: (error: unknown) => void;
}

/** What waits for a centre's next unit of work. `answer` is called after the commit, `fail` when there is none. */
export type Work = Waiting & (
  | { kind: 'device'; entries: readonly DeviceEntry[]; answer: (results: EntryResult[]) => void }
  | { kind: 'mended'; events: readonly MendedEvent[]; by: Person; answer: (applied: number) => void }
  | { kind: 'decision'; decide: (house: HouseAt, now: number, trx: Knex.Transaction) => Promise<Decision<unknown>> | Decision<unknown>; answer: (result: unknown) => void }
  | { kind: 'look'; answer: () => void }
);

export type WorkOf<K extends Work['kind']> = Extract<Work, { kind: K }>;
