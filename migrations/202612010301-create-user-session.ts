import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'user_session', (table) => {
    // The id is public (lists, revoking, rooms); the cookie's secret is kept as its SHA-256 only.
    binaryId(table, 'id').primary();
    table.specificType('secret_hash', 'binary(32)').notNullable().unique({ indexName: 'user_session_secret' });
    binaryId(table, 'user_id').notNullable().index('user_session_user').references('user.id').withKeyName('user_session_user_fk').onDelete('CASCADE');
    instant(table, 'created_at').notNullable();
    instant(table, 'seen_at').notNullable();
    instant(table, 'idle_until').notNullable();
    instant(table, 'ends_at').notNullable().index('user_session_ends');
    table.integer('idle_ms').unsigned().notNullable();
    table.string('agent', 200).notNullable();
    table.string('address', 64).notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('user_session');
}
