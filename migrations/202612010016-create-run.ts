import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'run', (table) => {
    binaryId(table, 'centre_id').notNullable();
    // machine/run: the code a machine gave it is unique with the machine only.
    exact(table, 'run_key', 161).notNullable();
    table.bigInteger('version').unsigned().notNullable();
    exact(table, 'machine', 80).notNullable();
    exact(table, 'run', 80).notNullable();
    exact(table, 'pattern', 80).nullable();
    table.integer('revision').unsigned().nullable();
    table.json('lanes').nullable();
    table.enum('status', ['planned', 'under-way', 'finished', 'aborted', 'cancelled']).notNullable();
    instant(table, 'planned_start').nullable();
    instant(table, 'started_at').nullable();
    instant(table, 'ended_at').nullable();
    table.string('reason', 300).nullable();
    table.enum('entered', ['gateway', 'hand']).notNullable();
    instant(table, 'last_at').notNullable();
    table.primary(['centre_id', 'run_key']);
    table.index(['centre_id', 'last_at'], 'run_last');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('run');
}
