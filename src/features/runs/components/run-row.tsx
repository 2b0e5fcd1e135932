import type { RunDetail } from '#shared/contracts/runs.ts';
import { doneText, OUTCOMES, startByText, runsText as text, STATUSES, volumeText } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';
import { useTakeBack } from '../mutations.ts';
import { LaneStrip } from './lane-strip.tsx';

interface Props {
  run: RunDetail;
  machine: string;
  /** Name of its pattern with the revision. */
  pattern: string;
  /** Until when it may begin, and for whom. */
  startBy: { at: number; session: string | null } | null;
}

/** One run: what, where, how far; its lanes one by one when opened. */
export function RunRow({ run, machine, pattern, startBy }: Props) {
  const { time } = useTimes();
  const when = [run.startAt, run.endAt].map((at) => (at === null ? '–' : time(at))).join('–');
  const late = startBy !== null && run.plannedStart !== null && run.plannedStart > startBy.at;
  return (
    <li className="border-t border-rule py-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <strong className="type-name">{`${text.run} ${run.run}`}</strong>
        <span className="type-number">{`${run.forecast && run.status === 'under-way' ? '≈ ' : ''}${when}`}</span>
      </div>
      <p className="text-dim">{[run.lanes.length === 0 ? text.lanesNotTold : null, pattern, machine, STATUSES[run.status], run.entered === 'hand' ? text.byHand : null, run.reason].filter(Boolean).join(' · ')}</p>
      {startBy ? <p className={late ? 'font-[700] text-red' : 'font-[620]'}>{startByText(time(startBy.at), startBy.session)}</p> : null}
      <LaneStrip run={run} />
      {run.outcomes.length > 0 ? (
        <details className="mt-1">
          <summary className="min-h-9 cursor-pointer py-1.5 font-[620] max-[900px]:min-h-hand max-[900px]:py-3">{doneText(run)}</summary>
          <Outcomes run={run} />
        </details>
      ) : null}
      {run.status === 'planned' ? <TakeBack run={run} /> : null}
    </li>
  );
}

function TakeBack({ run }: { run: RunDetail }) {
  const { may } = useCentre();
  const back = useTakeBack();
  if (!may('run.record')) return null;
  return (
    <div className="mt-2.5">
      <Button busy={back.isPending} onClick={() => back.mutate({ machine: run.machine, run: run.run, reason: text.takeBack })}>{text.takeBack}</Button>
      <Refused>{sentenceOf(back.error)}</Refused>
    </div>
  );
}

function Outcomes({ run }: { run: RunDetail }) {
  const { time } = useTimes();
  return (
    <Table caption={doneText(run)}>
      <thead><tr><Th>{text.lanes}</Th><Th>{text.outcome}</Th><Th>{text.finished}</Th><Th>{text.volume}</Th></tr></thead>
      <tbody>
        {run.outcomes.map((lane) => (
          <tr key={lane.lane}>
            <Td className="type-number">{lane.lane}</Td>
            <Td>{lane.reason ? `${OUTCOMES[lane.outcome]}: ${lane.reason}` : OUTCOMES[lane.outcome]}</Td>
            <Td>{lane.finishedAt === null ? '–' : time(lane.finishedAt)}</Td>
            <Td>{volumeText(lane)}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
