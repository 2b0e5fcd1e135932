import { Link } from 'react-router-dom';
import type { CallView } from '#shared/contracts/floor.ts';
import { callPlace, callTitle, statusNames } from '#shared/text/en/calls.ts';
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
  const said = [callPlace(call), call.playing, callsText.raisedBy(call.raisedBy, call.origin, time(call.raisedAt)), call.joined > 0 ? callsText.joinedTimes(call.joined) : null];
  const escalated = callsText.escalated[call.escalation];
  return (
    <li className={classes('relative grid grid-cols-[auto_minmax(0,1fr)_auto] items-start gap-x-4 gap-y-3 border-t border-rule py-4', call.safety && call.status !== 'closed' && 'border-l-4 border-l-red pl-3')}>
      <LaneBadge lane={call.scope === 'house' ? '–' : call.lane} tone={look.tone} size={26} />
      <div className="min-w-0">
        <h3 className="type-name text-[1.1875rem] leading-tight">
          <Link to={`/${slug}/calls/${call.id}`} className="after:absolute after:inset-0">
            {callTitle(call)}
          </Link>
        </h3>
        <p className="mt-0.5 text-dim">{said.filter(Boolean).join(' · ')}</p>
        {call.returnedAt !== null ? <p className="mt-0.5 font-[620]">{callsText.runsAgain}</p> : null}
      </div>
      <div className="text-right">
        <p className={classes('flex items-center justify-end gap-1.5', look.clock)}>
          <Mark kind={look.mark} />
          <RunningClock since={call.raisedAt} className="type-clock text-2xl" />
        </p>
        <p className="mt-1 max-w-36 text-sm text-dim">{standing}</p>
        {escalated ? <p className="text-sm font-[650] text-red">{escalated}</p> : null}
      </div>
      {onMine ? (
        <Button kind="primary" size="hand" busy={busy} className="relative col-span-3 min-[901px]:col-span-1 min-[901px]:col-start-2 min-[901px]:justify-self-start min-[901px]:px-8" onClick={onMine}>
          {callsText.mine}
        </Button>
      ) : null}
    </li>
  );
}
