import { Link } from 'react-router-dom';
import type { ClosedCall } from '#shared/contracts/calls.ts';
import { callTitle } from '#shared/text/en/calls.ts';
import { causeText } from '#shared/text/en/calls-causes.ts';
import { callsText } from '#shared/text/en/calls-screen.ts';
import { duration } from '#shared/text/en/formats.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { PartTitle } from '../../../ui/page.tsx';

/** Calls that ended this business day, the newest first. */
export function ClosedList({ calls }: { calls: readonly ClosedCall[] }) {
  const { slug } = useCentre();
  const { time } = useTimes();
  return (
    <section className="mt-10">
      <PartTitle note={calls.length > 0 ? String(calls.length) : null}>{callsText.closedToday}</PartTitle>
      {calls.length === 0 ? <p className="border-t border-rule py-3 text-dim">{callsText.noneClosed}</p> : null}
      <ul>
        {calls.map((call) => (
          <li key={call.id} className="relative grid min-h-12 grid-cols-[2.25rem_minmax(0,1fr)_auto] items-baseline gap-x-3 border-t border-rule py-2.5">
            <span className="type-number text-lg">{call.scope === 'house' ? '–' : call.lane}</span>
            <span className="min-w-0">
              <Link to={`/${slug}/calls/${call.id}`} className="font-[650] after:absolute after:inset-0">
                {callTitle(call)}
              </Link>
              <span className="block text-sm text-dim">{callsText.closedLine(call.cause ? causeText(call.cause) : null, call.closedBy)}</span>
              {call.note ? <span className="block text-sm">{call.note}</span> : null}
            </span>
            <span className="text-right text-sm">
              {time(call.closedAt)}
              {call.downMs !== null ? <span className="block text-dim">{callsText.stood(duration(call.downMs))}</span> : null}
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}
