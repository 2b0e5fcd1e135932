import { lazy, Suspense } from 'react';
import { floorWords, laneWords } from '#shared/text/en/floor-page.ts';
import { callTitle } from '#shared/text/en/calls.ts';
import { useCentre } from '../../../lib/centre.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { useLiveness } from '../../../lib/live.ts';
import { patient } from '../../../lib/patient.ts';
import { RunningClock } from '../../../ui/running-clock.tsx';
import { groupLanes, type LaneGroup } from '../bars.ts';
import { useBoard } from '../board-context.ts';
import type { FloorProps } from '../floor-props.ts';
import { useLaneAct } from '../mutations.ts';
import { useBars } from '../use-bars.ts';
import { LaneRow } from './lane-row.tsx';
import { Calls, NextSessions, Tonight } from './side.tsx';

const LaneSheet = lazy(() => patient(() => import('./lane-sheet.tsx')).then((m) => ({ default: m.LaneSheet })));

/** The plan turned a quarter: a lane is a row, its pins to the right; rows are grouped by what plays on them. */
export function PhoneFloor({ selection, panel, callAddress, sessionAddress }: FloorProps) {
  const { count, now, next } = useBars();
  const stale = useLiveness().state === 'stale';
  return (
    <div className="px-4 pb-6">
      <h1 className="sr-only">{floorWords.pageTitle}</h1>
      <Alerts />
      <div className="plan relative" data-stale={stale}>
        {groupLanes(count, now, next).map((group) => (
          <Group key={group.lanes[0]} group={group} selected={selection.lane} onSelect={selection.select} />
        ))}
      </div>
      <div className="mt-8 flex flex-col gap-6">
        <Calls address={callAddress} />
        <NextSessions address={sessionAddress} />
        <Tonight />
      </div>
      {panel && selection.lane !== null ? (
        <Suspense fallback={null}>
          <LaneSheet title={laneWords.lane(selection.lane)} onClose={() => selection.select(null)}>
            {panel}
          </LaneSheet>
        </Suspense>
      ) : null}
    </div>
  );
}

const LINE: Record<LaneGroup['look'], string> = { league: 'border-league', open: 'border-open', run: 'border-film', free: 'border-rule', plan: 'border-rule', risk: 'border-rule', held: 'border-rule', ready: 'border-rule' };
const NEXT: Partial<Record<NonNullable<LaneGroup['nextLook']>, string>> = { risk: 'text-amber font-[650]', held: 'text-red font-[650]', ready: 'text-green font-[650]' };

function Group({ group, selected, onSelect }: { group: LaneGroup; selected: number | null; onSelect: (lane: number) => void }) {
  const play = group.look === 'open' && group.text && group.lanes.length > 2 ? floorWords.openPlay : group.text?.title;
  const meta = group.next ? group.next.title : group.text?.second.join(' · ');
  return (
    <section className="pt-4">
      <header className={`mb-1 flex flex-wrap items-baseline justify-between gap-x-3 border-b-[3px] pb-1 ${LINE[group.look]}`}>
        <h2 className="type-name">{play ?? floorWords.nobodyOn}</h2>
        {meta ? <span className={`text-sm ${group.next && group.nextLook ? (NEXT[group.nextLook] ?? 'text-dim') : 'text-dim'}`}>{meta}</span> : null}
      </header>
      <ul>
        {group.lanes.map((lane) => (
          <LaneRow key={lane} lane={lane} selected={selected === lane} onSelect={onSelect} />
        ))}
      </ul>
    </section>
  );
}

/** An unanswered call stands above everything, with "Mine" for whoever may take it. */
function Alerts() {
  const { slug, may } = useCentre();
  const act = useLaneAct(slug);
  const calls = (useBoard('calls') ?? []).filter((c) => c.status === 'unanswered' && c.returnedAt === null);
  return (
    <div role="alert" className="-mx-4">
      {calls.map((call) => (
        <div key={call.id} className="grid grid-cols-[auto_minmax(0,1fr)_auto] items-center gap-3 border-b border-paper bg-red px-4 py-2.5 text-on-red">
          <b className="type-number text-[2.125rem]">{call.scope === 'house' ? '–' : call.lane}</b>
          <div className="min-w-0 leading-tight">
            <b className="block font-[690]">{callTitle(call)}</b>
            <span className="text-sm">
              {floorWords.unansweredFor} <RunningClock since={call.raisedAt} />
              {call.playing ? ` · ${call.playing}` : null}
            </span>
            {act.isError && act.variables.act === 'mine' && act.variables.call === call.id ? <span className="block text-sm font-[650]">{sentenceOf(act.error)}</span> : null}
          </div>
          {may('call.work') ? (
            <button type="button" disabled={act.isPending} onClick={() => act.mutate({ act: 'mine', lane: call.lane, call: call.id })} className="min-h-hand min-w-[5.25rem] rounded-md bg-on-red px-4 text-lg font-[740] text-red">
              {floorWords.mine}
            </button>
          ) : null}
        </div>
      ))}
    </div>
  );
}
