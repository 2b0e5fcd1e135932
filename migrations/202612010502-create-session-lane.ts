import type { Knex } from 'knex';
import { binaryId, createTableOnce } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Lanes of a session: neighbours as a rule, apart when a pair was moved. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'session_lane', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'session_id').notNullable();
    table.tinyint('lane').unsigned().notNullable();
    table.primary(['centre_id', 'session_id', 'lane']);
    table.foreign(['centre_id', 'session_id'], 'session_lane_fk').references(['centre_id', 'id']).inTable('session').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('session_lane');
}
