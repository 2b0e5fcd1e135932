import type { Knex } from 'knex';
import type { CheckName } from '#shared/domain/readiness/check.ts';
import type { Because, Shown, Worse } from '#shared/domain/readiness/confirmation.ts';
import type { ReadinessSettings } from '#shared/domain/readiness/settings.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { toBinary } from '#server/platform/db/uuid.ts';
import { type Concern, concernOfRow, type ConcernRow, type Confirmation, confirmationOfRow, type ConfirmationRow, type KeptVerdict, verdictOfRow, verdictToRow, type VerdictRow } from './rows.ts';

export type Weights = ReadinessSettings['weights'];

/** Everything that is kept of some sessions. */
export interface KeptOfSessions {
  verdicts: Map<string, KeptVerdict>;
  /** Newest last. */
  confirmations: Confirmation[];
  concerns: Concern[];
}

/** Own tables of readiness. Writers come through the ledger's `decide` and pass its transaction. */
export const readinessStore = {
  async kept(on: Knex, centreId: Buffer, sessions: readonly string[]): Promise<KeptOfSessions> {
    if (sessions.length === 0) return { verdicts: new Map(), confirmations: [], concerns: [] };
    const ids = sessions.map(toBinary);
    const verdicts = await on('session_verdict').where('centre_id', centreId).whereIn('session_id', ids).select<VerdictRow[]>('*');
    const confirmations = await on('confirmation').where('centre_id', centreId).whereIn('session_id', ids).orderBy(['confirmed_at', 'id']).select<ConfirmationRow[]>('*');
    const concerns = await on('concern').where('centre_id', centreId).whereIn('session_id', ids).orderBy(['raised_at', 'id']).select<ConcernRow[]>('*');
    return { verdicts: new Map(verdicts.map((row) => [verdictOfRow(row).session, verdictOfRow(row)])), confirmations: confirmations.map(confirmationOfRow), concerns: concerns.map(concernOfRow) };
  },

  async saveVerdict(trx: Knex, centreId: Buffer, kept: KeptVerdict): Promise<void> {
    await trx('session_verdict').insert(verdictToRow(centreId, kept)).onConflict(['centre_id', 'session_id']).merge();
  },

  async insertConfirmation(trx: Knex, centreId: Buffer, given: { id: string; session: string; by: Person; at: number; shown: Shown; hash: string }): Promise<void> {
    await trx('confirmation').insert({
      centre_id: centreId, id: toBinary(given.id), session_id: toBinary(given.session), user_id: toBinary(given.by.id), user_name: given.by.name.slice(0, 80),
      confirmed_at: toRowTime(given.at), shown: JSON.stringify(given.shown), shown_sha256: given.hash, worse: '{}', reopened_at: null, reopened_because: null,
    });
  },

  async markWorse(trx: Knex, centreId: Buffer, id: string, worse: Worse): Promise<void> {
    await trx('confirmation').where({ centre_id: centreId, id: toBinary(id) }).update({ worse: JSON.stringify(worse) });
  },

  async reopen(trx: Knex, centreId: Buffer, id: string, at: number, because: Because): Promise<void> {
    await trx('confirmation').where({ centre_id: centreId, id: toBinary(id) }).update({ reopened_at: toRowTime(at), reopened_because: JSON.stringify(because) });
  },

  async insertConcern(trx: Knex, centreId: Buffer, concern: Omit<Concern, 'settled'>): Promise<void> {
    await trx('concern').insert({
      centre_id: centreId, id: toBinary(concern.id), session_id: toBinary(concern.session), user_name: concern.by.slice(0, 80), raised_at: toRowTime(concern.at),
      text: concern.text, lane: concern.lane, settled_at: null, settled_by: null, settled_note: null,
    });
  },

  async concern(trx: Knex, centreId: Buffer, session: string, id: string): Promise<Concern | null> {
    const row = await trx<ConcernRow>('concern').where({ centre_id: centreId, session_id: toBinary(session), id: toBinary(id) }).first();
    return row ? concernOfRow(row) : null;
  },

  async settleConcern(trx: Knex, centreId: Buffer, id: string, settled: { by: string; at: number; note: string }): Promise<void> {
    await trx('concern').where({ centre_id: centreId, id: toBinary(id) }).update({ settled_at: toRowTime(settled.at), settled_by: settled.by.slice(0, 80), settled_note: settled.note });
  },

  async weights(on: Knex, centreId: Buffer, usual: Weights): Promise<Weights> {
    const rows = await on('readiness_weight').where('centre_id', centreId).select<{ check_name: CheckName; weight: Weights[CheckName] }[]>('check_name', 'weight');
    return { ...usual, ...Object.fromEntries(rows.filter((row) => row.check_name in usual).map((row) => [row.check_name, row.weight])) };
  },

  async setWeights(trx: Knex, centreId: Buffer, weights: Weights): Promise<void> {
    const rows = Object.entries(weights).map(([check_name, weight]) => ({ centre_id: centreId, check_name, weight }));
    await trx('readiness_weight').insert(rows).onConflict(['centre_id', 'check_name']).merge();
  },
};
