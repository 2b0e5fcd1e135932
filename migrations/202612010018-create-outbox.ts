import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** What each unit of work touched, until the relay has told the screens. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'outbox', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.bigInteger('seq').unsigned().notNullable();
    table.json('lanes').notNullable();
    table.json('topics').notNullable();
    instant(table, 'written_at').notNullable();
    table.primary(['centre_id', 'seq']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('outbox');
}
