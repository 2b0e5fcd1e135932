import type { Knex } from 'knex';
import { addIndexOnce, dropIndexOnce } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Calls that ended in a business day, for the list under the open ones. */
export async function up(knex: Knex): Promise<void> {
  await addIndexOnce(knex, 'call', 'call_ended', (table) => table.index(['centre_id', 'status', 'last_at'], 'call_ended'));
}

export async function down(knex: Knex): Promise<void> {
  await dropIndexOnce(knex, 'call', 'call_ended');
}
