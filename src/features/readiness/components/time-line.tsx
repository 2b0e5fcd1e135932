import type { SessionView } from '#shared/contracts/readiness.ts';
import { momentText } from '#shared/text/en/readiness.ts';
import { readinessText as text } from '#shared/text/en/readiness-page.ts';
import { useNow } from '../../../lib/clock.ts';
import { useTimes } from '../../../lib/formats.ts';
import { classes } from '../../../ui/class-names.ts';

const DOT = { plain: 'bg-ink', waits: 'bg-amber-fill', 'at-risk': 'bg-amber-fill', holds: 'bg-red', ok: 'bg-green' } as const;
interface Stop {
  at: number;
  says: string;
  dot: keyof typeof DOT;
}

/** More stops than these don't fit a line; the table has them all. */
const STOPS_MOST = 4;

/** From now over what settles, and when at the latest, to warm-up: in order, not to scale. */
export function TimeLine({ session }: { session: SessionView }) {
  const now = useNow(10_000);
  const { time } = useTimes();
  const between: Stop[] = session.moments.filter((moment) => moment.at > now && moment.at < session.warmUpAt).slice(0, STOPS_MOST)
    .map((moment) => ({ at: moment.at, says: momentText(moment.kind, moment.lanes), dot: moment.mark }));
  const last = session.moments.filter((moment) => moment.at === session.warmUpAt);
  const warmUp: Stop = { at: session.warmUpAt, says: [text.warmUp, ...last.map((moment) => momentText(moment.kind, moment.lanes))].join(' · '), dot: last[0]?.mark ?? 'plain' };
  const stops: Stop[] = [{ at: now, says: text.now, dot: 'plain' }, ...between, warmUp];
  return (
    <ol aria-label={text.timeline} className="my-6 flex max-w-5xl border-t-[3px] border-ink max-[900px]:flex-col max-[900px]:border-t-0 max-[900px]:border-l-[3px] max-[900px]:pl-4">
      {stops.map((stop, i) => (
        <li key={`${stop.at}-${i}`} className="relative min-w-0 grow basis-0 pr-3 pt-3 max-[900px]:py-1.5">
          <span aria-hidden className={classes('absolute -top-2 left-0 size-3.5 rounded-full max-[900px]:top-3 max-[900px]:-left-[1.55rem]', DOT[stop.dot])} />
          <time className="type-clock text-xl">{time(stop.at)}</time>
          <span className="ml-2 text-sm text-dim">{stop.says}</span>
        </li>
      ))}
    </ol>
  );
}
