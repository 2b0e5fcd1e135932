import { type QueryClient, useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useSyncExternalStore } from 'react';
import { callContracts } from '#shared/contracts/calls.ts';
import type { BodyOf } from '#shared/contracts/contract.ts';
import { call, newKey } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';
import { serverNow } from '../../lib/clock.ts';
import { type ActionKind, ActionQueue, type QueuedAction } from './action-queue.ts';
import { callQuery, callsKey } from './queries.ts';

const STORED = 'lanewright.calls.queue';

function load(): QueuedAction[] {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(STORED) ?? '[]');
    return Array.isArray(kept) ? (kept as QueuedAction[]) : [];
  } catch {
    return [];
  }
}

function save(waiting: readonly QueuedAction[]): void {
  try {
    localStorage.setItem(STORED, JSON.stringify(waiting));
  } catch {
    // A private window without storage keeps the queue for as long as the page lives.
  }
}

let client: QueryClient | null = null;

/** One queue for the whole page: an action is kept on the phone until the server has answered it. */
const queue = new ActionQueue({
  load,
  save,
  after: (ms, run) => {
    const timer = setTimeout(run, ms);
    return () => clearTimeout(timer);
  },
  send: (action) => call(callContracts[action.kind], { params: { centre: action.centre, call: action.call }, body: action.body as never, idempotencyKey: action.key }),
  onDone: (action, detail) => {
    client?.setQueryData(callQuery(action.centre, action.call).queryKey, detail);
    void client?.invalidateQueries({ queryKey: callsKey(action.centre) });
  },
});

/** Actions on calls by the person signed in: what waits, what was refused, and `act`. */
export function useCallActions() {
  const centre = useCentre();
  const me = centre.me;
  const state = useSyncExternalStore(queue.subscribe, queue.snapshot);
  const queryClient = useQueryClient();
  useEffect(() => {
    client = queryClient;
    if (me) queue.startFor(me.id);
    const back = () => void queue.flush();
    window.addEventListener('online', back);
    window.addEventListener('pageshow', back);
    return () => {
      window.removeEventListener('online', back);
      window.removeEventListener('pageshow', back);
    };
  }, [queryClient, me]);
  return useMemo(() => {
    const mine = state.waiting.filter((action) => action.user === me?.id && action.centre === centre.slug);
    return {
      waiting: mine,
      away: state.away && mine.length > 0,
      refused: state.refused,
      dismiss: (key: string) => queue.dismiss(key),
      act: (id: string, kind: ActionKind, body: QueuedAction['body'] = null) => {
        if (me) queue.add({ key: newKey(), user: me.id, centre: centre.slug, call: id, kind, body, madeAt: serverNow() });
      },
    };
  }, [state, me, centre.slug]);
}
export type CallActions = ReturnType<typeof useCallActions>;

/** Raises a call; the answer is the call, or the open one that it joined. */
export function useRaise() {
  const { slug } = useCentre();
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyOf<typeof callContracts.raise>) => call(callContracts.raise, { params: { centre: slug }, body, idempotencyKey: newKey() }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: callsKey(slug) }),
  });
}
