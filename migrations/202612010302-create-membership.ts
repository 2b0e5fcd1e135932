import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'membership', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'user_id').notNullable().index('membership_user').references('user.id').withKeyName('membership_user_fk').onDelete('CASCADE');
    table.enum('role', ['manager', 'desk', 'mechanic', 'secretary']).notNullable();
    instant(table, 'created_at').notNullable();
    table.primary(['centre_id', 'user_id']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('membership');
}
