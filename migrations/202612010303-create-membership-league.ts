import type { Knex } from 'knex';
import { binaryId, createTableOnce } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** A secretary's own leagues. Several people may hold one league: the secretary and delegates. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'membership_league', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'user_id').notNullable();
    binaryId(table, 'league_id').notNullable();
    table.primary(['centre_id', 'user_id', 'league_id']);
    table.index(['centre_id', 'league_id'], 'membership_league_league');
    table.foreign(['centre_id', 'user_id'], 'membership_league_fk').references(['centre_id', 'user_id']).inTable('membership').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('membership_league');
}
