import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'call', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    table.bigInteger('version').unsigned().notNullable();
    exact(table, 'call_key', 40).notNullable();
    table.enum('scope', ['lane', 'pair', 'house']).notNullable();
    table.tinyint('lane').unsigned().notNullable();
    exact(table, 'equipment', 20).notNullable();
    exact(table, 'safety', 20).nullable();
    table.json('lanes_held').notNullable();
    instant(table, 'raised_at').notNullable();
    instant(table, 'received_at').notNullable();
    table.json('raised_by').nullable();
    table.enum('origin', ['stop', 'fault', 'bowler', 'desk', 'mechanic']).notNullable();
    table.text('text').nullable();
    table.string('code', 64).nullable();
    table.enum('status', ['unanswered', 'acknowledged', 'on-lane', 'parked', 'out-of-service', 'closed']).notNullable();
    instant(table, 'acknowledged_at').nullable();
    table.json('acknowledged_by').nullable();
    instant(table, 'on_lane_at').nullable();
    table.json('on_lane_by').nullable();
    table.json('parked').nullable();
    table.json('out_of_service').nullable();
    instant(table, 'returned_at').nullable();
    instant(table, 'cleared_at').nullable();
    table.json('cleared_by').nullable();
    exact(table, 'cause', 60).nullable();
    table.text('note').nullable();
    table.json('lockout').nullable();
    table.json('stops').notNullable();
    table.json('steps').notNullable();
    table.json('raises').notNullable();
    instant(table, 'last_at').notNullable();
    table.primary(['centre_id', 'id']);
    table.index(['centre_id', 'raised_at'], 'call_raised');
    table.index(['centre_id', 'lane', 'raised_at'], 'call_lane');
    table.index(['centre_id', 'status'], 'call_status');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('call');
}
