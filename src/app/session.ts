import { queryOptions } from '@tanstack/react-query';
import { accountContracts, type Identity } from '#shared/contracts/accounts.ts';
import { call, Problem } from '../lib/api.ts';

/** Who is signed in; null when nobody is. A server that is away is an error, not a sign-out. */
export const meQuery = queryOptions({
  queryKey: ['me'],
  queryFn: async (): Promise<Identity | null> => {
    try {
      return await call(accountContracts.me);
    } catch (error) {
      if (error instanceof Problem && error.status === 401) return null;
      throw error;
    }
  },
  staleTime: 60_000,
});

export const signOut = () => call(accountContracts.signOut);
