import type { Knex } from 'knex';
import { binaryId, createTableOnce, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/**
 * The last verdict of readiness, which is otherwise computed when read: for its transitions, for mails, and because it is frozen from
 * warm-up on. `lanes` is what every check said then.
 */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'session_verdict', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'session_id').notNullable();
    table.enum('verdict', ['planned', 'at-risk', 'held', 'ready']).notNullable();
    instant(table, 'since').notNullable();
    table.json('lanes').notNullable();
    table.json('transitions').notNullable();
    instant(table, 'frozen_at').nullable();
    instant(table, 'told_held_60_at').nullable();
    instant(table, 'told_held_30_at').nullable();
    instant(table, 'told_ready_at').nullable();
    table.primary(['centre_id', 'session_id']);
    table.foreign(['centre_id', 'session_id'], 'session_verdict_fk').references(['centre_id', 'id']).inTable('session').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('session_verdict');
}
