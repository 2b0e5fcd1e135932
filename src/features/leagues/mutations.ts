import { useMutation, useQueryClient } from '@tanstack/react-query';
import { leagueContracts as c, type LeagueForm } from '#shared/contracts/leagues.ts';
import { call, newKey } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';
import { leagueQuery, leaguesKey } from './queries.ts';

/** Makes a league, or changes the one of this id. Answers with the league and its sessions. */
export function useSaveLeague(id: string | null) {
  const { slug } = useCentre();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: LeagueForm) =>
      id === null ? call(c.create, { params: { centre: slug }, body, idempotencyKey: newKey() }) : call(c.change, { params: { centre: slug, league: id }, body, idempotencyKey: newKey() }),
    onSuccess: (detail) => client.setQueryData(leagueQuery(slug, detail.league.id).queryKey, detail),
    onSettled: () => client.invalidateQueries({ queryKey: leaguesKey(slug) }),
  });
}

export function useEndLeague(id: string) {
  const { slug } = useCentre();
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(c.end, { params: { centre: slug, league: id }, idempotencyKey: newKey() }),
    onSettled: () => client.invalidateQueries({ queryKey: leaguesKey(slug) }),
  });
}

export function useCancelSession() {
  const { slug } = useCentre();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (session: string) => call(c.cancel, { params: { centre: slug, session }, idempotencyKey: newKey() }),
    onSettled: () => client.invalidateQueries({ queryKey: leaguesKey(slug) }),
  });
}
