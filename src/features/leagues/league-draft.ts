import type { LeagueForm, LeagueView } from '#shared/contracts/leagues.ts';
import { addDays } from '#shared/domain/business-day.ts';

/** A season of thirty weeks, two teams of four on a pair, three games: what most leagues are; everything can be changed. */
const SEASON_DAYS = 7 * 29;

export const newLeague = (today: string, lanes: number): LeagueForm => ({
  name: '', weekday: 1, startMinutes: 19 * 60, warmUpMinutes: 10, fromLane: 1, toLane: Math.min(8, lanes - (lanes % 2)), teams: Math.min(8, lanes - (lanes % 2)), bowlersATeam: 4, games: 3,
  absent: 0, crossesLanes: true, firstDate: addDays(today, 1), lastDate: addDays(today, 1 + SEASON_DAYS), skipDates: [], pattern: null, revision: null, fresh: false, sanctioned: false,
});

/** The form of a league that exists. */
export function draftOf({ id: _id, nights: _nights, nextAt: _next, ended: _ended, secretaries: _secretaries, ...form }: LeagueView): LeagueForm {
  return form;
}
