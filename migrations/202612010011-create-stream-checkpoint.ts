import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'stream_checkpoint', (table) => {
    binaryId(table, 'centre_id').notNullable();
    // A business-day cut, epoch ms: all facts before it are folded in.
    table.bigInteger('at').notNullable();
    table.integer('fold_version').unsigned().notNullable();
    table.text('state', 'longtext').notNullable();
    instant(table, 'written_at').notNullable();
    table.primary(['centre_id', 'at']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('stream_checkpoint');
}
