import { useForm, type UseFormRegister } from 'react-hook-form';
import { centreContracts, type CentreSettings } from '#shared/contracts/centre.ts';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { wallTime } from '#shared/text/en/formats.ts';
import { minutesOf } from '../../../lib/wall-clock.ts';
import { useChange } from '../mutations.ts';

interface Draft {
  name: string;
  zone: string;
  cut: string;
  days: { open: boolean; from: string; to: string }[];
}

const draftOf = ({ name, zone, cut, opening }: CentreSettings): Draft => ({
  name, zone, cut: wallTime(cut),
  days: opening.map((day) => ({ open: day !== null, from: wallTime(day?.from ?? 600), to: wallTime(day?.to ?? 0) })),
});
const settingsOf = ({ name, zone, cut, days }: Draft): CentreSettings => ({
  name, zone, cut: minutesOf(cut) ?? 0,
  opening: days.map((day) => (day.open ? { from: minutesOf(day.from) ?? 0, to: minutesOf(day.to) ?? 0 } : null)),
});

/** Name, zone, cut and opening hours: one form, one save. */
export function CentreForm({ settings, edits }: { settings: CentreSettings; edits: boolean }) {
  const { slug } = useCentre();
  const { register, handleSubmit, watch, formState } = useForm<Draft>({ defaultValues: draftOf(settings) });
  const save = useChange(slug, (body: CentreSettings) => call(centreContracts.save, { params: { centre: slug }, body }), settingsWords.saved);
  const submit = handleSubmit((draft) => save.mutate(settingsOf(draft)));
  const zoneError = fieldSentenceOf(save.error, 'zone') ? settingsWords.zoneUnknown : null;
  const known = ['name', 'zone', 'cut'].some((name) => fieldSentenceOf(save.error, name));
  return (
    <section>
      <PartTitle>{settingsWords.centre}</PartTitle>
      <form noValidate onSubmit={(event) => void submit(event)} className="border-t border-rule pt-3">
        <fieldset disabled={!edits} className="flex flex-col gap-4">
          <div className="grid items-end gap-4 min-[700px]:grid-cols-2">
            <Field label={settingsWords.name} error={fieldSentenceOf(save.error, 'name')}>{(c) => <Input {...c} maxLength={80} {...register('name')} />}</Field>
            <Field label={settingsWords.cut} error={formState.errors.cut ? settingsWords.noTime : fieldSentenceOf(save.error, 'cut')} hint={settingsWords.cutHint}>{(c) => <Input {...c} inputMode="numeric" maxLength={5} {...register('cut', { validate: (value) => minutesOf(value) !== null })} />}</Field>
          </div>
          <Field label={settingsWords.zone} hint={settingsWords.zoneHint} error={zoneError}>{(c) => <Input {...c} {...register('zone')} />}</Field>
          <fieldset>
            <legend className="text-sm font-[620]">{settingsWords.opening}</legend>
            <p className="type-label">{settingsWords.openingHint}</p>
            {settingsWords.days.map((day, i) => (
              <Day key={day} day={day} at={i} open={watch(`days.${i}.open`)} register={register} error={formState.errors.days?.[i] ? settingsWords.timeNeeded : null} />
            ))}
          </fieldset>
          <Refused>{save.error && !known ? sentenceOf(save.error) : null}</Refused>
          {edits ? <Button type="submit" kind="primary" busy={save.isPending} disabled={!formState.isDirty} className="self-start">{settingsWords.save}</Button> : null}
        </fieldset>
      </form>
    </section>
  );
}

function Day({ day, at, open, register, error }: { day: string; at: number; open: boolean; register: UseFormRegister<Draft>; error: string | null }) {
  const time = { required: open, validate: (value: string) => !open || minutesOf(value) !== null };
  return (
    <div className="grid min-h-11 max-[900px]:min-h-14 grid-cols-[9rem_5.5rem_1rem_5.5rem] items-center gap-2 max-[900px]:grid-cols-[8rem_5.5rem_1rem_5.5rem]">
      <label className="flex items-center gap-2.5">
        <input type="checkbox" aria-label={settingsWords.openOn(day)} className="size-5 accent-ink" {...register(`days.${at}.open`)} />
        {day}
      </label>
      {open ? (
        <>
          <Input inputMode="numeric" maxLength={5} aria-label={settingsWords.from(day)} aria-invalid={error ? true : undefined} {...register(`days.${at}.from`, time)} />
          <span aria-hidden className="text-center">–</span>
          <Input inputMode="numeric" maxLength={5} aria-label={settingsWords.to(day)} aria-invalid={error ? true : undefined} {...register(`days.${at}.to`, time)} />
        </>
      ) : (
        <span className="text-dim">{settingsWords.closed}</span>
      )}
      {error ? <span role="alert" className="col-span-4 text-sm font-[620] text-red">{error}</span> : null}
    </div>
  );
}
