import { queryOptions } from '@tanstack/react-query';
import { accountContracts } from '#shared/contracts/accounts.ts';
import { centreContracts } from '#shared/contracts/centre.ts';
import { ingestContracts } from '#shared/contracts/ingest.ts';
import { call } from '../../lib/api.ts';

/** Every key begins with `[centre, 'settings']`: a hint of that topic, or a change made here, fetches again what is on screen. */
export const settingsKey = (centre: string) => [centre, 'settings'] as const;

export const settingsQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'settings', 'all'] as const, queryFn: ({ signal }) => call(centreContracts.settings, { params: { centre }, signal }) });

export const setAsideQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'settings', 'set-aside'] as const, queryFn: ({ signal }) => call(ingestContracts.setAside, { params: { centre }, signal }) });

export const peopleQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'settings', 'people'] as const, queryFn: ({ signal }) => call(accountContracts.people, { params: { centre }, signal }) });

export const displaysQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'settings', 'displays'] as const, queryFn: ({ signal }) => call(accountContracts.displays, { params: { centre }, signal }) });
