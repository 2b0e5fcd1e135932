import type { Knex } from 'knex';
import { exact } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** A run is named by machine, code and the time at which it begins: 80, 80 and 13 characters. Done twice it changes nothing. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.alterTable('run', (table) => void exact(table, 'run_key', 176).notNullable().alter());
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.alterTable('run', (table) => void exact(table, 'run_key', 161).notNullable().alter());
}
