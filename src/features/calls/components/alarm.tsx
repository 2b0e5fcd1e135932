import { Dialog as Radix } from 'radix-ui';
import { useEffect, useState } from 'react';
import type { CallView } from '#shared/contracts/floor.ts';
import { lockoutText } from '#shared/text/en/calls-screen.ts';
import { useTimes } from '../../../lib/formats.ts';
import { Button } from '../../../ui/button.tsx';
import { ring } from '../sound.ts';

const AGAIN_MS = 2500;
const seenKey = (call: CallView): string => `${call.id}@${call.alarmAt}`;

/** The machine moved while somebody is recorded in it: over everything, and sounding, until it is seen. */
export function Alarm({ calls, me }: { calls: readonly CallView[]; me: string | null }) {
  const [seen, setSeen] = useState<readonly string[]>([]);
  const call = calls.find((one) => !seen.includes(seenKey(one)));
  const sounding = call ? seenKey(call) : null;
  useEffect(() => {
    if (!sounding) return undefined;
    ring('alarm');
    const timer = setInterval(() => ring('alarm'), AGAIN_MS);
    return () => clearInterval(timer);
  }, [sounding]);
  const { time } = useTimes();
  if (!call) return null;
  const at = time(call.alarmAt ?? 0);
  const who = call.mechanicIn?.by ?? '';
  const own = who === me;
  return (
    <Radix.Root open>
      <Radix.Portal>
        <Radix.Content
          role="alertdialog"
          onEscapeKeyDown={(event) => event.preventDefault()}
          onPointerDownOutside={(event) => event.preventDefault()}
          className="fixed inset-0 z-[60] flex flex-col justify-between gap-6 overflow-y-auto bg-red p-6 text-on-red"
        >
          <div className="mx-auto flex w-full max-w-2xl grow flex-col justify-center gap-5">
            <span aria-hidden className="type-number text-[clamp(8rem,42vw,15rem)]">{call.lane}</span>
            <Radix.Title className="type-title text-[2.5rem]">{lockoutText.alarmTitle(call.lane)}</Radix.Title>
            <Radix.Description className="text-xl font-[620]">{own ? lockoutText.alarm(call.lane, at) : lockoutText.alarmOther(call.lane, who, at)}</Radix.Description>
          </div>
          <Button kind="secondary" size="hand" className="mx-auto min-h-16 w-full max-w-2xl bg-on-red! text-red! ring-0!" onClick={() => setSeen([...seen, seenKey(call)])}>
            {own ? lockoutText.alarmSeen : lockoutText.alarmSeenOther}
          </Button>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
