import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { addDays, businessDayAt } from '#shared/domain/business-day.ts';
import { wording } from '#shared/text/en/numbers.ts';
import { useCentre } from '../../lib/centre.ts';
import { serverNow } from '../../lib/clock.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { EmptyState, Page, Skeleton } from '../../ui/page.tsx';
import { ByKind } from './components/by-kind.tsx';
import { ByLane } from './components/by-lane.tsx';
import { NightSide } from './components/night-side.tsx';
import { WhichLane } from './components/which-lane.tsx';
import { funnelQuery, nightQuery } from './queries.ts';

/** Last night on one page, and which lane is really worse. Without a date: the last night that has ended. */
export function NumbersPage() {
  const { slug, zone, cut } = useCentre();
  const given = useParams()['date'];
  const date = given ?? addDays(businessDayAt(serverNow(), zone, cut).date, -1);
  const night = useQuery(nightQuery(slug, date));
  const lanes = useQuery(funnelQuery(slug));
  const empty = night.data && night.data.figures.total.deliveries + night.data.figures.total.calls + night.data.figures.total.framesEstimated === 0;
  return (
    <Page
      title={lanes.data?.finding ?? wording.whichLane}
      lead={wording.funnelLead}
      actions={<Button kind="quiet" className="print:hidden" onClick={() => window.print()}>{wording.print}</Button>}
      aside={night.data ? <NightSide night={night.data} /> : <NightWaits error={night.error} retry={() => void night.refetch()} />}
    >
      <WhichLane />
      {empty ? <EmptyState title={wording.noNight}>{wording.noNightWhy}</EmptyState> : null}
      {night.data && !empty ? (
        <>
          <ByKind kinds={night.data.figures.byKind} />
          <ByLane lanes={night.data.figures.byLane} />
        </>
      ) : null}
    </Page>
  );
}

function NightWaits({ error, retry }: { error: unknown; retry: () => void }) {
  if (!error) return <Skeleton lines={8} label={wording.loading} />;
  return (
    <EmptyState title={wording.failed}>
      <p className="mb-3">{sentenceOf(error)}</p>
      <Button onClick={retry}>{wording.retry}</Button>
    </EmptyState>
  );
}
