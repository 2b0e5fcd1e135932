import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'gateway_key', (table) => {
    // SHA-256 of the key; the key itself is shown once and kept nowhere.
    table.specificType('hash', 'binary(32)').primary();
    binaryId(table, 'id').notNullable().unique({ indexName: 'gateway_key_id' });
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'gateway_id').notNullable();
    instant(table, 'created_at').notNullable();
    instant(table, 'revoked_at').nullable();
    table.foreign(['centre_id', 'gateway_id'], 'gateway_key_gateway_fk').references(['centre_id', 'id']).inTable('gateway').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('gateway_key');
}
