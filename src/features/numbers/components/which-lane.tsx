import { useQuery } from '@tanstack/react-query';
import { number } from '#shared/text/en/formats.ts';
import { POSITIONS, wording } from '#shared/text/en/numbers.ts';
import { useCentre } from '../../../lib/centre.ts';
import { EmptyState, Skeleton } from '../../../ui/page.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';
import { funnelQuery } from '../queries.ts';
import { FunnelChart } from './funnel-chart.tsx';

/** Eight weeks, each lane against what its own frames allow: the picture, and the table behind it. */
export function WhichLane() {
  const { slug } = useCentre();
  const { data } = useQuery(funnelQuery(slug));
  if (!data) return <Skeleton lines={6} label={wording.loading} />;
  if (data.limits.length === 0) return <EmptyState title={data.finding} />;
  const heard = data.lanes.filter((l) => l.perThousand !== null);
  return (
    <section>
      <p className="type-label mb-2">{wording.byChance(data.byChance, heard.length)}</p>
      <FunnelChart data={data} />
      <p className="mb-4 flex flex-wrap gap-x-6 gap-y-1 text-sm text-dim">
        <span><span aria-hidden className="mr-2 inline-block h-3 w-5 align-middle" style={{ background: 'color-mix(in srgb, var(--pine) 42%, transparent)' }} />{wording.band}</span>
        <span><span aria-hidden className="mr-2 inline-block w-5 border-t-2 border-dashed border-amber align-middle" />{wording.outer}</span>
      </p>
      <details>
        <summary className="min-h-9 cursor-pointer font-[620]">{wording.tableBehind}</summary>
        <Table caption={wording.tableBehind}>
          <thead>
            <tr><Th>{wording.lane}</Th><Th number>{wording.frames}</Th><Th number>{wording.stops}</Th><Th number>{wording.rate}</Th><Th>{wording.position}</Th></tr>
          </thead>
          <tbody>
            {data.lanes.map((l) => (
              <tr key={l.lane}>
                <Td className="type-number">{l.lane}</Td><Td number>{number(l.frames)}</Td><Td number>{number(l.stops)}</Td>
                <Td number>{l.perThousand === null ? '–' : number(l.perThousand, 2)}</Td><Td>{POSITIONS[l.position]}</Td>
              </tr>
            ))}
          </tbody>
        </Table>
      </details>
    </section>
  );
}
