import type { Knex } from 'knex';
import { addColumnOnce, dropColumnOnce } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** What a centre decides for itself; null, or a rule that is missing: common practice. */
export async function up(knex: Knex): Promise<void> {
  await addColumnOnce(knex, 'centre', 'rules', (table) => void table.json('rules').nullable());
}

export async function down(knex: Knex): Promise<void> {
  await dropColumnOnce(knex, 'centre', 'rules');
}
