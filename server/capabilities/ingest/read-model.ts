import type { Knex } from 'knex';
import { findSetAside, readSetAside, type SetAsideRow } from '#server/platform/journal/set-aside-store.ts';

export interface SetAsideReads {
  list(centre: Buffer, limit: number): Promise<SetAsideRow[]>;
  find(centre: Buffer, source: string, id: string): Promise<SetAsideRow | null>;
}

export const setAsideReads = (db: Knex): SetAsideReads => ({
  list: (centre, limit) => readSetAside(db, centre, limit),
  find: (centre, source, id) => findSetAside(db, centre, source, id),
});
