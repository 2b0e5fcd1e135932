import type { LaneReadinessView } from '#shared/contracts/readiness.ts';
import type { LaneMark } from '#shared/domain/readiness/check.ts';
import { markNames } from '#shared/text/en/readiness.ts';
import { markLabel, readinessText as text } from '#shared/text/en/readiness-page.ts';
import { useTimes } from '../../../lib/formats.ts';
import { type BadgeTone, LaneBadge } from '../../../ui/marks.tsx';
import { classes } from '../../../ui/class-names.ts';
import { Table, Td, Th } from '../../../ui/table.tsx';
import { type Cell, cellOf, COLUMNS, headline, waitsFor } from '../lane-cells.ts';

const TONE: Record<LaneMark, BadgeTone> = { ok: 'ready', waits: 'waits', 'at-risk': 'at-risk', holds: 'holds' };
const wide = 'max-[900px]:hidden';

function Words({ cell }: { cell: Cell | null }) {
  if (!cell) return null;
  return <span className={classes(cell.mark === 'holds' && 'font-[700]', cell.mark === 'at-risk' && 'font-[620] text-amber')}>{cell.text}</span>;
}

/** Every lane and what its checks say; on a phone the one thing that matters most. */
export function LaneTable({ lanes }: { lanes: readonly LaneReadinessView[] }) {
  const { time } = useTimes();
  return (
    <Table caption={text.tableCaption} className="max-w-5xl">
      <thead>
        <tr>
          <Th>{text.columns.lane}</Th>
          <Th className="min-[901px]:hidden">{text.columns.state}</Th>
          {COLUMNS.map((column) => <Th key={column} className={wide}>{text.columns[column]}</Th>)}
          <Th>{text.columns.waitsFor}</Th>
        </tr>
      </thead>
      <tbody>
        {lanes.map((lane) => (
          <tr key={lane.lane}>
            <th scope="row" className="border-t border-rule py-2 pr-4 text-left">
              <LaneBadge lane={lane.lane} tone={TONE[lane.mark]} size={20} />
              <span className="sr-only">{markLabel(lane.lane, markNames[lane.mark])}</span>
            </th>
            <Td className="align-middle! min-[901px]:hidden"><Words cell={headline(lane, time)} /></Td>
            {COLUMNS.map((column) => <Td key={column} className={classes(wide, 'align-middle!')}><Words cell={cellOf(lane, column, time)} /></Td>)}
            <Td className={classes('align-middle!', lane.mark === 'holds' && 'font-[700]')}>{waitsFor(lane)}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
