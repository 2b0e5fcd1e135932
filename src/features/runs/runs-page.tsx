import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { RunDetail } from '#shared/contracts/runs.ts';
import { runsText as text, runsTitle } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { useTimes } from '../../lib/formats.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Sheet } from '../../ui/dialog.tsx';
import { EmptyState, Page, PartTitle, Skeleton } from '../../ui/page.tsx';
import { Machines } from './components/machines.tsx';
import { RunForm } from './components/run-form.tsx';
import { RunRow } from './components/run-row.tsx';
import { machinesQuery, runsQuery } from './queries.ts';

/** Runs of this night: under way, planned, made; the machines beside them. */
export function RunsPage() {
  const { slug, may } = useCentre();
  const { time } = useTimes();
  const { data, error, refetch } = useQuery(runsQuery(slug));
  const machines = useQuery(machinesQuery(slug)).data?.machines ?? [];
  const [form, setForm] = useState<'plan' | 'record' | null>(null);
  const nameOf = (code: string): string => (machines.find((m) => m.code === code)?.name ?? code).split(',')[0] ?? code;
  if (!data) {
    return (
      <Page title={error ? text.failed : text.loading} lead={sentenceOf(error)}>
        {error ? <Button onClick={() => void refetch()}>{text.retry}</Button> : <Skeleton lines={6} label={text.loading} />}
      </Page>
    );
  }
  const of = (...states: RunDetail['status'][]) => data.runs.filter((r) => states.includes(r.status));
  const parts = [[text.underWay, of('under-way')], [text.planned, of('planned')], [text.ended, of('finished', 'aborted', 'cancelled').toReversed()]] as const;
  return (
    <Page
      title={runsTitle(data.runs, nameOf, time)}
      actions={may('run.record') ? <><Button kind="primary" onClick={() => setForm('plan')}>{text.plan}</Button><Button onClick={() => setForm('record')}>{text.record}</Button></> : null}
      aside={<Machines machines={machines} />}
    >
      {data.runs.length === 0 ? <EmptyState title={text.none}>{text.noneMore}</EmptyState> : null}
      {parts.filter(([, runs]) => runs.length > 0).map(([title, runs]) => (
        <section key={title} className="mb-8">
          <PartTitle note={String(runs.length)}>{title}</PartTitle>
          <ul className="border-b border-rule">{runs.map((run) => <RunRow key={run.key} run={run} machine={nameOf(run.machine)} />)}</ul>
        </section>
      ))}
      <Sheet open={form !== null} onClose={() => setForm(null)} title={form === 'record' ? text.record : text.plan}>
        <RunForm key={form ?? ''} made={form === 'record'} onDone={() => setForm(null)} />
      </Sheet>
    </Page>
  );
}
