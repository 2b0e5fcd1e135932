import { useState } from 'react';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { callLanes } from '#shared/text/en/calls.ts';
import { lockoutText, serviceText } from '#shared/text/en/calls-screen.ts';
import { serverNow } from '../../../lib/clock.ts';
import { useTimes } from '../../../lib/formats.ts';
import { Button } from '../../../ui/button.tsx';
import { classes } from '../../../ui/class-names.ts';
import { Sheet } from '../../../ui/dialog.tsx';
import { Field, Input } from '../../../ui/field.tsx';

const REASON_MAX = 200;
const PROCEDURE_MAX = 300;
const PARK_MINUTES = [15, 30, 60, 120] as const;
const MINUTE = 60_000;

interface Props {
  call: CallDetail;
  open: boolean;
  onClose: () => void;
}

const pick = (on: boolean) => classes('min-h-hand rounded-md px-3 py-2 text-left font-[620]', on ? 'bg-ink text-paper' : 'ring-1 ring-inset ring-line hover:bg-card');

function Reason({ reasons, value, onChange }: { reasons: readonly string[]; value: string; onChange: (reason: string) => void }) {
  return (
    <>
      <div className="grid grid-cols-1 gap-2">
        {reasons.map((reason) => (
          <button key={reason} type="button" aria-pressed={value === reason} className={pick(value === reason)} onClick={() => onChange(reason)}>{reason}</button>
        ))}
      </div>
      <Field label={serviceText.reason}>{(control) => <Input {...control} value={value} maxLength={REASON_MAX} onChange={(event) => onChange(event.target.value)} />}</Field>
    </>
  );
}

/** The lanes of a call go out of service: why, in a few words. */
export function ServiceSheet({ call, open, onClose, onDone }: Props & { onDone: (reason: string) => void }) {
  const [reason, setReason] = useState('');
  return (
    <Sheet
      open={open}
      onClose={onClose}
      title={serviceText.title(callLanes(call))}
      lead={serviceText.lead}
      actions={<Button kind="danger" size="hand" className="min-h-14! w-full" disabled={reason.trim() === ''} onClick={() => onDone(reason.trim())}>{serviceText.confirm}</Button>}
    >
      <Reason reasons={serviceText.reasons} value={reason} onChange={setReason} />
    </Sheet>
  );
}

/** Parked with a reason and an end, never for good. */
export function ParkSheet({ open, onClose, onDone }: Omit<Props, 'call'> & { onDone: (reason: string, until: number) => void }) {
  const [reason, setReason] = useState('');
  const [minutes, setMinutes] = useState<number>(PARK_MINUTES[0]);
  const { time } = useTimes();
  return (
    <Sheet
      open={open}
      onClose={onClose}
      title={serviceText.parkTitle}
      lead={serviceText.parkLead}
      actions={<Button kind="primary" size="hand" className="min-h-14! w-full" disabled={reason.trim() === ''} onClick={() => onDone(reason.trim(), serverNow() + minutes * MINUTE)}>{serviceText.parkConfirm}</Button>}
    >
      <Reason reasons={serviceText.parkReasons} value={reason} onChange={setReason} />
      <fieldset>
        <legend className="mb-1 text-sm font-[620]">{serviceText.till}</legend>
        <div className="grid grid-cols-2 gap-2">
          {PARK_MINUTES.map((n) => (
            <button key={n} type="button" aria-pressed={minutes === n} className={pick(minutes === n)} onClick={() => setMinutes(n)}>
              {serviceText.inMinutes(n, time(serverNow() + n * MINUTE))}
            </button>
          ))}
        </div>
      </fieldset>
    </Sheet>
  );
}

/** The manager says how the written procedure for a lock left behind was followed, and ends its record. */
export function LeftBehindSheet({ open, onClose, onDone }: Omit<Props, 'call'> & { onDone: (procedure: string) => void }) {
  const [procedure, setProcedure] = useState('');
  return (
    <Sheet
      open={open}
      onClose={onClose}
      title={lockoutText.leftTitle}
      lead={lockoutText.leftLead}
      actions={<Button kind="danger" size="hand" className="min-h-14! w-full" disabled={procedure.trim() === ''} onClick={() => onDone(procedure.trim())}>{lockoutText.leftConfirm}</Button>}
    >
      <Field label={lockoutText.leftReason}>{(control) => <Input {...control} value={procedure} maxLength={PROCEDURE_MAX} onChange={(event) => setProcedure(event.target.value)} />}</Field>
    </Sheet>
  );
}
