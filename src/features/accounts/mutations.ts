import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountContracts } from '#shared/contracts/accounts.ts';
import type { BodyOf } from '#shared/contracts/contract.ts';
import { call } from '../../lib/api.ts';

/** Signs in; whatever was fetched as somebody else, or as nobody, is forgotten. */
export function useSignIn() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyOf<typeof accountContracts.signIn>) => call(accountContracts.signIn, { body }),
    onSuccess: () => queries.clear(),
  });
}
