import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, flag, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'run_lane', (table) => {
    binaryId(table, 'centre_id').notNullable();
    exact(table, 'run_key', 161).notNullable();
    table.tinyint('lane').unsigned().notNullable();
    table.bigInteger('version').unsigned().notNullable();
    table.smallint('position').unsigned().notNullable();
    table.enum('outcome', ['dressed', 'skipped', 'broken-off']).notNullable();
    instant(table, 'started_at').nullable();
    instant(table, 'finished_at').nullable();
    // Volumes in µL; null: not told.
    for (const volume of ['a_ul', 'b_ul', 'cleaner_ul']) table.integer(volume).unsigned().nullable();
    flag(table, 'measured').notNullable();
    table.string('reason', 300).nullable();
    table.primary(['centre_id', 'run_key', 'lane']);
    table.index(['centre_id', 'lane', 'finished_at'], 'run_lane_lane');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('run_lane');
}
