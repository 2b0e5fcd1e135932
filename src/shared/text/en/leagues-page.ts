import { dayOfDate, laneRanges, plural } from './formats.ts';
import { clockChangeText, weekdayName } from './leagues.ts';

/** Words of the pages of leagues. */
export const leaguesText = {
  loading: 'Leagues', failed: 'Leagues can’t be shown.', retry: 'Try again', back: 'All leagues', none: 'There is no league yet.', noneMore: 'A league makes the sessions of its season by itself.',
  add: 'New league', newTitle: 'A new league', edit: 'Change', ended: 'ended', create: 'Make the league', save: 'Save changes', saved: 'Saved.', end: 'End the league', endTitle: 'End this league?',
  endLead: 'Every session that is still to come is cancelled. What was bowled stays.', season: 'Season', sessions: 'Sessions', cancel: 'Cancel', cancelled: 'cancelled', byHand: 'set by hand',
  name: 'Name', weekday: 'Bowls on', start: 'Start', warmUp: 'Warm-up, minutes', fromLane: 'From lane', toLane: 'To lane', teams: 'Teams', bowlersATeam: 'Bowlers a team', games: 'Games',
  absent: 'Blinds and vacancies on a pair', crossesLanes: 'Teams change lanes every frame', firstDate: 'First night', lastDate: 'Last night', pattern: 'Pattern', anyPattern: 'Any pattern',
  revision: 'Revision', anyRevision: 'Any revision', fresh: 'Asks for fresh lanes', sanctioned: 'Sanctioned play', when: 'When', where: 'Where and how', lanes: 'What lies on the lanes',
  previewLead: 'Take the tick away where it doesn’t bowl.', repeated: 'this time comes twice, the first one counts', noSecretary: 'no secretary yet', whole: 'Whole pairs: 1–2, 3–4 …',
} as const;

export const leaguesTitle = (count: number): string => (count === 0 ? leaguesText.none : `${plural(count, 'league')} bowl${count === 1 ? 's' : ''} here.`);
export const leagueLine = (league: { weekday: number; fromLane: number; toLane: number; teams: number }, time: string): string =>
  `${weekdayName(league.weekday)}s ${time} · lanes ${league.fromLane}–${league.toLane} · ${plural(league.teams, 'team')}`;
export const seasonLine = (nights: number, next: string | null): string => `${plural(nights, 'night')}${next === null ? '' : `, next on ${next}`}`;
export const secretariesLine = (names: readonly string[]): string => (names.length === 0 ? leaguesText.noSecretary : names.join(', '));
export const patternLine = (code: string | null, revision: number | null, fresh: boolean): string =>
  `${code === null ? 'any pattern' : `${code}${revision === null ? '' : `, revision ${revision}`}`}${fresh ? ', fresh lanes' : ''}`;
export const nightLabel = (date: string): string => dayOfDate(date);
export const nightNote = (night: { clockChange: number; repeated: boolean }): string | null =>
  night.repeated ? leaguesText.repeated : night.clockChange === 0 ? null : clockChangeText(night.clockChange);
export const nightsText = (count: number): string => plural(count, 'night');
export const sessionLanes = (lanes: readonly number[]): string => `lanes ${laneRanges(lanes)}`;
export const cancelLabel = (date: string): string => `Cancel ${dayOfDate(date)}`;
export const cancelledToast = (date: string): string => `${dayOfDate(date)} is cancelled; its lanes are free.`;
export const skipLabel = (date: string): string => `Bowls on ${dayOfDate(date)}`;
