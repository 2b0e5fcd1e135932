import { queryOptions } from '@tanstack/react-query';
import { readinessContracts } from '#shared/contracts/readiness.ts';
import { call } from '../../lib/api.ts';

/** Hints say when something happened; that time alone makes a run late is noticed by asking now and then. */
const TIME_PASSES_MS = 15_000;

/** Every key begins with `[centre, 'sessions']`: a hint of that topic fetches again what is on screen. */
export const sessionsKey = (centre: string) => [centre, 'sessions'] as const;

export const sessionsQuery = (centre: string) =>
  queryOptions({
    queryKey: [centre, 'sessions', 'list'] as const,
    queryFn: ({ signal }) => call(readinessContracts.list, { params: { centre }, signal }),
    refetchInterval: TIME_PASSES_MS,
  });

export const sessionQuery = (centre: string, session: string) =>
  queryOptions({
    queryKey: [centre, 'sessions', session] as const,
    queryFn: ({ signal }) => call(readinessContracts.see, { params: { centre, session }, signal }),
    refetchInterval: TIME_PASSES_MS,
  });

export const weightsQuery = (centre: string) =>
  queryOptions({
    queryKey: [centre, 'settings', 'readiness-checks'] as const,
    queryFn: ({ signal }) => call(readinessContracts.weights, { params: { centre }, signal }),
  });
