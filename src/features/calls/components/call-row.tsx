import { Link } from 'react-router-dom';
import type { CallView } from '#shared/contracts/floor.ts';
import { callLanes, callTitle, callWhere, statusNames } from '#shared/text/en/calls.ts';
import { callsText } from '#shared/text/en/calls-screen.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { Button } from '../../../ui/button.tsx';
import { classes } from '../../../ui/class-names.ts';
import { type BadgeTone, LaneBadge, Mark, type MarkKind } from '../../../ui/marks.tsx';
import { RunningClock } from '../../../ui/running-clock.tsx';

/** Colour and mark of a call by its state; words stand beside both. */
export function lookOf(call: CallView): { tone: BadgeTone; mark: MarkKind; clock: string } {
  if (call.mechanicIn) return { tone: 'mechanic-in', mark: 'mechanic-in', clock: call.alarmAt === null ? 'text-ink' : 'text-red' };
  if (call.status === 'unanswered') return { tone: 'unanswered', mark: 'unanswered', clock: 'text-red' };
  if (call.status === 'out-of-service') return { tone: 'outline', mark: 'out-of-service', clock: 'text-ink' };
  if (call.status === 'parked') return { tone: 'outline', mark: 'parked', clock: 'text-ink' };
  return { tone: 'answered', mark: 'answered', clock: 'text-amber' };
}

/** Who has the call and how it stands, in a few words. */
export function useStanding(call: CallView): string {
  const { me } = useCentre();
  const { time } = useTimes();
  if (call.mechanicIn) return callsText.mechanicIn(call.mechanicIn.by, time(call.mechanicIn.since));
  if (call.status === 'parked' && call.parkedUntil !== null) return callsText.parkedTill(time(call.parkedUntil));
  if (call.status === 'out-of-service') return statusNames[call.status];
  if (call.mechanic?.id === me?.id && call.mechanic) return callsText.youAre(call.status);
  return callsText.statusBy(statusNames[call.status], call.mechanic?.name ?? null);
}

/** One open call in the list: the whole line leads to it; `onMine` adds the button that answers it from here. */
export function CallRow({ call, onMine, busy = false }: { call: CallView; onMine?: () => void; busy?: boolean }) {
  const { slug } = useCentre();
  const { time } = useTimes();
  const standing = useStanding(call);
  const look = lookOf(call);
  const said = [callWhere(call), call.playing, callsText.raisedBy(call.raisedBy, call.origin, time(call.raisedAt)), call.joined > 0 ? callsText.joinedTimes(call.joined) : null];
  const escalated = callsText.escalated[call.escalation];
  return (
    <li className={classes('relative grid grid-cols-[auto_minmax(0,1fr)_auto] items-start gap-x-4 border-t border-rule py-4', call.safety && call.status !== 'closed' && 'border-l-4 border-l-red pl-3')}>
      <LaneBadge lane={call.scope === 'house' ? '–' : call.lane} tone={look.tone} size={26} className="row-span-2" />
      <h3 className="type-name min-w-0 text-[1.1875rem] leading-tight wrap-anywhere">
        <Link to={`/${slug}/calls/${call.id}`} className="after:absolute after:inset-0">
          {callTitle(call)}
        </Link>
      </h3>
      <p className={classes('flex items-center justify-end gap-1.5', look.clock)}>
        <Mark kind={look.mark} />
        <RunningClock since={call.raisedAt} className="type-clock text-2xl" />
      </p>
      <div className="col-span-2 mt-0.5 min-[901px]:col-span-1">
        <p className="text-dim">{said.filter(Boolean).join(' · ')}</p>
        {call.returnedAt !== null ? <p className="font-[620]">{callsText.runsAgain}</p> : null}
      </div>
      <p className="col-span-2 col-start-2 mt-0.5 flex flex-wrap gap-x-3 min-[901px]:col-span-1 min-[901px]:col-start-3 min-[901px]:max-w-56 min-[901px]:justify-end min-[901px]:text-right">
        <span className="font-[620]">{standing}</span>
        {escalated ? <span className="font-[650] text-red">{escalated}</span> : null}
      </p>
      {onMine ? (
        <Button kind="primary" size="hand" busy={busy} aria-label={callsText.mineOf(callLanes(call))} className="relative col-span-3 mt-3 min-[901px]:col-span-1 min-[901px]:col-start-2 min-[901px]:justify-self-start min-[901px]:px-8" onClick={onMine}>
          {callsText.mine}
        </Button>
      ) : null}
    </li>
  );
}
