import { useForm } from 'react-hook-form';
import { centreContracts } from '#shared/contracts/centre.ts';
import { type HouseRules, USUAL_RULES } from '#shared/domain/house-rules.ts';
import { rulesWords } from '#shared/text/en/house-rules.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { useChange } from '../mutations.ts';

const GROUPS: readonly (readonly [keyof typeof rulesWords.groups, readonly (keyof HouseRules)[]])[] = [
  ['calls', ['otherMechanicMin', 'deskMin', 'managerMin']],
  ['dressing', ['dressMarginMin', 'planLeadMin', 'lowBatteryPct']],
  ['film', ['freshDeliveries', 'freshHours', 'freshTolerance', 'wornDeliveries', 'wornHours']],
];

/** An empty field is no nought. */
const numberOf = (value: string | number): number => (String(value).trim() === '' ? NaN : Number(value));

/** What the house decides for itself: whole numbers with their units, each beside what is usual. */
export function RulesForm({ rules, edits }: { rules: HouseRules; edits: boolean }) {
  const { slug } = useCentre();
  const { register, handleSubmit, reset, formState } = useForm<HouseRules>({ defaultValues: rules });
  const save = useChange(slug, (body: HouseRules) => call(centreContracts.saveRules, { params: { centre: slug }, body }), rulesWords.saved);
  const submit = handleSubmit((draft) => save.mutate(draft));
  const known = GROUPS.some(([, names]) => names.some((name) => fieldSentenceOf(save.error, name)));
  const unusual = GROUPS.some(([, names]) => names.some((name) => rules[name] !== USUAL_RULES[name]));
  return (
    <section>
      <PartTitle>{rulesWords.title}</PartTitle>
      <form noValidate onSubmit={(event) => void submit(event)} className="border-t border-rule pt-3">
        <fieldset disabled={!edits} className="flex flex-col gap-5">
          {GROUPS.map(([group, names]) => (
            <fieldset key={group}>
              <legend className="text-sm font-[620]">{rulesWords.groups[group].name}</legend>
              <p className="type-label mb-2">{rulesWords.groups[group].lead}</p>
              <div className="grid grid-cols-2 items-end gap-x-4 gap-y-3 min-[900px]:grid-cols-3">
                {names.map((name) => (
                  <Field key={name} label={rulesWords.fields[name]} hint={rulesWords.usual(USUAL_RULES[name])} error={formState.errors[name] ? rulesWords.noNumber : fieldSentenceOf(save.error, name)}>
                    {(c) => <Input {...c} inputMode="numeric" maxLength={4} {...register(name, { setValueAs: numberOf, validate: (value) => Number.isInteger(value) && value >= 0 })} />}
                  </Field>
                ))}
              </div>
            </fieldset>
          ))}
          <Refused>{save.error && !known ? sentenceOf(save.error) : null}</Refused>
          {edits ? (
            <div className="flex flex-wrap gap-3">
              <Button type="submit" kind="primary" busy={save.isPending} disabled={!formState.isDirty}>{rulesWords.save}</Button>
              {unusual ? <Button kind="secondary" onClick={() => reset(USUAL_RULES, { keepDefaultValues: true })}>{rulesWords.toUsual}</Button> : null}
            </div>
          ) : null}
        </fieldset>
      </form>
    </section>
  );
}
