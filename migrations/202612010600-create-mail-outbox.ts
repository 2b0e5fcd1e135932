import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** One row a message and recipient; the key keeps one occasion from being mailed twice. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'mail_outbox', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    exact(table, 'mail_key', 160).notNullable();
    exact(table, 'recipient', 254).notNullable();
    exact(table, 'message_id', 190).notNullable();
    table.string('subject', 200).notNullable();
    table.text('text_body').notNullable();
    table.text('html_body').notNullable();
    instant(table, 'created_at').notNullable();
    instant(table, 'next_try_at').notNullable();
    instant(table, 'sent_at').nullable();
    table.integer('attempts').unsigned().notNullable().defaultTo(0);
    table.string('last_error', 300).nullable();
    table.primary(['centre_id', 'id']);
    table.unique(['centre_id', 'mail_key', 'recipient'], { indexName: 'mail_outbox_once' });
    table.index(['sent_at', 'next_try_at'], 'mail_outbox_due');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('mail_outbox');
}
