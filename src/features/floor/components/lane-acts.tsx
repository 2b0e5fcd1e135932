import { type FormEvent, type ReactNode, useState } from 'react';
import type { LaneView } from '#shared/contracts/floor.ts';
import { type Equipment, LANE_USES, type LaneUseKind, neighbourOf, pairOf, SAFETY_KINDS } from '#shared/domain/equipment.ts';
import { equipmentNames, safetyNames } from '#shared/text/en/calls.ts';
import { laneWords } from '#shared/text/en/floor-page.ts';
import { lanesText } from '#shared/text/en/formats.ts';
import { useCentre } from '../../../lib/centre.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input, Select } from '../../../ui/field.tsx';
import { type LaneAct, useLaneAct } from '../mutations.ts';
import type { LaneMode } from '../use-lane-selection.ts';


interface Props {
  view: LaneView;
  centre: string;
  mode: LaneMode;
  onMode: (mode: LaneMode) => void;
}

/** Everything that can be done with a lane by whoever looks at it. A refusal stands beside what was pressed. */
export function LaneActs({ view, centre, mode, onMode }: Props) {
  const { may } = useCentre();
  const act = useLaneAct(centre);
  const run = (what: LaneAct) => act.mutate(what, { onSuccess: () => onMode('none') });
  const open = (next: LaneMode) => {
    act.reset();
    onMode(mode === next ? 'none' : next);
  };
  const part = { view, run, busy: act.isPending, error: act.error };
  const refused = <Refused>{act.error && act.error && !fieldSentenceOf(act.error, 'to') && !fieldSentenceOf(act.error, 'reason') ? sentenceOf(act.error) : null}</Refused>;
  return (
    <div className="flex flex-col gap-3">
      {may('lane.operate') ? (
        <div className="grid grid-cols-2 gap-2.5">
          {view.use ? (
            <Button kind="primary" data-act="close" busy={act.isPending} onClick={() => run({ act: 'close', lane: view.lane, was: view.use })}>{laneWords.closeLane(view.lane)}</Button>
          ) : (
            <Button kind={mode === 'open' ? 'secondary' : 'primary'} aria-expanded={mode === 'open'} onClick={() => open('open')}>{laneWords.openLane(view.lane)}</Button>
          )}
          <Button disabled={!view.use} aria-expanded={mode === 'move'} onClick={() => open('move')}>{laneWords.moveTo}</Button>
        </div>
      ) : null}
      {mode === 'open' && !view.use && may('lane.operate') ? <OpenForm {...part} /> : null}
      {mode === 'move' && view.use && may('lane.operate') ? <MoveForm {...part} /> : null}
      {may('call.raise') ? (
        <>
          <Button aria-expanded={mode === 'call'} onClick={() => open('call')}>{laneWords.raiseCall}</Button>
          {mode === 'call' ? <RaiseChoices {...part} /> : null}
        </>
      ) : null}
      {refused}
      {may('lane.service') ? (
        view.outOfService ? (
          <Button busy={act.isPending} onClick={() => run({ act: 'back', lane: view.lane })}>{laneWords.back(view.lane)}</Button>
        ) : (
          <>
            <Button kind="quiet" aria-expanded={mode === 'out'} onClick={() => open('out')}>{laneWords.outOfService}</Button>
            {mode === 'out' ? <OutForm {...part} /> : null}
          </>
        )
      ) : null}
      {may('call.raise') ? <SafetyStop {...part} /> : null}
    </div>
  );
}

interface Part {
  view: LaneView;
  run: (act: LaneAct) => void;
  busy: boolean;
  error: unknown;
}

/** Reads a form as text, trimmed; what is empty is left out. */
function given(event: FormEvent<HTMLFormElement>): Record<string, string> {
  event.preventDefault();
  const read = [...new FormData(event.currentTarget)].map(([name, value]) => [name, String(value).trim()] as const);
  return Object.fromEntries(read.filter(([, value]) => value !== ''));
}

const Box = ({ onSubmit, children }: { onSubmit: (event: FormEvent<HTMLFormElement>) => void; children: ReactNode }) => (
  <form noValidate onSubmit={onSubmit} className="flex flex-col gap-3 border-l-4 border-rule pl-4">
    {children}
  </form>
);

