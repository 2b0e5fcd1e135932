import './floor.css';
import { useEffect } from 'react';
import { appText } from '#shared/text/en/app.ts';
import { callTitle } from '#shared/text/en/calls.ts';
import { floorWords } from '#shared/text/en/floor-page.ts';
import { dayOfDate, elapsed, number, percent, timeOfDay, timeWithSeconds } from '#shared/text/en/formats.ts';
import { useNow } from '../../lib/clock.ts';
import { useLiveness } from '../../lib/live.ts';
import { LaneBadge } from '../../ui/marks.tsx';
import { useBoard } from './board-context.ts';
import { Plan } from './components/plan.tsx';
import { toneOf, waitsForSomebody } from './components/side.tsx';

/**
 * The house on a wall, dark and without a pointer. Far layer: figures of 79 px and the state on each machine, for six metres.
 * Near layer: everything else. The picture drifts a little against burned-in pixels.
 */
export function WallPage() {
  const centre = useBoard('centre');
  useEffect(() => {
    const root = document.documentElement;
    const before = root.dataset.theme;
    root.dataset.theme = 'dark';
    return () => void (root.dataset.theme = before);
  }, []);
  return (
    <div data-theme="dark" className="fixed inset-0 overflow-hidden bg-paper text-ink">
      <div className="drift absolute inset-1.5 flex flex-col gap-3 p-4">
        <WallHead />
        {centre ? <Plan wall selected={null} onSelect={null} sessionAddress={null} /> : <p className="type-title m-auto text-4xl">{floorWords.loading}</p>}
        <WallFoot />
      </div>
    </div>
  );
}

function WallHead() {
  const centre = useBoard('centre');
  const business = useBoard('business');
  const now = useNow();
  const zone = centre?.zone ?? 'UTC';
  return (
    <header className="flex items-baseline justify-between gap-8">
      <h1 className="type-title text-[2.5rem]">{centre?.name}</h1>
      <NoNews zone={zone} />
      <div className="flex items-baseline gap-8">
        <span className="text-2xl text-dim">{business ? dayOfDate(business.date) : null}</span>
        <time className="type-clock text-[4rem]">{timeOfDay(now, zone)}</time>
      </div>
    </header>
  );
}

/** Said large when the wall has lost the server or the server its database. */
function NoNews({ zone }: { zone: string }) {
  const { state, since } = useLiveness();
  if (state === 'live' || state === 'starting') return null;
  if (state === 'reconnecting') return <span role="status" className="text-2xl text-dim">{floorWords.reconnecting}</span>;
  return (
    <strong role="alert" className="type-title rounded-md bg-amber-fill px-6 py-2 text-[3.25rem] text-on-amber">
      {since === null ? appText.noNewsYet : appText.noNewsSince(timeWithSeconds(since, zone))}
    </strong>
  );
}

const SHOWN = 4;
function WallFoot() {
  const calls = useBoard('calls') ?? [];
  const tonight = useBoard('tonight');
  const now = useNow();
  return (
    <footer className="flex items-center justify-between gap-10 border-t border-rule pt-3">
      <ul className="flex min-w-0 flex-wrap gap-x-8 gap-y-2" aria-label={floorWords.calls}>
        {calls.length === 0 ? <li className="text-2xl text-dim">{floorWords.noCalls}</li> : null}
        {calls.slice(0, SHOWN).map((call) => (
          <li key={call.id} className="flex items-center gap-3">
            <LaneBadge lane={call.scope === 'house' ? '–' : call.lane} tone={toneOf(call)} size={34} />
            <span className="text-2xl font-[640]">{callTitle(call)}</span>
            <span className={`type-clock text-[2rem] ${waitsForSomebody(call) ? 'text-red' : 'text-dim'}`}>{elapsed(now - call.raisedAt)}</span>
          </li>
        ))}
        {calls.length > SHOWN ? <li className="self-center text-2xl text-dim">{floorWords.moreCalls(calls.length - SHOWN)}</li> : null}
      </ul>
      {tonight ? (
        <dl className="flex shrink-0 items-baseline gap-8 text-xl">
          <Figure term={floorWords.lanesInUse} value={`${number(tonight.inUse)} ${floorWords.of(tonight.lanes)}`} />
          <Figure term={floorWords.occupancy} value={tonight.occupancyPct === null ? '–' : percent(tonight.occupancyPct)} />
          <Figure term={floorWords.frames} value={number(tonight.frames)} />
        </dl>
      ) : null}
    </footer>
  );
}

const Figure = ({ term, value }: { term: string; value: string }) => (
  <div className="flex items-baseline gap-2.5">
    <dt className="text-dim">{term}</dt>
    <dd className="type-number text-[2rem]">{value}</dd>
  </div>
);
