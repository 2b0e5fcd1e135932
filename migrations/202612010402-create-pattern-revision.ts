import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** What a revision of a pattern says. Rows are added and never changed. Volumes inside are whole µL. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'pattern_revision', (table) => {
    binaryId(table, 'centre_id').notNullable();
    exact(table, 'code', 40).notNullable();
    table.integer('revision').unsigned().notNullable();
    table.json('body').notNullable();
    table.string('note', 300).nullable();
    table.string('written_by', 80).notNullable();
    instant(table, 'written_at').notNullable();
    table.primary(['centre_id', 'code', 'revision']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('pattern_revision');
}
