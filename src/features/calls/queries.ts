import { queryOptions } from '@tanstack/react-query';
import { callContracts } from '#shared/contracts/calls.ts';
import { call } from '../../lib/api.ts';

/** Every key begins with `[centre, 'calls']`: a hint of that topic fetches again what is on screen. */
export const callsKey = (centre: string) => [centre, 'calls'] as const;

export const callsQuery = (centre: string) =>
  queryOptions({
    queryKey: [centre, 'calls', 'list'] as const,
    queryFn: ({ signal }) => call(callContracts.list, { params: { centre }, signal }),
  });

export const callQuery = (centre: string, id: string) =>
  queryOptions({
    queryKey: [centre, 'calls', id] as const,
    queryFn: ({ signal }) => call(callContracts.see, { params: { centre, call: id }, signal }),
  });
