import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** A secretary's word: who, when, and what was shown. Never changed but for its re-opening. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'confirmation', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    binaryId(table, 'session_id').notNullable();
    binaryId(table, 'user_id').notNullable();
    table.string('user_name', 80).notNullable();
    instant(table, 'confirmed_at').notNullable();
    table.json('shown').notNullable();
    exact(table, 'shown_sha256', 64).notNullable();
    // Checks that are worse than shown, by `lane/check`, each with its instant (ms) since when; a minute of it opens again.
    table.json('worse').notNullable();
    instant(table, 'reopened_at').nullable();
    table.json('reopened_because').nullable();
    table.primary(['centre_id', 'id']);
    table.index(['centre_id', 'session_id', 'confirmed_at'], 'confirmation_session');
    table.foreign(['centre_id', 'session_id'], 'confirmation_fk').references(['centre_id', 'id']).inTable('session').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('confirmation');
}
