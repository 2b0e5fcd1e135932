import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Counts by UTC quarter hour, lane and kind of use. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'quarter_counter', (table) => {
    binaryId(table, 'centre_id').notNullable();
    instant(table, 'quarter_at').notNullable();
    table.tinyint('lane').unsigned().notNullable();
    exact(table, 'kind', 16).notNullable();
    // Beginning of the use that the counts belong to, epoch ms; 0: unassigned.
    table.bigInteger('opened').notNullable();
    table.bigInteger('version').unsigned().notNullable();
    for (const count of ['deliveries', 'cycles', 'frames', 'frames_estimated', 'games']) table.integer(count).unsigned().notNullable();
    table.primary(['centre_id', 'quarter_at', 'lane', 'kind', 'opened']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('quarter_counter');
}
