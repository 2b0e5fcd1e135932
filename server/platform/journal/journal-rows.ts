import { createHash } from 'node:crypto';
import type { Fact, FactData, FactType, Person } from '#shared/domain/journal/fact.ts';
import { newId } from '../db/uuid.ts';
import type { DeviceEntry, NewFact } from './ledger.ts';
import type { JournalRow } from './tables.ts';

/** Where a row stands: unit of work and place in it. */
interface Place {
  seq: number;
  n: number;
}

/** What a fact is about, for whoever reads the journal. */
export function streamOf(type: string, data: FactData[FactType]): string {
  const said = data as Record<string, unknown>;
  const place = ['call', 'session', 'machine', 'lane', 'from'].find((key) => said[key] !== undefined);
  if (!place) return type.startsWith('gateway.') ? 'gateway' : '';
  return `${place === 'from' ? 'lane' : place}:${String(said[place])}`;
}

const byColumns = (by: Person | null) => ({ by_kind: by?.kind ?? null, by_id: by?.id ?? null, by_name: by?.name ?? null });

/** A gateway's event as a fact and its row; no fact when it is set aside. */
export function entered(centre: Buffer, entry: DeviceEntry, receivedAt: number, { seq, n }: Place): { fact: Fact | null; row: JournalRow } {
  const by: Person = { kind: 'gateway', id: entry.gateway.id, name: entry.gateway.name };
  const { source, id, type, time, data } = entry;
  const row: JournalRow = {
    centre_id: centre, seq, n, source, id, type, stream: data ? streamOf(type, data) : '', time_at: new Date(time),
    time_sent: entry.timeSent === undefined ? null : new Date(entry.timeSent), received_at: new Date(receivedAt),
    status: data ? 'applied' : 'set-aside', reason: data ? null : entry.reason, applied_at: null, ...byColumns(by),
    data: data && JSON.stringify(data), sent: JSON.stringify(entry.raw), content_hash: entry.hash,
  };
  return { row, fact: data && ({ seq, n, source, id, type, time, receivedAt, by, data } as Fact) };
}

/** What a person or job did as a fact and its row. Ids rise within a millisecond, so facts of one decision keep their order. */
export function decided(centre: Buffer, given: NewFact, now: number, { seq, n }: Place): { fact: Fact; row: JournalRow } {
  const { type, data, by } = given;
  const time = given.at ?? Math.max(now, (given.after ?? -Infinity) + 1);
  const source = `lanewright/${by.kind}/${by.id}`;
  const id = newId();
  const text = JSON.stringify(data);
  const row: JournalRow = {
    centre_id: centre, seq, n, source, id, type, stream: streamOf(type, data), time_at: new Date(time), time_sent: null, received_at: new Date(now),
    status: 'applied', reason: null, applied_at: null, ...byColumns(by), data: text, sent: null, content_hash: createHash('sha256').update(text).digest(),
  };
  return { row, fact: { seq, n, source, id, type, time, receivedAt: now, by, data } as Fact };
}
