import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Lane machines of a centre and what they can do, from the machine's record. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'machine', (table) => {
    binaryId(table, 'centre_id').notNullable();
    exact(table, 'code', 40).notNullable();
    table.string('name', 60).notNullable();
    table.json('capabilities').notNullable();
    instant(table, 'created_at').notNullable();
    table.primary(['centre_id', 'code']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('machine');
}
