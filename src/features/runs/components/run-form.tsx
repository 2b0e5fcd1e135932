import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { fieldSentence } from '#shared/text/en/refusals.ts';
import { runFaults, runsText as text } from '#shared/text/en/runs-page.ts';
import { Problem } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { serverNow } from '../../../lib/clock.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input, Select } from '../../../ui/field.tsx';
import { usePlanRun, useRecordRun } from '../mutations.ts';
import { machinesQuery, patternsQuery } from '../queries.ts';
import { type DraftFaults, EMPTY_RUN, planOf, recordOf, type RunDraft } from '../run-draft.ts';

/** Plans a run, or writes down one that was made; lanes in their order, times on the wall of this night. */
export function RunForm({ made, onDone }: { made: boolean; onDone: () => void }) {
  const { slug, zone, cut } = useCentre();
  const machines = useQuery(machinesQuery(slug)).data?.machines ?? [];
  const patterns = useQuery(patternsQuery(slug)).data?.patterns ?? [];
  const [draft, setDraft] = useState(EMPTY_RUN);
  const [faults, setFaults] = useState<DraftFaults>({});
  const plan = usePlanRun();
  const record = useRecordRun();
  const { error, isPending } = made ? record : plan;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const night = { day: businessDayAt(serverNow(), zone, cut), zone };
    if (made) {
      const read = recordOf(draft, night);
      setFaults(read.ok ? {} : read.faults);
      if (read.ok) record.mutate(read.body, { onSuccess: onDone });
      return;
    }
    const read = planOf(draft, night);
    setFaults(read.ok ? {} : read.faults);
    if (read.ok) plan.mutate(read.body, { onSuccess: onDone });
  };
  const typed = (field: keyof RunDraft) => ({ value: draft[field], onChange: (event: { target: { value: string } }) => setDraft({ ...draft, [field]: event.target.value }) });
  const beside = (field: keyof RunDraft, ...names: string[]) => {
    const fault = faults[field];
    return fault ? runFaults[fault] : names.map((name) => fieldSentenceOf(error, name)).find(Boolean);
  };
  const reasons = error instanceof Problem && error.code === 'run.machine-cannot' ? error.fields.map((f) => fieldSentence(f.code, f.params)).join(' ') : '';
  return (
    <form noValidate onSubmit={submit} className="flex flex-col gap-4">
      <Field label={text.machine} error={reasons || beside('machine', 'machine')}>
        {(c) => <Select {...c} {...typed('machine')} empty={text.choose} options={machines.map((m) => [m.code, m.name] as const)} />}
      </Field>
      <Field label={text.pattern} error={beside('pattern', 'pattern')}>
        {(c) => <Select {...c} {...typed('pattern')} empty={made ? text.anyPattern : text.choosePattern} options={patterns.map((p) => [p.code, `${p.name} ${p.revision}`] as const)} />}
      </Field>
      <Field label={text.lanes} hint={text.lanesHint} error={beside('lanes', 'lanes', 'lanes/0', 'lanes/1')}>{(c) => <Input {...c} {...typed('lanes')} />}</Field>
      <Field label={made ? text.startedAt : text.start} error={beside('start', 'startAt', 'startedAt')}>{(c) => <Input {...c} type="time" {...typed('start')} />}</Field>
      {made ? (
        <>
          <Field label={text.finishedAt} error={beside('end', 'finishedAt')}>{(c) => <Input {...c} type="time" {...typed('end')} />}</Field>
          <Field label={text.skipped} hint={text.noneHint} error={beside('skipped')}>{(c) => <Input {...c} {...typed('skipped')} />}</Field>
          <Field label={text.broken} hint={text.noneHint} error={beside('broken')}>{(c) => <Input {...c} {...typed('broken')} />}</Field>
        </>
      ) : null}
      <Refused>{sentenceOf(error)}</Refused>
      <Button type="submit" kind="primary" size="hand" busy={isPending}>{made ? text.saveRecord : text.save}</Button>
    </form>
  );
}
