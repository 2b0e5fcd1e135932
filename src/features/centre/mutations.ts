import { useMutation, useQueryClient } from '@tanstack/react-query';
import { showToast } from '../../ui/toast.tsx';
import { settingsKey } from './queries.ts';

/**
 * Changes something of the centre; what is on screen of its settings is fetched again afterwards, also after a refusal.
 * `said` is shown when it is done: here, because a form that is made anew with what was saved no longer hears of it.
 */
export function useChange<Input, Answer>(centre: string, send: (input: Input) => Promise<Answer>, said?: string) {
  const queries = useQueryClient();
  return useMutation({ mutationFn: send, onSuccess: () => { if (said !== undefined) showToast(said); }, onSettled: () => queries.invalidateQueries({ queryKey: settingsKey(centre) }) });
}
