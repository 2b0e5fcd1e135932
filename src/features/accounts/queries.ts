import { queryOptions } from '@tanstack/react-query';
import { accountContracts } from '#shared/contracts/accounts.ts';
import { call } from '../../lib/api.ts';

/** Where one is signed in. */
export const ownSessionsQuery = queryOptions({ queryKey: ['me', 'sessions'] as const, queryFn: ({ signal }) => call(accountContracts.sessions, { signal }) });
