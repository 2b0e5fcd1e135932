import type { ReactNode } from 'react';
import type { CallDetail } from '#shared/contracts/calls.ts';
import { equipmentNames, stepText } from '#shared/text/en/calls.ts';
import { causeText } from '#shared/text/en/calls-causes.ts';
import { callsText, callText, cautions } from '#shared/text/en/calls-screen.ts';
import { duration } from '#shared/text/en/formats.ts';
import { useTimes } from '../../../lib/formats.ts';
import { classes } from '../../../ui/class-names.ts';
import { PartTitle } from '../../../ui/page.tsx';

/** Stops in 200 frames from which a lane's stops count as repeated. */
const REPEATED = 3;

/** What helps at the machine: how often it stopped, what it was last time, who waits meanwhile. */
export function CallFactsPart({ call }: { call: CallDetail }) {
  const { day } = useTimes();
  const stops = call.history.stopsIn200Frames;
  const last = call.history.last.find((past) => past.equipment === call.equipment) ?? call.history.last[0];
  const before = last ? [last.cause ? causeText(last.cause) : equipmentNames[last.equipment], last.note].filter(Boolean).join(', ') : callText.never;
  return (
    <dl className="grid grid-cols-2 gap-x-5 gap-y-3 py-4">
      {call.scope === 'house' ? null : (
        <One term={callText.stopsIn}>
          <span className={classes(stops === null ? '' : 'type-number text-2xl', stops !== null && stops >= REPEATED && 'text-red')}>{stops ?? callText.stopsUnheard}</span>
        </One>
      )}
      {call.scope === 'house' ? null : (
        <One term={last ? `${callText.lastHere}, ${day(last.at)}` : callText.lastHere}>{before}</One>
      )}
      {call.neighbour ? (
        <One term={callText.meanwhile}>
          {call.neighbour.waits ? callText.waitsToo(call.neighbour.lane) : call.lanesHeld.includes(call.neighbour.lane) ? callText.nobodyWaits : callText.bowlsOn(call.neighbour.lane)}
        </One>
      ) : null}
    </dl>
  );
}

function One({ term, children }: { term: string; children: ReactNode }) {
  return (
    <div className="min-w-0">
      <dt className="type-label">{term}</dt>
      <dd className="text-[1.0625rem] leading-snug font-[650] wrap-anywhere">{children}</dd>
    </div>
  );
}

/** Cautions that belong to this kind of call, shown where they matter. */
export function Cautions({ call }: { call: CallDetail }) {
  if (call.equipment === 'power' && !call.safety) {
    return (
      <section className="py-3">
        <PartTitle>{cautions.powerTitle}</PartTitle>
        <ol className="list-decimal border-t border-rule pt-2 pl-6 text-[1.0625rem]">
          {cautions.power.map((step) => (
            <li key={step} className="py-1">{step}</li>
          ))}
        </ol>
      </section>
    );
  }
  const lines = cautionsOf(call);
  return (
    <div className="flex flex-col gap-1 empty:hidden">
      {lines.map((line) => (
        <p key={line} className="font-[650] text-amber">{line}</p>
      ))}
    </div>
  );
}

function cautionsOf(call: CallDetail): string[] {
  if (call.safety) return [cautions.danger[call.safety]];
  switch (call.equipment) {
    case 'ball-lift':
    case 'ball-return': return [cautions.lift, cautions.stuckBall];
    case 'channel': return [cautions.stuckBall];
    case 'lane-surface':
    case 'approach':
    case 'lane-machine': return [cautions.product];
    default: return [];
  }
}

/** This lane before, and what was done on this call: both newest first. */
export function CallLife({ call }: { call: CallDetail }) {
  const { dayAndTime, time } = useTimes();
  return (
    <div className="flex flex-col gap-8">
      {call.scope === 'house' ? null : (
        <section>
          <PartTitle>{callText.history}</PartTitle>
          {call.history.last.length === 0 ? <p className="border-t border-rule py-2 text-dim">{callText.never}</p> : null}
          <ul>
            {call.history.last.map((past) => (
              <li key={past.at} className="border-t border-rule py-2">
                <span className="block font-[650]">{past.cause ? causeText(past.cause) : equipmentNames[past.equipment]}</span>
                {past.note ? <span className="block">{past.note}</span> : null}
                <span className="block text-sm text-dim">{[dayAndTime(past.at), past.by, past.downMs === null ? null : callsText.stood(duration(past.downMs))].filter(Boolean).join(' · ')}</span>
              </li>
            ))}
          </ul>
        </section>
      )}
      <section>
        <PartTitle>{callText.life}</PartTitle>
        <ol>
          {call.steps.toReversed().map((step, i) => (
            <li key={`${step.at}-${i}`} className="grid grid-cols-[3.25rem_minmax(0,1fr)] gap-x-2 border-t border-rule py-2">
              <span className="text-dim">{time(step.at)}</span>
              <span className={classes('wrap-anywhere', step.kind === 'lockout-alarm' && 'font-[700] text-red')}>
                {stepText(step, call.family)}
                {step.by ? <span className="block text-sm text-dim">{step.by}</span> : null}
              </span>
            </li>
          ))}
        </ol>
      </section>
    </div>
  );
}
