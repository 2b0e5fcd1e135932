import type { Knex } from 'knex';
import { binaryId, createTableOnce, exact, flag, instant } from '../server/platform/db/schema.ts';

export const config = { transaction: false };

/** One evening on its lanes: a night of a league's season, or a booking by itself. */
export async function up(knex: Knex): Promise<void> {
  await createTableOnce(knex, 'session', (table) => {
    binaryId(table, 'centre_id').notNullable();
    binaryId(table, 'id').notNullable();
    binaryId(table, 'league_id').nullable();
    table.enum('kind', ['league', 'tournament', 'party', 'open', 'practice', 'coaching', 'maintenance']).notNullable();
    table.string('name', 60).notNullable();
    // The business day on which it starts, and the local date of its night in the season (null: no league).
    table.date('business_date').notNullable();
    table.date('season_date').nullable();
    instant(table, 'warm_up_at').notNullable();
    instant(table, 'start_at').notNullable();
    instant(table, 'end_at').notNullable();
    table.enum('status', ['booked', 'cancelled']).notNullable();
    // Lanes, time or cancelling were set by hand: a change of the league leaves them.
    flag(table, 'changed').notNullable();
    exact(table, 'pattern', 40).nullable();
    table.smallint('revision').unsigned().nullable();
    flag(table, 'fresh').notNullable();
    flag(table, 'sanctioned').notNullable();
    table.tinyint('teams').unsigned().nullable();
    // Format on a pair, for forecasts: names, games, and how many of them don't bowl.
    table.tinyint('bowlers').unsigned().nullable();
    table.tinyint('games').unsigned().nullable();
    table.tinyint('absent').unsigned().nullable();
    table.primary(['centre_id', 'id']);
    table.index(['centre_id', 'business_date'], 'session_business_date');
    table.index(['centre_id', 'warm_up_at'], 'session_warm_up');
    table.unique(['centre_id', 'league_id', 'season_date'], { indexName: 'session_season_night' });
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTableIfExists('session');
}
