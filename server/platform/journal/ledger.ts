import type { Knex } from 'knex';
import type { Fact, FactData, FactType, Person } from '#shared/domain/journal/fact.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Topic } from '#shared/realtime/events.ts';
import type { CentreRef } from '../http/route.ts';

/** A house at one sequence number. `state` is immutable. */
export interface HouseAt {
  state: House;
  seq: number;
  epoch: string;
}

/**
 * A fact that a person or job wants to record. `after` is the time of the newest fact about its subject: it comes 1 ms later at least.
 * `at` is for what is written down afterwards with its own time (a run recorded by hand): it stands there, like a late event.
 */
export type NewFact = { [T in FactType]: { type: T; data: FactData[T]; by: Person; after?: number; at?: number } }[FactType];

/** One element of a gateway's batch after validation: applied, or set aside with its reason and kept whole. */
export interface DeviceEntry {
  source: string;
  id: string;
  type: string;
  time: number;
  /** As the gateway said it, where its clock's error was taken off. */
  timeSent?: number;
  /** As sent. */
  raw: unknown;
  /** SHA-256 of the canonical element. */
  hash: Buffer;
  gateway: { id: string; name: string };
  /** Null when set aside. */
  data: FactData[FactType] | null;
  reason: string | null;
}

export type EntryResult = { outcome: 'accepted' } | { outcome: 'duplicate'; changed: boolean } | { outcome: 'set-aside'; reason: string };

export interface Decision<R> {
  facts: NewFact[];
  /** Further writes of the slice, in the same transaction. */
  write?: (trx: Knex.Transaction, seq: number) => Promise<void>;
  /** What screens must fetch again besides what the facts change. */
  topics?: Topic[];
  /** The answer, from the house after the facts. */
  result: (after: HouseAt) => R;
}

/** An event that was set aside, as it is to be applied now that its cause is mended. */
export type MendedEvent = { [T in FactType]: { source: string; id: string; type: T; time: number; data: FactData[T] } }[FactType];

export interface LedgerOptions {
  /** How long the caller waits before it is told that the database is away, ms. History that is loaded at once waits longer than people do. */
  deadlineMs?: number;
  /** Server time to record, epoch ms, where it isn't the clock's: history that is loaded. */
  now?: number;
}

/** The only door to the journal. Each call is one unit of work: journal, projections, counters and outbox change together or not at all. */
export interface Ledger {
  /** The house as of the last commit. */
  read(centre: CentreRef): Promise<HouseAt>;
  /** A gateway's batch. Waiting batches of a centre share one commit; answers come after it. */
  submit(centre: CentreRef, entries: DeviceEntry[], receivedAt: number, options?: LedgerOptions): Promise<EntryResult[]>;
  /**
   * A person's or job's action, decided under the centre's lock on the house as it is: returns facts to record, or throws a Refusal
   * and nothing is written. `write` and an empty `facts` serve changes that are no facts (a league is edited).
   */
  decide<R>(
    centre: CentreRef,
    decide: (house: HouseAt, now: number, trx: Knex.Transaction) => Promise<Decision<R>> | Decision<R>,
    options?: LedgerOptions,
  ): Promise<R>;
  /** Applies events that were set aside; answers how many still were. */
  mend(centre: CentreRef, events: MendedEvent[], by: Person): Promise<number>;
  /** Facts of a span of time in their order, for histories, replay and figures: [from, to). */
  facts(centre: CentreRef, from: number, to: number): Promise<Fact[]>;
}
