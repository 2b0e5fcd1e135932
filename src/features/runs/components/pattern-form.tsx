import { type FormEvent, useState } from 'react';
import type { RevisionBody } from '#shared/contracts/runs.ts';
import { validatePattern } from '#shared/domain/runs/rules.ts';
import { fieldSentence } from '#shared/text/en/refusals.ts';
import { patternsText as text } from '#shared/text/en/runs-page.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input } from '../../../ui/field.tsx';
import { useSavePattern } from '../mutations.ts';
import { PassFields } from './pass-fields.tsx';
import { bodyOf, draftOf, NEW_PASS, type PassDraft } from './pattern-draft.ts';

/** A new pattern (`code` null), or a new revision of one. The rules speak beside each field before anything is sent. */
export function PatternForm({ code, start, onSaved }: { code: string | null; start: RevisionBody | null; onSaved: (code: string) => void }) {
  const [own, setOwn] = useState({ code: '', name: '', note: '' });
  const [length, setLength] = useState(start ? String(start.lengthFt) : '40');
  const [passes, setPasses] = useState<PassDraft[]>(start ? draftOf(start) : [NEW_PASS]);
  const [tried, setTried] = useState(false);
  const save = useSavePattern();
  const body = bodyOf(length, passes, start?.cleanerZones);
  const problems = tried ? validatePattern(body) : [];
  const said = (pass: number | undefined, fields: readonly string[]) => {
    const found = problems.find((p) => p.place.pass === pass && fields.includes(p.place.field));
    return found && fieldSentence(found.code, found.params);
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (validatePattern(body).length > 0) return;
    save.mutate({ code: code ?? own.code, name: code === null ? own.name : null, revision: body, note: own.note }, { onSuccess: (saved) => onSaved(saved.code) });
  };
  const change = (at: number, pass: PassDraft) => setPasses(passes.with(at, pass));
  return (
    <form noValidate onSubmit={submit} className="flex flex-col gap-4">
      {code === null ? (
        <>
          <Field label={text.name} error={fieldSentenceOf(save.error, 'name')}>{(c) => <Input {...c} value={own.name} onChange={(e) => setOwn({ ...own, name: e.target.value })} />}</Field>
          <Field label={text.code} hint={text.codeHint} error={fieldSentenceOf(save.error, 'code')}>{(c) => <Input {...c} value={own.code} onChange={(e) => setOwn({ ...own, code: e.target.value })} />}</Field>
        </>
      ) : null}
      <Field label={text.lengthField} error={said(undefined, ['lengthFt', 'length']) ?? fieldSentenceOf(save.error, 'revision/lengthFt')}>
        {(c) => <Input {...c} inputMode="decimal" value={length} onChange={(e) => setLength(e.target.value)} />}
      </Field>
      {passes.map((pass, i) => (
        <PassFields
          key={i} n={i + 1} pass={pass} onChange={(next) => change(i, next)} onRemove={passes.length > 1 ? () => setPasses(passes.filter((_, at) => at !== i)) : null}
          said={(...fields) => said(i + 1, fields) ?? fields.map((f) => fieldSentenceOf(save.error, `revision/passes/${i}/${f}`)).find(Boolean) ?? undefined}
        />
      ))}
      <Button onClick={() => setPasses([...passes, passes.at(-1) ?? NEW_PASS])}>{text.addPass}</Button>
      <Field label={text.note}>{(c) => <Input {...c} value={own.note} onChange={(e) => setOwn({ ...own, note: e.target.value })} />}</Field>
      <Refused>{sentenceOf(save.error)}</Refused>
      <Button type="submit" kind="primary" size="hand" busy={save.isPending}>{text.save}</Button>
    </form>
  );
}
