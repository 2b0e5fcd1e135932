import { queryOptions } from '@tanstack/react-query';
import { numbersContracts } from '#shared/contracts/numbers.ts';
import { call } from '../../lib/api.ts';

/** A running night is fetched again when figures change (hint) and at least every half minute. */
const RUNNING_MS = 30_000;

export const nightQuery = (centre: string, date: string) =>
  queryOptions({
    queryKey: [centre, 'figures', 'night', date] as const,
    queryFn: ({ signal }) => call(numbersContracts.night, { params: { centre, date }, signal }),
    refetchInterval: (query) => (query.state.data?.running ? RUNNING_MS : false),
  });

export const funnelQuery = (centre: string) =>
  queryOptions({
    queryKey: [centre, 'figures', 'lanes'] as const,
    queryFn: ({ signal }) => call(numbersContracts.lanes, { params: { centre }, signal }),
    staleTime: 10 * 60_000,
  });
