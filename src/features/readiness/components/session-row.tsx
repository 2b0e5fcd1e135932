import { Link } from 'react-router-dom';
import type { SessionSummary } from '#shared/contracts/readiness.ts';
import { kindNames } from '#shared/text/en/leagues.ts';
import { concernsText, confirmedText, pipsLabel, reopenedText, timesText } from '#shared/text/en/readiness-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { Pips } from '../../../ui/marks.tsx';
import { VerdictWord } from './verdict-word.tsx';

/** One session in the list: the whole line leads to its page. */
export function SessionRow({ session }: { session: SessionSummary }) {
  const { slug } = useCentre();
  const { time } = useTimes();
  const { confirmation } = session;
  return (
    <li className="border-t border-rule">
      <Link to={`/${slug}/readiness/${session.id}`} className="block px-1 py-4 hover:bg-card">
        <span className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
          <span className="type-name text-xl">{session.name}</span>
          {session.verdict ? <VerdictWord verdict={session.verdict} /> : null}
        </span>
        <span className="mt-0.5 block text-dim">{timesText(session, time)}</span>
        {session.marks.length > 0 ? <Pips className="mt-2.5 max-w-md" states={session.marks.map((one) => one.mark)} label={pipsLabel(session.marks)} /> : null}
        {session.says ? <span className="mt-2 block text-[1.0625rem]">{session.says}</span> : null}
        {confirmation ? <span className="mt-1 block text-sm">{confirmation.reopened ? reopenedText(confirmation.reopened.at, time) : confirmedText(confirmation.by, confirmation.at, time)}</span> : null}
        {session.concerns > 0 ? <span className="mt-1 block text-sm font-[650] text-amber">{concernsText(session.concerns)}</span> : null}
      </Link>
    </li>
  );
}

/** A party or open play: it has its lanes, and nobody asks whether they are ready. */
export function UnwatchedRow({ session }: { session: SessionSummary }) {
  const { time } = useTimes();
  return (
    <li className="flex flex-wrap justify-between gap-x-4 border-t border-rule px-1 py-2.5">
      <span className="font-[620]">{session.name}</span>
      <span className="text-dim">{`${kindNames[session.kind]} · ${timesText(session, time)}`}</span>
    </li>
  );
}
