import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Which checks hold, warn or are ignored, where a centre has said otherwise than usual. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'readiness_weight', (table) => {
    binaryId(table, 'centre_id').notNullable();
    exact(table, 'check_name', 40).notNullable();
    table.enum('weight', ['holds', 'warns', 'ignored']).notNullable();
    table.primary(['centre_id', 'check_name']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('readiness_weight');
}
