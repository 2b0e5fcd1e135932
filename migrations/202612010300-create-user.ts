import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'user', (table) => {
    binaryId(table, 'id').primary();
    // Lower case; byte by byte, so that é and e are two people.
    exact(table, 'email', 254).notNullable().unique({ indexName: 'user_email' });
    table.string('name', 80).notNullable();
    table.string('password_hash', 200).notNullable();
    instant(table, 'created_at').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('user');
}
