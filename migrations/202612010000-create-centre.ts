import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'centre', (table) => {
    binaryId(table, 'id').primary();
    exact(table, 'slug', 40).notNullable().unique({ indexName: 'centre_slug' });
    table.string('name', 80).notNullable();
    exact(table, 'zone', 64).notNullable();
    // Minutes after local midnight at which a business day begins; a multiple of 15, as counts are kept by quarter hour.
    table.smallint('cut').unsigned().notNullable();
    table.tinyint('lanes').unsigned().notNullable();
    // Seven entries, Monday first: [from, to] in minutes after local midnight, null when closed.
    table.json('opening').notNullable();
    instant(table, 'created_at').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('centre');
}
