import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { businessDayAt, instantOfWall, addDays } from '#shared/domain/business-day.ts';
import { runsText as text } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { serverNow } from '../../../lib/clock.ts';
import { parseLanes } from '../../../lib/lane-list.ts';
import { Problem } from '../../../lib/api.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { fieldSentence } from '#shared/text/en/refusals.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input, Select } from '../../../ui/field.tsx';
import { usePlanRun, useRecordRun } from '../mutations.ts';
import { machinesQuery, patternsQuery } from '../queries.ts';

const minutesOf = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

/** Instant of a wall time of this business night: times before the cut belong to its small hours. */
function tonight(clock: string, zone: string): number | null {
  const day = businessDayAt(serverNow(), zone);
  const minutes = minutesOf(clock);
  if (!Number.isFinite(minutes) || clock === '') return null;
  const first = instantOfWall(day.date, minutes, zone);
  if (first.ok && first.instant >= day.from) return first.instant;
  const second = instantOfWall(addDays(day.date, 1), minutes, zone);
  return second.ok ? second.instant : null;
}

interface Draft {
  machine: string;
  pattern: string;
  lanes: string;
  start: string;
  end: string;
  skipped: string;
  broken: string;
}
const EMPTY: Draft = { machine: '', pattern: '', lanes: '', start: '', end: '', skipped: '', broken: '' };

/** Plans a run, or writes down one that was made; lanes in their order, times on the wall of this night. */
export function RunForm({ made, onDone }: { made: boolean; onDone: () => void }) {
  const { slug, zone } = useCentre();
  const machines = useQuery(machinesQuery(slug)).data?.machines ?? [];
  const patterns = useQuery(patternsQuery(slug)).data?.patterns ?? [];
  const [draft, setDraft] = useState(EMPTY);
  const [wrong, setWrong] = useState<string | null>(null);
  const plan = usePlanRun();
  const record = useRecordRun();
  const { error, isPending } = made ? record : plan;
  const set = (field: keyof Draft) => (event: { target: { value: string } }) => setDraft({ ...draft, [field]: event.target.value });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const lanes = parseLanes(draft.lanes);
    const start = tonight(draft.start, zone);
    setWrong(lanes === null ? text.lanesWrong : null);
    if (lanes === null || start === null) return;
    if (!made) return plan.mutate({ machine: draft.machine, pattern: draft.pattern, lanes, startAt: start }, { onSuccess: onDone });
    const end = tonight(draft.end, zone) ?? start;
    const skipped = parseLanes(draft.skipped) ?? [];
    const broken = parseLanes(draft.broken) ?? [];
    const outcome = (lane: number) => (broken.includes(lane) ? ('broken-off' as const) : skipped.includes(lane) ? ('skipped' as const) : ('dressed' as const));
    record.mutate({ machine: draft.machine, ...(draft.pattern ? { pattern: draft.pattern } : {}), startedAt: start, finishedAt: end, lanes: lanes.map((lane) => ({ lane, outcome: outcome(lane) })) }, { onSuccess: onDone });
  };
  const beside = (...names: string[]) => names.map((name) => fieldSentenceOf(error, name)).find(Boolean);
  const reasons = error instanceof Problem && error.code === 'run.machine-cannot' ? error.fields.map((f) => fieldSentence(f.code, f.params)) : [];
  return (
    <form noValidate onSubmit={submit} className="flex flex-col gap-4">
      <Field label={text.machine} error={reasons.length > 0 ? reasons.join(' ') : beside('machine')}>
        {(c) => <Select {...c} required value={draft.machine} onChange={set('machine')} empty={text.choose} options={machines.map((m) => [m.code, m.name] as const)} />}
      </Field>
      <Field label={text.pattern} error={beside('pattern')}>
        {(c) => <Select {...c} value={draft.pattern} onChange={set('pattern')} empty={made ? text.anyPattern : text.newest} options={patterns.map((p) => [p.code, `${p.name} ${p.revision}`] as const)} />}
      </Field>
      <Field label={text.lanes} hint={text.lanesHint} error={wrong ?? beside('lanes', 'lanes/0', 'lanes/1')}>{(c) => <Input {...c} value={draft.lanes} onChange={set('lanes')} />}</Field>
      <Field label={made ? text.startedAt : text.start} error={beside('startAt', 'startedAt')}>{(c) => <Input {...c} type="time" required value={draft.start} onChange={set('start')} />}</Field>
      {made ? (
        <>
          <Field label={text.finishedAt} error={beside('finishedAt')}>{(c) => <Input {...c} type="time" value={draft.end} onChange={set('end')} />}</Field>
          <Field label={text.skipped}>{(c) => <Input {...c} value={draft.skipped} onChange={set('skipped')} />}</Field>
          <Field label={text.broken}>{(c) => <Input {...c} value={draft.broken} onChange={set('broken')} />}</Field>
        </>
      ) : null}
      <Refused>{sentenceOf(error)}</Refused>
      <Button type="submit" kind="primary" size="hand" busy={isPending} disabled={draft.machine === '' || draft.start === '' || (!made && draft.pattern === '')}>{made ? text.saveRecord : text.save}</Button>
    </form>
  );
}
