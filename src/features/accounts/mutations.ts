import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountContracts } from '#shared/contracts/accounts.ts';
import type { BodyOf } from '#shared/contracts/contract.ts';
import { call } from '../../lib/api.ts';
import { ownSessionsQuery } from './queries.ts';

/** Signs in; whatever was fetched as somebody else, or as nobody, is forgotten. */
export function useSignIn() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyOf<typeof accountContracts.signIn>) => call(accountContracts.signIn, { body }),
    onSuccess: () => queries.clear(),
  });
}

/** Changes the own password; the server ends all other sign-ins. */
export function useChangePassword() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyOf<typeof accountContracts.changePassword>) => call(accountContracts.changePassword, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: ownSessionsQuery.queryKey }),
  });
}

export function useEndSession() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (session: string) => call(accountContracts.endSession, { params: { session } }),
    onSettled: () => queries.invalidateQueries({ queryKey: ownSessionsQuery.queryKey }),
  });
}
