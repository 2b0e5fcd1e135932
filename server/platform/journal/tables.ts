import type { Fact } from '#shared/domain/journal/fact.ts';

/** Rows of the core's tables as Knex reads and writes them. JSON columns take text and give values. */

export interface CentreHeadRow {
  centre_id: Buffer;
  seq: number;
  epoch: Buffer;
  fold_version: number;
  checkpoint_at: number;
}

export interface JournalRow {
  centre_id: Buffer;
  seq: number;
  n: number;
  source: string;
  id: string;
  type: string;
  stream: string;
  time_at: Date;
  time_sent: Date | null;
  received_at: Date;
  status: 'applied' | 'set-aside';
  reason: string | null;
  applied_at: Date | null;
  by_kind: NonNullable<Fact['by']>['kind'] | null;
  by_id: string | null;
  by_name: string | null;
  data: string | null;
  sent: string | null;
  content_hash: Buffer;
}

export interface CheckpointRow {
  centre_id: Buffer;
  at: number;
  fold_version: number;
  state: string;
  written_at: Date;
}

export interface OutboxRow {
  centre_id: Buffer;
  seq: number;
  lanes: number[];
  topics: string[];
  written_at: Date;
}

declare module 'knex/types/tables.js' {
  interface Tables {
    centre_head: CentreHeadRow;
    journal: JournalRow;
    stream_checkpoint: CheckpointRow;
    outbox: OutboxRow;
  }
}
