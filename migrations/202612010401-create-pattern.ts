import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'pattern', (table) => {
    binaryId(table, 'centre_id').notNullable();
    exact(table, 'code', 40).notNullable();
    table.string('name', 60).notNullable();
    instant(table, 'created_at').notNullable();
    table.primary(['centre_id', 'code']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('pattern');
}
