import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { isAway, Problem } from '../lib/api.ts';
import { meQuery } from './session.ts';

/** A sign-in that ended meanwhile (revoked, too old) shows the sign-in page, wherever it is noticed. */
function noticeSignOut(client: () => QueryClient, error: unknown): void {
  if (error instanceof Problem && error.status === 401) client().setQueryData(meQuery.queryKey, null);
}

export function makeQueryClient(): QueryClient {
  const client: QueryClient = new QueryClient({
    queryCache: new QueryCache({ onError: (error) => noticeSignOut(() => client, error) }),
    mutationCache: new MutationCache({ onError: (error) => noticeSignOut(() => client, error) }),
    defaultOptions: {
      queries: { staleTime: 5000, retry: (count, error) => isAway(error) && count < 20, retryDelay: (count) => Math.min(4000, 500 * 2 ** count) },
      mutations: { retry: false },
    },
  });
  return client;
}
