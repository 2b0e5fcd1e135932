import { useState } from 'react';
import type { CallDetail } from '#shared/contracts/calls.ts';
import type { CauseArea } from '#shared/domain/calls/causes-list.ts';
import { type Cause, causeOf, causesFor, rankCauses } from '#shared/domain/calls/causes.ts';
import { callLanes } from '#shared/text/en/calls.ts';
import { causeAreas, causeFaults, causeText as nameOfCause } from '#shared/text/en/calls-causes.ts';
import { causeText } from '#shared/text/en/calls-screen.ts';
import { Button } from '../../../ui/button.tsx';
import { Sheet } from '../../../ui/dialog.tsx';
import { Field, TextArea } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';

const OFTEN = 4;
const NOTE_MAX = 500;
const big = 'min-h-14 rounded-md px-3 py-2 text-left text-[1.0625rem] font-[620] ring-1 ring-inset ring-line hover:bg-card';

/** Asks for the cause: the most frequent here first, else area, then fault; a note; then the lane is given back. */
export function CauseSheet({ call, open, onClose, onDone }: { call: CallDetail; open: boolean; onClose: () => void; onDone: (cause: string | null, note: string) => void }) {
  const [cause, setCause] = useState<Cause | null>(null);
  const [note, setNote] = useState('');
  const back = call.status === 'out-of-service';
  const lanes = callLanes(call);
  const confirm = call.safety ? causeText.confirmDanger : back ? causeText.confirmService(lanes) : causeText.confirm(lanes);
  const done = (code: string | null) => {
    onDone(code, note.trim());
    setCause(null);
    setNote('');
  };
  return (
    <Sheet
      open={open}
      onClose={onClose}
      title={call.safety ? causeText.titleDanger : causeText.title}
      lead={causeText.lead(lanes)}
      actions={cause || back ? (
        <Button kind="primary" size="hand" className="min-h-14! w-full whitespace-normal!" onClick={() => done(cause?.code ?? null)}>
          {cause ? confirm : `${confirm}. ${causeText.withoutCause}`}
        </Button>
      ) : null}
    >
      {cause ? <Chosen call={call} cause={cause} onChange={() => setCause(null)} /> : <Choose call={call} onChoose={setCause} />}
      {cause || back ? (
        <Field label={causeText.note}>{(control) => <TextArea {...control} value={note} maxLength={NOTE_MAX} onChange={(event) => setNote(event.target.value)} />}</Field>
      ) : null}
    </Sheet>
  );
}

function Chosen({ call, cause, onChange }: { call: CallDetail; cause: Cause; onChange: () => void }) {
  return (
    <div className="flex flex-col gap-2">
      <div className="flex items-center justify-between gap-3 border-y border-rule py-2">
        <p>
          <span className="type-label block">{causeText.chosen}</span>
          <span className="text-lg font-[700]">{nameOfCause(cause.code)}</span>
        </p>
        <Button kind="quiet" size="hand" onClick={onChange}>{causeText.change}</Button>
      </div>
      {cause.pinDamage ? <p className="font-[650] text-amber">{causeText.pinDamage}</p> : null}
      {cause.lockout && call.lockout === null ? <p className="font-[650] text-amber">{causeText.lockout}</p> : null}
    </div>
  );
}

function Choose({ call, onChoose }: { call: CallDetail; onChoose: (cause: Cause) => void }) {
  const [area, setArea] = useState<CauseArea | null>(null);
  const groups = rankCauses(causesFor(call.equipment, call.safety, call.family), call.causeTimes);
  const often = Object.entries(call.causeTimes)
    .toSorted((a, b) => b[1] - a[1])
    .flatMap(([code]) => causeOf(code) ?? [])
    .filter((cause) => cause.family === 'both' || call.family === null || cause.family === call.family)
    .slice(0, OFTEN);
  const chosen = groups.length === 1 ? groups[0] : groups.find((group) => group.area === area);
  if (chosen) {
    return (
      <section>
        <PartTitle>{causeText.faults(causeAreas[chosen.area])}</PartTitle>
        <div className="grid grid-cols-1 gap-2">
          {chosen.causes.map((cause) => (
            <button key={cause.code} type="button" className={big} onClick={() => onChoose(cause)}>{causeFaults[cause.code]}</button>
          ))}
          {groups.length > 1 ? <Button kind="quiet" size="hand" onClick={() => setArea(null)}>{causeText.otherArea}</Button> : null}
        </div>
      </section>
    );
  }
  return (
    <>
      {often.length > 0 ? (
        <section>
          <PartTitle>{causeText.often}</PartTitle>
          <div className="grid grid-cols-1 gap-2">
            {often.map((cause) => (
              <button key={cause.code} type="button" className={big} onClick={() => onChoose(cause)}>{nameOfCause(cause.code)}</button>
            ))}
          </div>
        </section>
      ) : null}
      <section>
        <PartTitle>{often.length > 0 ? causeText.allAreas : causeText.areas}</PartTitle>
        <div className="grid grid-cols-2 gap-2">
          {groups.map((group) => (
            <button key={group.area} type="button" className={big} onClick={() => setArea(group.area)}>{causeAreas[group.area]}</button>
          ))}
        </div>
      </section>
    </>
  );
}
