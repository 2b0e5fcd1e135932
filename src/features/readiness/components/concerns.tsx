import { type FormEvent, useState } from 'react';
import type { SessionView } from '#shared/contracts/readiness.ts';
import { concernHead, concernToast, laneOption, readinessText as text, settledText } from '#shared/text/en/readiness-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Sheet } from '../../../ui/dialog.tsx';
import { Field, Select, TextArea } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useConcern, useSettle } from '../mutations.ts';

/** What was raised about the session; the desk settles it, saying how. */
export function Concerns({ session }: { session: SessionView }) {
  const { may } = useCentre();
  const { time } = useTimes();
  const [settling, setSettling] = useState<string | null>(null);
  if (session.raised.length === 0) return null;
  return (
    <section className="mt-8">
      <PartTitle>{text.concerns}</PartTitle>
      <ul>
        {session.raised.map((concern) => (
          <li key={concern.id} className="border-t border-rule py-3">
            <p className="type-label">{concernHead(concern.by, concern.at, concern.lane, time)}</p>
            <p className="mt-0.5 break-words whitespace-pre-line">{concern.text}</p>
            {concern.settled ? <p className="mt-1 text-sm text-dim">{settledText(concern.settled.by, concern.settled.at, concern.settled.note, time)}</p> : null}
            {!concern.settled && may('readiness.settle') ? <Button kind="secondary" className="mt-2" onClick={() => setSettling(concern.id)}>{text.settle}</Button> : null}
          </li>
        ))}
      </ul>
      {settling ? <SettleSheet session={session.id} concern={settling} onClose={() => setSettling(null)} /> : null}
    </section>
  );
}

function SettleSheet({ session, concern, onClose }: { session: string; concern: string; onClose: () => void }) {
  const [note, setNote] = useState('');
  const settle = useSettle(session);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    settle.mutate({ concern, note }, { onSuccess: onClose });
  };
  return (
    <Sheet open onClose={onClose} title={text.settleTitle}>
      <form noValidate onSubmit={submit} className="flex flex-col gap-4">
        <Field label={text.settleNote} error={fieldSentenceOf(settle.error, 'note')}>{(control) => <TextArea {...control} maxLength={300} value={note} onChange={(event) => setNote(event.target.value)} />}</Field>
        <Refused>{sentenceOf(settle.error)}</Refused>
        <Button type="submit" kind="primary" size="hand" busy={settle.isPending}>{text.settle}</Button>
      </form>
    </Sheet>
  );
}

export function ConcernSheet({ session, onClose }: { session: SessionView; onClose: () => void }) {
  const [said, setSaid] = useState('');
  const [lane, setLane] = useState('');
  const raise = useConcern(session.id);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    raise.mutate({ text: said, lane: lane === '' ? null : Number(lane) }, { onSuccess: () => { showToast(concernToast); onClose(); } });
  };
  return (
    <Sheet open onClose={onClose} title={text.raise} lead={text.raiseLead}>
      <form noValidate onSubmit={submit} className="flex flex-col gap-4">
        <Field label={text.concernText} error={fieldSentenceOf(raise.error, 'text')}>{(control) => <TextArea {...control} maxLength={500} value={said} onChange={(event) => setSaid(event.target.value)} />}</Field>
        <Field label={text.concernLane} error={fieldSentenceOf(raise.error, 'lane')}>
          {(control) => <Select {...control} empty={text.wholeSession} options={session.lanes.map((one) => [String(one), laneOption(one)] as const)} value={lane} onChange={(event) => setLane(event.target.value)} />}
        </Field>
        <Refused>{sentenceOf(raise.error)}</Refused>
        <Button type="submit" kind="primary" size="hand" busy={raise.isPending}>{text.send}</Button>
      </form>
    </Sheet>
  );
}
