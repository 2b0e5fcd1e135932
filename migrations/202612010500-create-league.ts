import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, flag, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'league', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    table.string('name', 60).notNullable();
    // 1 = Monday … 7 = Sunday; start in minutes after local midnight: the wall time stays, whatever the clocks do.
    table.tinyint('weekday').unsigned().notNullable();
    table.smallint('start_minutes').unsigned().notNullable();
    table.smallint('warm_up_minutes').unsigned().notNullable();
    table.tinyint('from_lane').unsigned().notNullable();
    table.tinyint('to_lane').unsigned().notNullable();
    table.tinyint('teams').unsigned().notNullable();
    table.tinyint('bowlers_a_team').unsigned().notNullable();
    table.tinyint('games').unsigned().notNullable();
    table.tinyint('absent').unsigned().notNullable();
    flag(table, 'crosses_lanes').notNullable();
    table.date('first_date').notNullable();
    table.date('last_date').notNullable();
    table.json('skip_dates').notNullable();
    exact(table, 'pattern', 40).nullable();
    table.smallint('revision').unsigned().nullable();
    flag(table, 'fresh').notNullable();
    flag(table, 'sanctioned').notNullable();
    instant(table, 'created_at').notNullable();
    instant(table, 'ended_at').nullable();
    table.primary(['centre_id', 'id']);
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('league');
}
