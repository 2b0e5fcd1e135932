import { patternsText as text } from '#shared/text/en/runs-page.ts';
import { Button } from '../../../ui/button.tsx';
import { Field, Input, Select } from '../../../ui/field.tsx';
import type { PassDraft } from './pattern-draft.ts';

interface Props {
  n: number;
  pass: PassDraft;
  onChange: (pass: PassDraft) => void;
  onRemove: (() => void) | null;
  /** What is wrong with one of these fields, as a sentence. */
  said: (...fields: string[]) => string | undefined;
}

/** One pass of a pattern as fields. */
export function PassFields({ n, pass, onChange, onRemove, said }: Props) {
  const typed = (field: 'from' | 'to' | 'loads' | 'ul' | 'fromFt' | 'toFt') => ({ value: pass[field], onChange: (event: { target: { value: string } }) => onChange({ ...pass, [field]: event.target.value }) });
  return (
    <fieldset className="border-t border-rule pt-3">
      <legend className="type-name pr-3">{text.pass(n)}</legend>
      <div className="grid grid-cols-2 gap-3">
        <Field label={text.way} error={said('direction')}>
          {(c) => <Select {...c} value={pass.direction} onChange={(e) => onChange({ ...pass, direction: e.target.value as PassDraft['direction'] })} options={[['outbound', text.outbound], ['return', text.back]]} />}
        </Field>
        <Field label={text.product} error={said('product')}>
          {(c) => <Select {...c} value={pass.product} onChange={(e) => onChange({ ...pass, product: e.target.value as PassDraft['product'] })} options={[['A', 'A'], ['B', 'B']]} />}
        </Field>
        <Field label={text.fromBoard} hint={text.boardHint} error={said('fromBoard', 'boards')}>{(c) => <Input {...c} {...typed('from')} />}</Field>
        <Field label={text.toBoard} hint={text.boardHint} error={said('toBoard')}>{(c) => <Input {...c} {...typed('to')} />}</Field>
        <Field label={text.loads} error={said('loads')}>{(c) => <Input {...c} inputMode="numeric" {...typed('loads')} />}</Field>
        <Field label={text.ul} error={said('ul')}>{(c) => <Input {...c} inputMode="numeric" {...typed('ul')} />}</Field>
        <Field label={text.fromFt} error={said('fromFt', 'feet')}>{(c) => <Input {...c} inputMode="decimal" {...typed('fromFt')} />}</Field>
        <Field label={text.toFt} error={said('toFt')}>{(c) => <Input {...c} inputMode="decimal" {...typed('toFt')} />}</Field>
      </div>
      {onRemove ? <Button kind="quiet" onClick={onRemove}>{text.removePass(n)}</Button> : null}
    </fieldset>
  );
}
