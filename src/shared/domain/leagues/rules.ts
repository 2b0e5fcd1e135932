import { bowlersOnPair } from './frames.ts';
import { lanesBetween, pairRangeFault } from './lanes.ts';

/** A fault beside a field of a league, by its name in the form. */
export interface FieldFault {
  field: string;
  code: string;
  params: Record<string, string | number>;
}

export interface LeagueSize {
  fromLane: number;
  toLane: number;
  teams: number;
  bowlersATeam: number;
  absent: number;
}

/** What is wrong with lanes and teams of a league in a house of so many lanes; the dates are judged by `seasonOf`. */
export function leagueFaults(league: LeagueSize, houseLanes: number): FieldFault[] {
  const faults: FieldFault[] = [];
  const { fromLane, toLane, teams, bowlersATeam, absent } = league;
  const range = pairRangeFault(fromLane, toLane, houseLanes);
  if (range) faults.push({ field: range === 'league.lanes-outside-house' && fromLane >= 1 ? 'toLane' : 'fromLane', code: range, params: { from: fromLane, to: toLane, house: houseLanes } });
  else if (teams > toLane - fromLane + 1) faults.push({ field: 'teams', code: 'league.teams-exceed-lanes', params: { teams, lanes: lanesBetween(fromLane, toLane).length } });
  if (absent >= bowlersOnPair(bowlersATeam)) faults.push({ field: 'absent', code: 'league.absent-too-many', params: { bowlers: bowlersOnPair(bowlersATeam) } });
  return faults;
}
