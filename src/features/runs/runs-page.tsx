import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { RunDetail } from '#shared/contracts/runs.ts';
import { proofText } from '#shared/text/en/plan.ts';
import { patternOfRun, runsText as text, runsTitle } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { useTimes } from '../../lib/formats.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Sheet } from '../../ui/dialog.tsx';
import { EmptyState, Page, PartTitle, Skeleton } from '../../ui/page.tsx';
import { DressingNews } from './components/dressing-news.tsx';
import { Machines } from './components/machines.tsx';
import { RunForm } from './components/run-form.tsx';
import { RunRow } from './components/run-row.tsx';
import { ToDress } from './components/to-dress.tsx';
import { machinesQuery, patternsQuery, runsQuery, tonightQuery } from './queries.ts';

/** Names for what runs name by codes. */
function useNames(centre: string) {
  const machines = useQuery(machinesQuery(centre)).data?.machines ?? [];
  const patterns = useQuery(patternsQuery(centre)).data?.patterns ?? [];
  return {
    machines,
    machine: (code: string): string => (machines.find((m) => m.code === code)?.name ?? code).split(',')[0] ?? code,
    pattern: (code: string): string => patterns.find((p) => p.code === code)?.name ?? code,
  };
}

/** Runs of this night: what is still to be dressed and by when, under way, planned, made; the machines beside them. */
export function RunsPage() {
  const { slug, may } = useCentre();
  const { time } = useTimes();
  const { data, error, refetch } = useQuery(runsQuery(slug));
  const tonight = useQuery(tonightQuery(slug)).data;
  const names = useNames(slug);
  const [form, setForm] = useState<'plan' | 'record' | null>(null);
  if (!data) {
    return (
      <Page title={error ? text.failed : text.loading} lead={sentenceOf(error)}>
        {error ? <Button onClick={() => void refetch()}>{text.retry}</Button> : <Skeleton lines={6} label={text.loading} />}
      </Page>
    );
  }
  const of = (...states: RunDetail['status'][]) => data.runs.filter((r) => states.includes(r.status));
  const parts = [[text.underWay, of('under-way')], [text.planned, of('planned')], [text.ended, of('finished', 'aborted', 'cancelled').toReversed()]] as const;
  const toDress = tonight?.blocks.filter((block) => block.run === null) ?? [];
  const startBy = (run: RunDetail) => {
    const block = tonight?.blocks.find((one) => one.run === run.key);
    return block?.startBy ? { at: block.startBy, session: block.breaksFirst } : null;
  };
  return (
    <Page
      title={runsTitle(data.runs, toDress.flatMap((block) => block.lanes), names.machine, time)}
      actions={may('run.record') ? <><Button kind="primary" onClick={() => setForm('plan')}>{text.plan}</Button><Button onClick={() => setForm('record')}>{text.record}</Button></> : null}
      aside={<Machines machines={names.machines} />}
    >
      {tonight ? <DressingNews late={tonight.late} unplanned={tonight.unplanned} runsOut={tonight.runsOut} machine={names.machine} /> : null}
      {tonight && toDress.length > 0 ? (
        <section className="mb-8">
          <PartTitle note={proofText(tonight.proof)}>{text.toDress}</PartTitle>
          <ul className="border-b border-rule">{toDress.map((block) => <ToDress key={block.id} block={block} machine={names.machine(block.machine)} pattern={patternOfRun(block, names.pattern)} />)}</ul>
        </section>
      ) : null}
      {data.runs.length === 0 ? <EmptyState title={text.none}>{text.noneMore}</EmptyState> : null}
      {parts.filter(([, runs]) => runs.length > 0).map(([title, runs]) => (
        <section key={title} className="mb-8">
          <PartTitle note={String(runs.length)}>{title}</PartTitle>
          <ul className="border-b border-rule">
            {runs.map((run) => <RunRow key={run.key} run={run} machine={names.machine(run.machine)} pattern={patternOfRun(run, names.pattern)} startBy={run.status === 'planned' ? startBy(run) : null} />)}
          </ul>
        </section>
      ))}
      <Sheet open={form !== null} onClose={() => setForm(null)} title={form === 'record' ? text.record : text.plan}>
        <RunForm key={form ?? ''} made={form === 'record'} onDone={() => setForm(null)} />
      </Sheet>
    </Page>
  );
}
