import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** What a secretary isn't content with, and how the desk settled it. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'concern', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    binaryId(table, 'session_id').notNullable();
    table.string('user_name', 80).notNullable();
    instant(table, 'raised_at').notNullable();
    table.string('text', 500).notNullable();
    table.tinyint('lane').unsigned().nullable();
    instant(table, 'settled_at').nullable();
    table.string('settled_by', 80).nullable();
    table.string('settled_note', 300).nullable();
    table.primary(['centre_id', 'id']);
    table.index(['centre_id', 'session_id', 'raised_at'], 'concern_session');
    table.foreign(['centre_id', 'session_id'], 'concern_fk').references(['centre_id', 'id']).inTable('session').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('concern');
}
