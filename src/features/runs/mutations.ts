import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { BodyOf } from '#shared/contracts/contract.ts';
import { type RevisionBody, runContracts } from '#shared/contracts/runs.ts';
import { call } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';

function useFetchAgain(topic: 'runs' | 'patterns'): () => Promise<void> {
  const { slug } = useCentre();
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: [slug, topic] });
}

export function usePlanRun() {
  const { slug: centre } = useCentre();
  return useMutation({ mutationFn: (body: BodyOf<typeof runContracts.plan>) => call(runContracts.plan, { params: { centre }, body }), onSuccess: useFetchAgain('runs') });
}

export function useRecordRun() {
  const { slug: centre } = useCentre();
  return useMutation({ mutationFn: (body: BodyOf<typeof runContracts.record>) => call(runContracts.record, { params: { centre }, body }), onSuccess: useFetchAgain('runs') });
}

export function useTakeBack() {
  const { slug: centre } = useCentre();
  return useMutation({
    mutationFn: ({ machine, run, reason }: { machine: string; run: string; reason: string }) => call(runContracts.cancel, { params: { centre, machine, run }, body: { reason } }),
    onSuccess: useFetchAgain('runs'),
  });
}

/** A new pattern (with code and name), or a new revision of the one named. */
export function useSavePattern() {
  const { slug: centre } = useCentre();
  return useMutation({
    mutationFn: ({ code, name, revision, note }: { code: string; name: string | null; revision: RevisionBody; note: string }) => {
      const said = note.trim() === '' ? {} : { note };
      return name === null
        ? call(runContracts.revise, { params: { centre, code }, body: { ...said, revision } })
        : call(runContracts.addPattern, { params: { centre }, body: { ...said, code, name, revision } });
    },
    onSuccess: useFetchAgain('patterns'),
  });
}
