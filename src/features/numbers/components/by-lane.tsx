import { createColumnHelper, createSortedRowModel, rowSortingFeature, tableFeatures, useTable } from '@tanstack/react-table';
import type { NightView } from '#shared/contracts/numbers.ts';
import { duration, number } from '#shared/text/en/formats.ts';
import { intervalText, perStopText, rateText, shareText, wording } from '#shared/text/en/numbers.ts';
import { PartTitle } from '../../../ui/page.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';

type Lane = NightView['figures']['byLane'][number];

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel() });
const helper = createColumnHelper<typeof features, Lane>();
/** Where there is no figure, a lane sorts behind all others. */
const LAST = -1;
const columns = helper.columns([
  helper.accessor('lane', { header: wording.lane, cell: ({ row }) => row.original.lane }),
  helper.accessor((l) => l.occupancy ?? LAST, { id: 'occupancy', header: wording.occupancy, cell: ({ row }) => shareText(row.original.occupancy) }),
  helper.accessor('deliveries', { header: wording.deliveries, cell: ({ row }) => number(row.original.deliveries) }),
  helper.accessor('frames', { header: wording.frames, cell: ({ row }) => number(row.original.frames) }),
  helper.accessor('lineage', { header: wording.lineage, cell: ({ row }) => number(row.original.lineage, 1) }),
  helper.accessor('stops', { header: wording.stops, cell: ({ row }) => number(row.original.stops) }),
  helper.accessor('calls', { header: wording.gross, cell: ({ row }) => number(row.original.calls) }),
  helper.accessor((l) => l.rate?.perThousand ?? LAST, { id: 'rate', header: wording.rate, cell: ({ row }) => rateText(row.original.rate) }),
  helper.accessor((l) => l.rate?.high ?? LAST, { id: 'interval', header: wording.interval, cell: ({ row }) => intervalText(row.original.rate) }),
  helper.accessor((l) => l.framesPerStop?.low ?? LAST, { id: 'perStop', header: wording.perStop, cell: ({ row }) => perStopText(row.original.framesPerStop) }),
  helper.accessor('downMs', { header: wording.down, cell: ({ row }) => duration(row.original.downMs) }),
  helper.accessor('wantedDownMs', { header: wording.wanted, cell: ({ row }) => duration(row.original.wantedDownMs) }),
]);

/** Lanes of the night, sortable by every figure. */
export function ByLane({ lanes }: { lanes: Lane[] }) {
  const table = useTable({ features, columns, data: lanes });
  return (
    <section className="mt-8">
      <PartTitle>{wording.byLane}</PartTitle>
      <Table caption={wording.byLane}>
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header, i) => {
                const order = header.column.getIsSorted();
                return (
                  <Th key={header.id} number={i > 0} aria-sort={order === 'asc' ? 'ascending' : order === 'desc' ? 'descending' : 'none'}>
                    <button type="button" className="min-h-7 underline decoration-rule underline-offset-4 hover:decoration-ink" aria-label={wording.sortBy(String(header.column.columnDef.header))} onClick={header.column.getToggleSortingHandler()}>
                      <table.FlexRender header={header} />
                      <span aria-hidden>{order === 'asc' ? ' ↑' : order === 'desc' ? ' ↓' : ''}</span>
                    </button>
                  </Th>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody>
          {table.getRowModel().rows.map((row) => (
            <tr key={row.id}>
              {row.getAllCells().map((cell, i) => (
                <Td key={cell.id} number={i > 0} className={i === 0 ? 'type-number' : undefined}><table.FlexRender cell={cell} /></Td>
              ))}
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}
