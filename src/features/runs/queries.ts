import { queryOptions } from '@tanstack/react-query';
import { runContracts } from '#shared/contracts/runs.ts';
import { call } from '../../lib/api.ts';

export const runsQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'runs', 'list'] as const, queryFn: ({ signal }) => call(runContracts.list, { params: { centre }, signal }) });
/** What is left to be dressed also changes as time passes and people leave their lanes. */
export const tonightQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'runs', 'tonight'] as const, queryFn: ({ signal }) => call(runContracts.tonight, { params: { centre }, signal }), refetchInterval: 20_000 });
export const machinesQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'runs', 'machines'] as const, queryFn: ({ signal }) => call(runContracts.machines, { params: { centre }, signal }) });
export const patternsQuery = (centre: string) =>
  queryOptions({ queryKey: [centre, 'patterns', 'list'] as const, queryFn: ({ signal }) => call(runContracts.patterns, { params: { centre }, signal }) });
export const patternQuery = (centre: string, code: string) =>
  queryOptions({ queryKey: [centre, 'patterns', code] as const, queryFn: ({ signal }) => call(runContracts.pattern, { params: { centre, code }, signal }) });