function OpenForm({ view, run, busy, error }: Part) {
  const submit = (event: FormEvent<HTMLFormElement>) => {
    const form = given(event);
    const use = LANE_USES.find((kind): kind is LaneUseKind => kind === form['use']);
    run({ act: 'open', lane: view.lane, body: { use, label: form['label'], bowlers: form['bowlers'] === undefined ? undefined : Number(form['bowlers']) } });
  };
  return (
    <Box onSubmit={submit}>
      <Field label={laneWords.use}>{(c) => <Select {...c} name="use" options={laneWords.useChoices} />}</Field>
      <div className="grid grid-cols-[minmax(0,1fr)_6.5rem] gap-3">
        <Field label={laneWords.label} error={fieldSentenceOf(error, 'label')}>{(c) => <Input {...c} name="label" maxLength={60} placeholder={laneWords.optional} />}</Field>
        <Field label={laneWords.bowlersField} error={fieldSentenceOf(error, 'bowlers')}>{(c) => <Input {...c} name="bowlers" type="number" inputMode="numeric" min={1} max={20} />}</Field>
      </div>
      {/* eslint-disable-next-line jsx-a11y/no-autofocus -- the form was asked for by a key or a press just now; Enter opens the lane */}
      <Button type="submit" kind="primary" busy={busy} autoFocus>{laneWords.openLane(view.lane)}</Button>
    </Box>
  );
}

function MoveForm({ view, run, busy, error }: Part) {
  const [to, setTo] = useState('');
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    run({ act: 'move', lane: view.lane, to: Number(to) });
  };
  return (
    <Box onSubmit={submit}>
      <Field label={laneWords.moveField} error={fieldSentenceOf(error, 'to')}>
        {/* eslint-disable-next-line jsx-a11y/no-autofocus -- the form was asked for by a key or a press just now */}
        {(c) => <Input {...c} name="to" type="number" inputMode="numeric" min={1} max={99} required autoFocus value={to} onChange={(e) => setTo(e.target.value)} />}
      </Field>
      <Button type="submit" kind="primary" busy={busy} disabled={to === ''}>{laneWords.moveGo(to)}</Button>
    </Box>
  );
}

function OutForm({ view, run, busy, error }: Part) {
  const submit = (event: FormEvent<HTMLFormElement>) => run({ act: 'out', lane: view.lane, reason: given(event)['reason'] ?? '' });
  return (
    <Box onSubmit={submit}>
      <Field label={laneWords.outReason} error={fieldSentenceOf(error, 'reason')}>
        {/* eslint-disable-next-line jsx-a11y/no-autofocus -- the form was asked for by a press just now */}
        {(c) => <Input {...c} name="reason" maxLength={200} autoFocus />}
      </Field>
      <Button type="submit" busy={busy}>{laneWords.outGo(view.lane)}</Button>
    </Box>
  );
}

/** What the desk is told most, first; the second tap raises the call. */
const COMMON: readonly Equipment[] = ['pinsetter', 'ball-return', 'ball-lift', 'scoring', 'foul-unit', 'bumpers'];
const RARE: readonly Equipment[] = ['console', 'masking', 'channel', 'lane-surface', 'approach', 'motion-sensor', 'power', 'lane-machine'];

function RaiseChoices({ view, run, busy }: Part) {
  const [more, setMore] = useState(false);
  return (
    <div role="group" aria-label={laneWords.whatIsIt} className="grid grid-cols-2 gap-2 border-l-4 border-rule pl-4">
      {(more ? [...COMMON, ...RARE] : COMMON).map((equipment) => (
        <Button key={equipment} busy={busy} className="capitalize-first justify-start" onClick={() => run({ act: 'raise', lane: view.lane, equipment })}>
          {equipmentNames[equipment]}
        </Button>
      ))}
      {more ? null : <Button kind="quiet" className="col-span-2" onClick={() => setMore(true)}>{laneWords.moreEquipment}</Button>}
    </div>
  );
}

function SafetyStop({ view, run, busy }: Part) {
  const [asked, setAsked] = useState(false);
  const lanes = lanesText([pairOf(view.lane), neighbourOf(pairOf(view.lane))]);
  return (
    <div className="mt-2 border-t border-rule pt-4">
      <Button kind="danger" className="w-full" aria-expanded={asked} onClick={() => setAsked(!asked)}>{laneWords.safetyStop}</Button>
      <p className="type-label mt-1.5">{laneWords.safetyLead(lanes)}</p>
      {asked ? (
        <div role="group" aria-label={laneWords.whatIsIt} className="mt-2 grid grid-cols-2 gap-2">
          {SAFETY_KINDS.map((kind) => (
            <Button key={kind} kind="danger" busy={busy} className="whitespace-normal!" onClick={() => run({ act: 'safety', lane: view.lane, kind })}>
              {safetyNames[kind]}
            </Button>
          ))}
        </div>
      ) : null}
    </div>
  );
}
