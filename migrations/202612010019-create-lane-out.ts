import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** When which lane was out of service, and why: the one that lasts too. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'lane_out', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.tinyint('lane').unsigned().notNullable();
    instant(table, 'from_at').notNullable();
    table.bigInteger('version').unsigned().notNullable();
    // Null: still out.
    instant(table, 'to_at').nullable();
    table.string('reason', 300).notNullable();
    table.primary(['centre_id', 'lane', 'from_at']);
    table.index(['centre_id', 'to_at'], 'lane_out_to');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('lane_out');
}
