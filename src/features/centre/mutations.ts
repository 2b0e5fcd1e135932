import { useMutation, useQueryClient } from '@tanstack/react-query';
import { settingsKey } from './queries.ts';

/** Changes something of the centre; what is on screen of its settings is fetched again afterwards, also after a refusal. */
export function useChange<Input, Answer>(centre: string, send: (input: Input) => Promise<Answer>) {
  const queries = useQueryClient();
  return useMutation({ mutationFn: send, onSettled: () => queries.invalidateQueries({ queryKey: settingsKey(centre) }) });
}
