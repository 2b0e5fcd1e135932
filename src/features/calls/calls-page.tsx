import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { CallView } from '#shared/contracts/floor.ts';
import { callOrder } from '#shared/domain/calls/view.ts';
import { callsText, callsTitle } from '#shared/text/en/calls-screen.ts';
import { useCentre } from '../../lib/centre.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Sheet } from '../../ui/dialog.tsx';
import { EmptyState, Page, PartTitle, Skeleton } from '../../ui/page.tsx';
import { AlertSettings } from './components/alert-settings.tsx';
import { CallRow } from './components/call-row.tsx';
import { ClosedList } from './components/closed-list.tsx';
import { QueueNotes } from './components/queue-notes.tsx';
import { RaiseForm } from './components/raise-form.tsx';
import { type CallActions, useCallActions } from './mutations.ts';
import { callsQuery } from './queries.ts';

/** Open calls with their clocks, mine first, and what was closed today; a call is raised beside them. */
export function CallsPage() {
  const { slug, may } = useCentre();
  const { data, error, refetch } = useQuery(callsQuery(slug));
  const [raising, setRaising] = useState(false);
  const actions = useCallActions();
  if (!data) {
    return (
      <Page title={error ? callsText.failed : callsText.open} lead={sentenceOf(error)}>
        {error ? <Button onClick={() => void refetch()}>{callsText.retry}</Button> : <Skeleton lines={5} label={callsText.loading} />}
      </Page>
    );
  }
  const raise = may('call.raise');
  return (
    <Page
      title={callsTitle(data.open)}
      actions={raise ? <Button kind="secondary" className="min-[901px]:hidden" onClick={() => setRaising(true)}>{callsText.raise}</Button> : null}
      aside={<Aside lanes={data.lanes} raise={raise} />}
    >
      <QueueNotes actions={actions} />
      {data.open.length === 0 ? <EmptyState title={callsText.noneOpen}>{callsText.noneOpenMore}</EmptyState> : <OpenList calls={data.open} actions={actions} />}
      <ClosedList calls={data.closed} />
      <Sheet open={raising} onClose={() => setRaising(false)} title={callsText.raise} lead={callsText.raiseLead}>
        <RaiseForm lanes={data.lanes} onRaised={() => setRaising(false)} />
      </Sheet>
    </Page>
  );
}

function OpenList({ calls, actions }: { calls: readonly CallView[]; actions: CallActions }) {
  const { me, may } = useCentre();
  const answers = (call: CallView) => call.status === 'unanswered' && (may('call.work') || (call.safety !== null && may('call.answer')));
  return (
    <section>
      <PartTitle note={String(calls.length)}>{callsText.open}</PartTitle>
      <ul className="border-b border-rule">
        {calls.toSorted(callOrder(me?.id ?? null)).map((call) => (
          <CallRow key={call.id} call={call} busy={actions.waiting.some((one) => one.call === call.id)} onMine={answers(call) ? () => actions.act(call.id, 'acknowledge') : undefined} />
        ))}
      </ul>
    </section>
  );
}

function Aside({ lanes, raise }: { lanes: number; raise: boolean }) {
  return (
    <div className="flex flex-col gap-8">
      {raise ? (
        <section className="max-[900px]:hidden">
          <PartTitle>{callsText.raise}</PartTitle>
          <div className="border-t border-rule pt-3">
            <p className="mb-3 text-dim">{callsText.raiseLead}</p>
            <RaiseForm lanes={lanes} />
          </div>
        </section>
      ) : null}
      <AlertSettings />
    </div>
  );
}
