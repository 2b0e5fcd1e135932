import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Who had which lane from when till when: the one that lasts too. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'lane_use', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.tinyint('lane').unsigned().notNullable();
    instant(table, 'from_at').notNullable();
    table.bigInteger('version').unsigned().notNullable();
    exact(table, 'kind', 16).notNullable();
    // Null: still on the lane.
    instant(table, 'to_at').nullable();
    instant(table, 'last_delivery_at').nullable();
    table.smallint('bowlers').unsigned().nullable();
    table.string('label', 120).nullable();
    instant(table, 'until_at').nullable();
    table.smallint('games').unsigned().nullable();
    table.enum('opened_by', ['user', 'gateway', 'job']).notNullable();
    table.primary(['centre_id', 'lane', 'from_at']);
    table.index(['centre_id', 'from_at'], 'lane_use_from');
    table.index(['centre_id', 'to_at'], 'lane_use_to');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('lane_use');
}
