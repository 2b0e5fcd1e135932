import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'gateway', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    table.string('name', 80).notNullable();
    instant(table, 'created_at').notNullable();
    instant(table, 'heard_at').nullable();
    instant(table, 'started_at').nullable();
    table.integer('queued').unsigned().nullable();
    table.bigInteger('uptime_s').unsigned().nullable();
    // Gateway's clock minus ours, ms; null: never measured.
    table.bigInteger('clock_error_ms').nullable();
    // Events that came a second time with other content, and when the last one did.
    table.integer('changed_repeats').unsigned().notNullable().defaultTo(0);
    instant(table, 'changed_repeat_at').nullable();
    // By source: { seen, missing: [[from, to], …] } of CloudEvents' sequence extension.
    table.json('sequences').notNullable();
    table.primary(['centre_id', 'id']);
    table.unique(['centre_id', 'name'], { indexName: 'gateway_name' });
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('gateway');
}
