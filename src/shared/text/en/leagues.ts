import { dayOfDate, laneRanges } from './formats.ts';
import type { CodeParams, Sentences } from './sentences.ts';

export const weekdays = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;
export const weekdayName = (weekday: number): string => weekdays[weekday - 1] ?? '';
export const kindNames = { league: 'League', tournament: 'Tournament', party: 'Party', open: 'Open play', practice: 'Practice', coaching: 'Coaching', maintenance: 'Maintenance' } as const;

const range = ({ from, to }: CodeParams): string => `${String(from)}–${String(to)}`;
const day = (params: CodeParams): string => dayOfDate(String(params['date']));

export const refusals: Sentences = {
  'league.unknown': () => 'There is no such league here.',
  'league.ended': () => 'This league has ended.',
  'league.name-taken': ({ name }) => `There is a league called ${String(name)} already.`,
  'league.lanes-reversed': (params) => `Lanes ${range(params)} run backwards. Put the lower lane first.`,
  'league.lanes-whole-pairs': (params) => `Lanes ${range(params)} cut a pair. A league has whole pairs: 1–2, 3–4 …`,
  'league.lanes-outside-house': ({ house }) => `This house has lanes 1 to ${String(house)}.`,
  'league.lanes-taken': (params) => `${String(params['name'])} has lane${params['from'] === params['to'] ? ` ${String(params['from'])}` : `s ${range(params)}`} on ${day(params)} at that time.`,
  'league.teams-exceed-lanes': ({ teams, lanes }) => `${String(teams)} teams need ${String(teams)} lanes, two on a pair; there are ${String(lanes)}.`,
  'league.absent-too-many': ({ bowlers }) => `A pair has ${String(bowlers)} names; some of them must bowl.`,
  'league.season-reversed': () => 'The last night is before the first.',
  'league.season-too-long': () => 'A season has at most 60 weeks.',
  'league.season-empty': () => 'No night is left: every date is skipped, or that weekday doesn’t come in between.',
  'league.start-in-missing-hour': (params) => `On ${day(params)} the clocks skip this hour. Skip that date, or start at another time.`,
  'league.date-invalid': (params) => `${String(params['date'] ?? 'This')} isn’t a date.`,
  'league.pattern-unknown': ({ pattern, revision }) => `There is no pattern ${String(pattern)}${revision === undefined ? '' : `, revision ${String(revision)}`}.`,
  'booking.cancelled': () => 'This session was cancelled.',
  'booking.past': (params) => (params['date'] === undefined ? 'This session is over.' : `That time on ${day(params)} has passed. Choose a later one.`),
  'booking.in-missing-hour': (params) => `On ${day(params)} the clocks skip this hour.`,
};

export const lanesOf = (lanes: readonly number[]): string => `Lanes ${laneRanges(lanes)}`;
export const clockChangeText = (minutes: number): string => (minutes > 0 ? 'clocks have gone back' : 'clocks have gone forward');
