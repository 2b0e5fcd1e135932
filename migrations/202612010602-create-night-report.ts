import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** One report a business date, as it was issued after the cut; it never changes. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'night_report', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.date('business_date').notNullable();
    instant(table, 'issued_at').notNullable();
    table.json('figures').notNullable();
    table.primary(['centre_id', 'business_date']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('night_report');
}
