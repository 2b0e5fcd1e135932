import type { CallDetail } from '#shared/contracts/calls.ts';
import { callSaid, callTitle, callWhere } from '#shared/text/en/calls.ts';
import { callsText } from '#shared/text/en/calls-screen.ts';
import { useTimes } from '../../../lib/formats.ts';
import { classes } from '../../../ui/class-names.ts';
import { type BadgeTone, Mark } from '../../../ui/marks.tsx';
import { RunningClock } from '../../../ui/running-clock.tsx';
import { lookOf, useStanding } from './call-row.tsx';

/** Looks of the lane's number at this size; the small one is in `ui/marks`. */
const BADGE: Partial<Record<BadgeTone, string>> = {
  'plain': 'bg-cap text-pin', 'unanswered': 'bg-red text-on-red', 'answered': 'bg-amber-fill text-on-amber', 'mechanic-in': 'hatch text-pin [text-shadow:0_0_6px_var(--cap)]',
  'outline': 'ring-2 ring-inset ring-line',
};

/** The lane, what it is, and how long: readable at arm's length. */
export function CallHead({ call, queued }: { call: CallDetail; queued: boolean }) {
  const { time } = useTimes();
  const standing = useStanding(call);
  const look = lookOf(call);
  const said = callSaid(call);
  const lines = [callWhere(call), callsText.raisedBy(call.raisedBy, call.origin, time(call.raisedAt)), call.playing, call.joined > 0 ? callsText.joinedTimes(call.joined) : null, call.code];
  const escalated = callsText.escalated[call.escalation];
  return (
    <header className="border-b-[3px] border-ink pb-3">
      <div className="flex items-start gap-4">
        <span className={classes('type-number grid h-[6.25rem] min-w-[5.5rem] shrink-0 place-items-center rounded-t-3xl rounded-b-md px-2 text-[5rem]', BADGE[call.status === 'closed' ? 'plain' : look.tone])}>
          {call.scope === 'house' ? '–' : call.lane}
        </span>
        <div className="min-w-0 pt-0.5">
          <h1 className="type-title text-[1.75rem] wrap-anywhere">{callTitle(call)}</h1>
          <p className="mt-1 text-dim">{lines.filter(Boolean).join(' · ')}</p>
        </div>
      </div>
      {said ? <p className="mt-3 text-lg wrap-anywhere">{said}</p> : null}
      {call.status === 'closed' ? null : (
        <div className="mt-3 flex flex-wrap items-end gap-x-4 gap-y-1">
          <span className={classes('flex items-center gap-2', look.clock)}>
            <Mark kind={look.mark} size={26} />
            <RunningClock since={call.raisedAt} className="type-clock text-[4rem]" />
          </span>
          <p className="pb-1.5 text-[1.0625rem]">
            {callsText.since} · <span className={classes('font-[650]', queued && 'italic')}>{standing}</span>
            {escalated ? <span className="block font-[650] text-red">{escalated}</span> : null}
          </p>
        </div>
      )}
      {call.returnedAt !== null && call.status !== 'closed' ? <p className="mt-1 font-[650]">{callsText.runsAgain}</p> : null}
    </header>
  );
}
