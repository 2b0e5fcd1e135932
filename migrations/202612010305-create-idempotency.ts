import type { Knex } from 'knex';
import { createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Repeats of a request with the same Idempotency-Key. `applied`: its effect is committed; `answered`: the answer is kept as well. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'idempotency', (table) => {
    exact(table, 'actor', 60).notNullable();
    exact(table, 'idempotency_key', 200).notNullable();
    table.specificType('request_hash', 'binary(32)').notNullable();
    table.enum('state', ['pending', 'applied', 'answered']).notNullable();
    table.smallint('status').unsigned().nullable();
    table.specificType('answer', 'mediumtext').nullable();
    instant(table, 'created_at').notNullable().index('idempotency_created');
    table.primary(['actor', 'idempotency_key']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('idempotency');
}
