import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import type { BodyOf } from '#shared/contracts/contract.ts';
import type { readinessContracts } from '#shared/contracts/readiness.ts';
import { CHECKS } from '#shared/domain/readiness/check.ts';
import { checkNames } from '#shared/text/en/readiness.ts';
import { readinessText as text } from '#shared/text/en/readiness-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Sheet } from '../../../ui/dialog.tsx';
import { Field, Select } from '../../../ui/field.tsx';
import { Skeleton } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useSetWeights } from '../mutations.ts';
import { weightsQuery } from '../queries.ts';

type Weights = BodyOf<typeof readinessContracts.setWeights>['weights'];
const CHOICES = Object.entries(text.weightNames);

/** Which checks hold, warn, or are ignored in this centre. */
export function WeightsSheet({ onClose }: { onClose: () => void }) {
  const { slug } = useCentre();
  const { data, error } = useQuery(weightsQuery(slug));
  return (
    <Sheet open onClose={onClose} title={text.weights} lead={text.weightsLead}>
      {data ? <WeightsForm start={data.weights} onDone={onClose} /> : error ? <Refused>{sentenceOf(error)}</Refused> : <Skeleton lines={6} label={text.loading} />}
    </Sheet>
  );
}

function WeightsForm({ start, onDone }: { start: Weights; onDone: () => void }) {
  const [draft, setDraft] = useState(start);
  const save = useSetWeights();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    save.mutate({ weights: draft }, { onSuccess: () => { showToast(text.saved); onDone(); } });
  };
  return (
    <form onSubmit={submit} className="flex flex-col gap-3">
      {CHECKS.map((check) => (
        <Field key={check} label={checkNames[check]}>
          {(control) => <Select {...control} options={CHOICES} value={draft[check]} onChange={(event) => setDraft({ ...draft, [check]: event.target.value as Weights[typeof check] })} />}
        </Field>
      ))}
      <Refused>{sentenceOf(save.error)}</Refused>
      <Button type="submit" kind="primary" size="hand" busy={save.isPending}>{text.save}</Button>
    </form>
  );
}
