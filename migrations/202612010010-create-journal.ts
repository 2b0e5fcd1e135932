import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** Everything that happened in a centre, once. Append-only, but that a row which was set aside moves to the end when it is applied. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'journal', (table) => {
    binaryId(table, 'centre_id').notNullable();
    table.bigInteger('seq').unsigned().notNullable();
    table.smallint('n').unsigned().notNullable();
    exact(table, 'source', 255).notNullable();
    exact(table, 'id', 255).notNullable();
    exact(table, 'type', 64).notNullable();
    // What it is about: lane:12, machine:M1, call:…, session:…, gateway.
    exact(table, 'stream', 128).notNullable();
    // Place in time; for a dressed lane its end. time_sent: as the gateway said it, where its clock was corrected.
    instant(table, 'time_at').notNullable();
    instant(table, 'time_sent').nullable();
    instant(table, 'received_at').notNullable();
    table.enum('status', ['applied', 'set-aside']).notNullable();
    exact(table, 'reason', 64).nullable();
    // Set for one that was set aside first: when it was applied after all.
    instant(table, 'applied_at').nullable();
    table.enum('by_kind', ['user', 'gateway', 'job']).nullable();
    exact(table, 'by_id', 64).nullable();
    table.string('by_name', 80).nullable();
    // What the folds read; null while set aside. As text: nobody asks the database for a part of it.
    table.text('data', 'mediumtext').nullable();
    // The element as the gateway sent it, whole; null for what people and jobs do.
    table.text('sent', 'mediumtext').nullable();
    table.specificType('content_hash', 'binary(32)').notNullable();
    table.primary(['centre_id', 'seq', 'n']);
    table.unique(['centre_id', 'source', 'id'], { indexName: 'journal_event' });
    table.index(['centre_id', 'status', 'time_at'], 'journal_time');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('journal');
}
