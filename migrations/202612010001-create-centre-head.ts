import type { Knex } from 'knex';
import { binaryId, createTableOnce } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** The row that every unit of work of a centre locks first: its sequence number, and the epoch that a rebuild changes. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'centre_head', (table) => {
    binaryId(table, 'centre_id').primary();
    table.bigInteger('seq').unsigned().notNullable().defaultTo(0);
    binaryId(table, 'epoch').notNullable();
    table.integer('fold_version').unsigned().notNullable();
    // Of the newest checkpoint, epoch ms; 0: none.
    table.bigInteger('checkpoint_at').notNullable().defaultTo(0);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('centre_head');
}
