import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, flag } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'lane_state', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.tinyint('lane').unsigned().notNullable();
    table.bigInteger('version').unsigned().notNullable();
    table.json('use_now').nullable();
    table.json('progress').nullable();
    table.enum('power', ['on', 'off', 'unknown']).notNullable();
    table.json('stop').nullable();
    flag(table, 'bumpers').notNullable();
    table.json('out_of_service').nullable();
    table.json('dressed').nullable();
    table.json('broken_off').nullable();
    table.integer('deliveries_since').unsigned().notNullable();
    table.json('deliveries_since_by').notNullable();
    table.bigInteger('frames_ever').unsigned().notNullable();
    table.json('stop_marks').notNullable();
    table.json('hears').notNullable();
    exact(table, 'source', 255).nullable();
    table.bigInteger('last_at').notNullable();
    table.primary(['centre_id', 'lane']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('lane_state');
}
