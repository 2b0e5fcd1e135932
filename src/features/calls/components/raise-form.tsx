import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { EQUIPMENT, type Equipment, SAFETY_KINDS, type SafetyKind } from '#shared/domain/equipment.ts';
import { callLanes, callTitle, equipmentNames, safetyNames } from '#shared/text/en/calls.ts';
import { callsText } from '#shared/text/en/calls-screen.ts';
import { useCentre } from '../../../lib/centre.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { classes } from '../../../ui/class-names.ts';
import { Field, Input } from '../../../ui/field.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useRaise } from '../mutations.ts';

const choice = 'min-h-11 rounded-md px-3 py-2 text-left font-[620] ring-1 ring-inset ring-line hover:bg-card disabled:opacity-45 disabled:cursor-not-allowed max-[900px]:min-h-hand';
const TEXT_MAX = 300;
/** What a desk is told of most; the rest is one press further. */
const USUAL: readonly Equipment[] = ['pinsetter', 'ball-return', 'scoring', 'foul-unit', 'bumpers', 'console'];

function What({ name, off, onPress }: { name: string; off: boolean; onPress: () => void }) {
  return (
    <button type="button" disabled={off} className={classes(choice, 'first-letter:uppercase')} onClick={onPress}>
      {name}
    </button>
  );
}

/** A call in two taps: the lane, then what it is. What was said may be typed between. */
export function RaiseForm({ lanes, lane: given = null, onRaised }: { lanes: number; lane?: number | null; onRaised?: (call: CallDetail) => void }) {
  const { slug } = useCentre();
  const navigate = useNavigate();
  const [lane, setLane] = useState<number | null>(given);
  const [text, setText] = useState('');
  const raise = useRaise();
  const send = (what: { equipment: Equipment } | { safety: SafetyKind }) => {
    if (lane === null) return;
    const body = { lane, equipment: 'pinsetter' as const, ...what, text: text.trim() || undefined };
    raise.mutate(body, {
      onSuccess: (call) => {
        const said = call.joined > 0 ? callsText.joined : callsText.raised;
        showToast(said(callTitle(call), callLanes(call)));
        setLane(given);
        setText('');
        if (onRaised) onRaised(call);
        else if (call.safety) void navigate(`/${slug}/calls/${call.id}`);
      },
    });
  };
  const off = lane === null || raise.isPending;
  return (
    <div className="flex flex-col gap-5">
      <fieldset>
        <legend className="mb-2 text-sm font-[620]">{callsText.lane}</legend>
        <div className="grid grid-cols-[repeat(auto-fill,minmax(2.75rem,1fr))] gap-1.5 max-[900px]:grid-cols-[repeat(auto-fill,minmax(3rem,1fr))]">
          {Array.from({ length: lanes }, (_, i) => i + 1).map((n) => (
            <button key={n} type="button" aria-pressed={lane === n} aria-label={`${callsText.lane} ${n}`} onClick={() => setLane(n)} className={classes('type-number min-h-11 rounded-t-lg rounded-b-sm text-lg max-[900px]:min-h-hand', lane === n ? 'bg-ink text-paper' : 'ring-1 ring-inset ring-line hover:bg-card')}>
              {n}
            </button>
          ))}
        </div>
      </fieldset>
      <Field label={callsText.said} error={fieldSentenceOf(raise.error, 'text')}>
        {(control) => <Input {...control} value={text} maxLength={TEXT_MAX} onChange={(event) => setText(event.target.value)} />}
      </Field>
      <fieldset disabled={off}>
        <legend className="mb-2 text-sm font-[620]">{callsText.what(lane)}</legend>
        <div className="grid grid-cols-2 gap-2">
          {USUAL.map((equipment) => (
            <What key={equipment} name={equipmentNames[equipment]} off={off} onPress={() => send({ equipment })} />
          ))}
        </div>
        <p className="mt-5 mb-2 text-sm font-[700] text-red">{callsText.dangers}</p>
        <div className="grid grid-cols-2 gap-2">
          {SAFETY_KINDS.map((safety) => (
            <button key={safety} type="button" disabled={off} className={classes(choice, 'ring-2 ring-red! text-red')} onClick={() => send({ safety })}>
              {safetyNames[safety]}
            </button>
          ))}
        </div>
        <details className="mt-3">
          <summary className="flex min-h-11 cursor-pointer items-center font-[620] max-[900px]:min-h-hand">{callsText.otherEquipment}</summary>
          <div className="grid grid-cols-2 gap-2">
            {EQUIPMENT.filter((equipment) => !USUAL.includes(equipment)).map((equipment) => (
              <What key={equipment} name={equipmentNames[equipment]} off={off} onPress={() => send({ equipment })} />
            ))}
          </div>
        </details>
      </fieldset>
      <Refused>{sentenceOf(raise.error)}</Refused>
    </div>
  );
}
