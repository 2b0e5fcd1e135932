import { queryOptions } from '@tanstack/react-query';
import { leagueContracts } from '#shared/contracts/leagues.ts';
import { call } from '../../lib/api.ts';

/** Every key begins with `[centre, 'leagues']`: a hint of that topic fetches again what is on screen. */
export const leaguesKey = (centre: string) => [centre, 'leagues'] as const;

export const leaguesQuery = (centre: string) =>
  queryOptions({
    queryKey: [centre, 'leagues', 'list'] as const,
    queryFn: ({ signal }) => call(leagueContracts.list, { params: { centre }, signal }),
  });

export const leagueQuery = (centre: string, league: string) =>
  queryOptions({
    queryKey: [centre, 'leagues', league] as const,
    queryFn: ({ signal }) => call(leagueContracts.see, { params: { centre, league }, signal }),
  });
