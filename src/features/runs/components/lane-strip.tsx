import type { RunDetail } from '#shared/contracts/runs.ts';
import { laneState, LANE_STATES, type LaneStateOfRun } from '#shared/text/en/runs-page.ts';
import { classes } from '../../../ui/class-names.ts';

const LOOK: Record<LaneStateOfRun, string> = {
  'dressed': 'bg-film text-paper',
  'now': 'text-ink ring-2 ring-inset ring-film',
  'waits': 'text-dim ring-1 ring-inset ring-line',
  'skipped': 'text-dim line-through ring-1 ring-inset ring-line',
  'broken-off': 'bg-red text-on-red line-through',
};

/** Lanes of a run in their order: filled is dressed, a heavy frame is under the machine, struck through wasn't done. */
export function LaneStrip({ run }: { run: Pick<RunDetail, 'lanes' | 'outcomes' | 'laneNow'> }) {
  return (
    <ol className="mt-1.5 flex flex-wrap gap-1">
      {run.lanes.map((lane) => {
        const state = laneState(run, lane);
        return (
          <li key={lane} className={classes('type-number grid h-7 min-w-8 place-items-center rounded-t-[6px] rounded-b-[2px] px-1', LOOK[state])}>
            <span className="sr-only">{`${LANE_STATES[state]}: `}</span>
            {lane}
          </li>
        );
      })}
    </ol>
  );
}
