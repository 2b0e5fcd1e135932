import { useEffect, useRef } from 'react';
import { Link } from 'react-router-dom';
import type { LaneView } from '#shared/contracts/floor.ts';
import { useNames } from '#shared/text/en/calls.ts';
import { boardWords } from '#shared/text/en/floor.ts';
import { laneWords } from '#shared/text/en/floor-page.ts';
import { feet, number, percent } from '#shared/text/en/formats.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { IconButton } from '../../../ui/button.tsx';
import { LaneBadge } from '../../../ui/marks.tsx';
import { nextSession } from '../bars.ts';
import { useBoard, useLane } from '../board-context.ts';
import { markOf } from '../lane-mark.ts';
import type { LaneMode } from '../use-lane-selection.ts';
import { LaneActs } from './lane-acts.tsx';

interface Props {
  lane: number;
  mode: LaneMode;
  onMode: (mode: LaneMode) => void;
  onLeave: () => void;
  callAddress: ((call: string) => string) | null;
}

const TONE = { 'unanswered': 'unanswered', 'danger': 'unanswered', 'answered': 'answered', 'mechanic-in': 'mechanic-in' } as const;

/** What is known of one lane, and what can be done with it. Takes the focus when another lane is selected. */
export function LanePanel(props: Props) {
  const view = useLane(props.lane);
  return view ? <Panel {...props} view={view} /> : null;
}

function Panel({ view, mode, onMode, onLeave, callAddress }: Props & { view: LaneView }) {
  const heading = useRef<HTMLHeadingElement>(null);
  const { slug } = useCentre();
  const { mark } = markOf(view);
  useEffect(() => heading.current?.focus({ preventScroll: true }), [view.lane]);
  return (
    <section aria-labelledby="lane-heading" className="flex flex-col gap-4" data-panel={view.lane}>
      <header className="flex items-start gap-4">
        <LaneBadge lane={view.lane} size={40} tone={TONE[mark as keyof typeof TONE] ?? 'plain'} />
        <div className="min-w-0 grow">
          <h2 id="lane-heading" ref={heading} tabIndex={-1} className="type-title text-xl outline-none">
            <span className="sr-only">{laneWords.lane(view.lane)}: </span>
            <Plays view={view} />
          </h2>
          <UseDetails view={view} />
        </div>
        <IconButton label={laneWords.leave} onClick={onLeave}>
          <span aria-hidden className="text-xl leading-none">×</span>
        </IconButton>
      </header>
      <Warnings view={view} />
      {view.call && callAddress ? <Link to={callAddress(view.call.id)} className="font-[650] underline underline-offset-4">{laneWords.toCall}</Link> : null}
      <LaneFacts view={view} />
      <LaneActs view={view} centre={slug} mode={mode} onMode={onMode} />
    </section>
  );
}

const Plays = ({ view }: { view: LaneView }) => <>{view.use ? (view.use.label ?? useNames[view.use.kind]) : laneWords.free}</>;

function UseDetails({ view }: { view: LaneView }) {
  const { time } = useTimes();
  if (!view.use) return null;
  const { label, kind, since, until, bowlers, quiet } = view.use;
  const parts = [label ? useNames[kind] : null, laneWords.since(time(since)), until === null ? null : laneWords.until(time(until)), bowlers === null ? null : laneWords.bowlers(bowlers), quiet ? laneWords.quiet : null];
  return <p className="type-label">{parts.filter(Boolean).join(' · ')}</p>;
}

function Warnings({ view }: { view: LaneView }) {
  const { time } = useTimes();
  const lines = [
    view.mechanicIn ? laneWords.mechanicIn(view.mechanicIn.by, time(view.mechanicIn.since)) : null,
    view.outOfService ? laneWords.outBecause(view.outOfService.reason, view.outOfService.by, time(view.outOfService.since)) : null,
    view.brokenOff ? laneWords.brokenOff : null,
    view.unheard ? laneWords.unheard : null,
  ].filter((line) => line !== null);
  return lines.length === 0 ? null : (
    <ul className="border-l-4 border-amber-fill pl-3 text-sm font-[560]">
      {lines.map((line) => (
        <li key={line}>{line}</li>
      ))}
    </ul>
  );
}

function LaneFacts({ view }: { view: LaneView }) {
  const { time, dayAndTime } = useTimes();
  const { film } = view;
  const day = 86_400_000;
  const next = nextSession(view.lane, useBoard('sessions') ?? []);
  const rows: [string, string][] = [[laneWords.facts.machine, laneWords.machine[view.machine]]];
  if (view.progress) rows.push([laneWords.facts.progress, laneWords.progress(view.progress.game, view.progress.frame)]);
  if (view.dressing) rows.push([laneWords.facts.film, laneWords.beingDressed(view.dressing.run, time(view.dressing.since))]);
  else if (film) {
    const pattern = film.pattern === null ? laneWords.filmUnknown : laneWords.patternOf(film.pattern, film.revision);
    rows.push([laneWords.facts.film, [film.lengthFt === null ? null : feet(film.lengthFt), pattern, film.verified ? null : laneWords.unverified].filter(Boolean).join(', ')]);
    rows.push([laneWords.facts.strength, laneWords.strength(percent(Math.round(film.strength * 100)), laneWords.freshness[film.freshness])]);
    rows.push([laneWords.facts.dressed, Math.abs(Date.now() - film.at) > day / 2 ? dayAndTime(film.at) : time(film.at)]);
    rows.push([laneWords.facts.deliveries, view.hearsDeliveries || film.deliveries > 0 ? number(film.deliveries) : laneWords.notHeard]);
  } else rows.push([laneWords.facts.film, view.brokenOff ? boardWords.redo[0] : laneWords.filmUnknown]);
  if (next) rows.push([laneWords.facts.next, laneWords.next(next.name, time(next.warmUpAt))]);
  return (
    <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-5 border-y border-rule py-2 text-[0.9375rem]">
      {rows.map(([term, value]) => (
        <div key={term} className="contents">
          <dt className="py-0.5 text-dim">{term}</dt>
          <dd className="py-0.5 font-[560]">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
