import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** What was done once for a business date of a centre. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'job_run', (table) => {
    binaryId(table, 'centre_id').notNullable();
    exact(table, 'job', 60).notNullable();
    table.date('business_date').notNullable();
    instant(table, 'done_at').notNullable();
    table.primary(['centre_id', 'job', 'business_date']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('job_run');
}
