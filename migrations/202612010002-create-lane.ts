import type { Knex } from 'knex';
import { binaryId, createTableOnce } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'lane', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.tinyint('lane').unsigned().notNullable();
    table.enum('family', ['free-fall', 'string']).notNullable();
    table.date('certified_until').nullable();
    // Whether stops of this lane are heard from its machine, logged by people, or not known at all: the base of rates.
    table.enum('stop_coverage', ['heard', 'logged', 'none']).notNullable();
    table.primary(['centre_id', 'lane']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('lane');
}
