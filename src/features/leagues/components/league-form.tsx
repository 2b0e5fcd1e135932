import { type UseFormReturn, useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { type LeagueForm as Form, leagueForm } from '#shared/contracts/leagues.ts';
import { weekdays } from '#shared/text/en/leagues.ts';
import { wallTime } from '#shared/text/en/formats.ts';
import { leaguesText as text } from '#shared/text/en/leagues-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { formResolver, showRefusedFields } from '../../../lib/form.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input, Select, Tick } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { minutesOf } from '../../../lib/wall-clock.ts';
import { useSaveLeague } from '../mutations.ts';

export interface PatternChoice {
  code: string;
  name: string;
  revisions: number[];
}
const NAMES = ['name', 'weekday', 'startMinutes', 'warmUpMinutes', 'fromLane', 'toLane', 'teams', 'bowlersATeam', 'games', 'absent', 'firstDate', 'lastDate', 'pattern', 'revision'] as const;
const WEEKDAYS = weekdays.map((name, i) => [String(i + 1), name] as const);
type Way = UseFormReturn<Form, unknown, Form>;

export const useLeagueForm = (start: Form): Way => useForm<Form, unknown, Form>({ resolver: formResolver<Form, Form>(leagueForm), defaultValues: start });

/** All of a league; what the server refuses stands beside its field. */
export function LeagueFields({ id, form, patterns }: { id: string | null; form: Way; patterns: readonly PatternChoice[] }) {
  const { slug } = useCentre();
  const navigate = useNavigate();
  const save = useSaveLeague(id);
  const skip = form.formState.errors.skipDates?.message;
  const submit = form.handleSubmit(async (body) => {
    try {
      const { league } = await save.mutateAsync(body);
      showToast(text.saved);
      if (id === null) await navigate(`/${slug}/leagues/${league.id}`);
    } catch (error) {
      showRefusedFields(error, [...NAMES, 'skipDates'], form.setError);
    }
  });
  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex max-w-2xl flex-col gap-7">
      <WhenPart form={form} />
      <WherePart form={form} />
      <PatternPart form={form} patterns={patterns} />
      <Refused>{skip ?? (save.error && Object.keys(form.formState.errors).length === 0 ? sentenceOf(save.error) : null)}</Refused>
      <Button type="submit" kind="primary" size="hand" busy={save.isPending} className="self-start max-[900px]:self-stretch">{id === null ? text.create : text.save}</Button>
    </form>
  );
}

const grid = 'grid grid-cols-2 gap-x-4 gap-y-3 min-[700px]:grid-cols-3';

function NumberField({ form, name, label, hint }: { form: Way; name: 'warmUpMinutes' | 'fromLane' | 'toLane' | 'teams' | 'bowlersATeam' | 'games' | 'absent'; label: string; hint?: string }) {
  return (
    <Field label={label} hint={hint} error={form.formState.errors[name]?.message}>
      {(control) => <Input {...control} {...form.register(name, { valueAsNumber: true })} type="number" inputMode="numeric" />}
    </Field>
  );
}

function WhenPart({ form }: { form: Way }) {
  const { errors } = form.formState;
  const start = form.watch('startMinutes');
  return (
    <section>
      <Field label={text.name} error={errors.name?.message} className="mb-5">{(control) => <Input {...control} {...form.register('name')} maxLength={60} />}</Field>
      <PartTitle>{text.when}</PartTitle>
      <div className={grid}>
        <Field label={text.weekday} error={errors.weekday?.message}>{(control) => <Select {...control} {...form.register('weekday', { setValueAs: Number })} options={WEEKDAYS} />}</Field>
        <Field label={text.start} error={errors.startMinutes?.message}>
          {(control) => (
            <Input {...control} type="time" value={Number.isInteger(start) ? wallTime(start) : ''} onChange={(event) => form.setValue('startMinutes', minutesOf(event.target.value) ?? Number.NaN, { shouldValidate: form.formState.isSubmitted, shouldDirty: true })} />
          )}
        </Field>
        <NumberField form={form} name="warmUpMinutes" label={text.warmUp} />
        <Field label={text.firstDate} error={errors.firstDate?.message}>{(control) => <Input {...control} {...form.register('firstDate')} type="date" />}</Field>
        <Field label={text.lastDate} error={errors.lastDate?.message}>{(control) => <Input {...control} {...form.register('lastDate')} type="date" />}</Field>
      </div>
    </section>
  );
}

function WherePart({ form }: { form: Way }) {
  return (
    <section>
      <PartTitle note={text.whole}>{text.where}</PartTitle>
      <div className={grid}>
        <NumberField form={form} name="fromLane" label={text.fromLane} />
        <NumberField form={form} name="toLane" label={text.toLane} />
        <NumberField form={form} name="teams" label={text.teams} />
        <NumberField form={form} name="bowlersATeam" label={text.bowlersATeam} />
        <NumberField form={form} name="games" label={text.games} />
        <NumberField form={form} name="absent" label={text.absent} />
      </div>
      <Tick label={text.crossesLanes} {...form.register('crossesLanes')} className="mt-2" />
    </section>
  );
}

function PatternPart({ form, patterns }: { form: Way; patterns: readonly PatternChoice[] }) {
  const { errors } = form.formState;
  const [code, revision] = form.watch(['pattern', 'revision']);
  const revisions = patterns.find((pattern) => pattern.code === code)?.revisions ?? [];
  const choose = (next: string) => {
    form.setValue('pattern', next || null, { shouldDirty: true });
    form.setValue('revision', null, { shouldDirty: true });
    form.clearErrors(['pattern', 'revision']);
  };
  return (
    <section>
      <PartTitle>{text.lanes}</PartTitle>
      <div className={grid}>
        <Field label={text.pattern} error={errors.pattern?.message}>
          {(control) => <Select {...control} empty={text.anyPattern} options={patterns.map((pattern) => [pattern.code, pattern.name] as const)} value={code ?? ''} onChange={(event) => choose(event.target.value)} />}
        </Field>
        <Field label={text.revision} error={errors.revision?.message}>
          {(control) => (
            <Select {...control} disabled={revisions.length === 0} empty={text.anyRevision} options={revisions.map((one) => [String(one), String(one)] as const)} value={revision === null ? '' : String(revision)}
              onChange={(event) => form.setValue('revision', event.target.value === '' ? null : Number(event.target.value), { shouldDirty: true })} />
          )}
        </Field>
      </div>
      <Tick label={text.fresh} {...form.register('fresh')} className="mt-2" />
      <Tick label={text.sanctioned} {...form.register('sanctioned')} />
    </section>
  );
}
