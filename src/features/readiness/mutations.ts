import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { BodyOf } from '#shared/contracts/contract.ts';
import { readinessContracts as c, type SessionView } from '#shared/contracts/readiness.ts';
import { call, newKey } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';
import { sessionQuery, sessionsKey, weightsQuery } from './queries.ts';

/** What is done to one session answers with the session as it is then. */
function useSessionAction<B>(session: string, act: (centre: string, body: B) => Promise<SessionView>) {
  const { slug } = useCentre();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: B) => act(slug, body),
    onSuccess: (view) => client.setQueryData(sessionQuery(slug, session).queryKey, view),
    onSettled: () => client.invalidateQueries({ queryKey: sessionsKey(slug) }),
  });
}

export const useConfirm = (session: string) =>
  useSessionAction<void>(session, (centre) => call(c.confirm, { params: { centre, session }, idempotencyKey: newKey() }));

export const useConcern = (session: string) =>
  useSessionAction<BodyOf<typeof c.concern>>(session, (centre, body) => call(c.concern, { params: { centre, session }, body, idempotencyKey: newKey() }));

export const useSettle = (session: string) =>
  useSessionAction<{ concern: string; note: string }>(session, (centre, { concern, note }) => call(c.settle, { params: { centre, session, concern }, body: { note }, idempotencyKey: newKey() }));

export const useMovePair = (session: string) =>
  useSessionAction<BodyOf<typeof c.move>>(session, (centre, body) => call(c.move, { params: { centre, session }, body, idempotencyKey: newKey() }));

export function useSetWeights() {
  const { slug } = useCentre();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyOf<typeof c.setWeights>) => call(c.setWeights, { params: { centre: slug }, body }),
    onSuccess: (saved) => {
      client.setQueryData(weightsQuery(slug).queryKey, saved);
      return client.invalidateQueries({ queryKey: sessionsKey(slug) });
    },
  });
}
