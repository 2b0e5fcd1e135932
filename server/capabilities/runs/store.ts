import type { Knex } from 'knex';
import type { MachineCapability } from '#shared/domain/runs/capability.ts';
import type { PatternRevision } from '#shared/domain/runs/pattern.ts';
import { isDuplicate } from '#server/platform/db/errors.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';

export interface Machine {
  code: string;
  name: string;
  capabilities: MachineCapability;
}
export interface Pattern {
  code: string;
  name: string;
}
export interface Revision {
  code: string;
  revision: number;
  body: PatternRevision;
  note: string | null;
  by: string;
  at: number;
}

interface RevisionRow {
  code: string;
  revision: number;
  body: PatternRevision;
  note: string | null;
  written_by: string;
  written_at: Date;
}

export async function machinesOf(db: Knex, centreId: Buffer): Promise<Machine[]> {
  return db('machine').where({ centre_id: centreId }).orderBy('created_at').select<Machine[]>('code', 'name', 'capabilities');
}

/** False when the code is taken. */
export async function insertMachine(trx: Knex, centreId: Buffer, machine: Machine, now: number): Promise<boolean> {
  return once(() => trx('machine').insert({ centre_id: centreId, code: machine.code, name: machine.name, capabilities: JSON.stringify(machine.capabilities), created_at: toRowTime(now) }));
}

export async function patternsOf(db: Knex, centreId: Buffer): Promise<Pattern[]> {
  return db('pattern').where({ centre_id: centreId }).orderBy('name').select<Pattern[]>('code', 'name');
}

export async function revisionsOf(db: Knex, centreId: Buffer, code?: string): Promise<Revision[]> {
  const query = db('pattern_revision').where({ centre_id: centreId }).orderBy(['code', 'revision']);
  if (code !== undefined) void query.where({ code });
  const rows = (await query) as RevisionRow[];
  return rows.map((r) => ({ code: r.code, revision: r.revision, body: r.body, note: r.note, by: r.written_by, at: fromRowTime(r.written_at) }));
}

export async function insertPattern(trx: Knex, centreId: Buffer, pattern: Pattern, now: number): Promise<boolean> {
  return once(() => trx('pattern').insert({ centre_id: centreId, code: pattern.code, name: pattern.name, created_at: toRowTime(now) }));
}

export async function insertRevision(trx: Knex, centreId: Buffer, revision: Revision): Promise<boolean> {
  return once(() => trx('pattern_revision').insert({
    centre_id: centreId, code: revision.code, revision: revision.revision, body: JSON.stringify(revision.body), note: revision.note,
    written_by: revision.by, written_at: toRowTime(revision.at),
  }));
}

async function once(insert: () => Promise<unknown>): Promise<boolean> {
  try {
    await insert();
    return true;
  } catch (error) {
    if (isDuplicate(error, 'PRIMARY')) return false;
    throw error;
  }
}
