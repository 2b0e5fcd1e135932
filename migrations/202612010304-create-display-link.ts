import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'display_link', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable().unique({ indexName: 'display_link_id' });
    table.string('name', 60).notNullable();
    table.specificType('token_hash', 'binary(32)').notNullable().unique({ indexName: 'display_link_token' });
    instant(table, 'created_at').notNullable();
    table.string('created_by', 80).notNullable();
    instant(table, 'seen_at').nullable();
    instant(table, 'revoked_at').nullable();
    table.primary(['centre_id', 'id']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('display_link');
}
