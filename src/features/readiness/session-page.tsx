import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { SessionView } from '#shared/contracts/readiness.ts';
import { outstanding } from '#shared/domain/readiness/session.ts';
import { appText } from '#shared/text/en/app.ts';
import { frozenSentence, sessionSentence } from '#shared/text/en/readiness.ts';
import { readinessText as text, sessionLead } from '#shared/text/en/readiness-page.ts';
import { Problem } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';
import { useTimes } from '../../lib/formats.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { classes } from '../../ui/class-names.ts';
import { Page, Skeleton } from '../../ui/page.tsx';
import { Concerns, ConcernSheet } from './components/concerns.tsx';
import { LaneTable } from './components/lane-table.tsx';
import { OffersPart } from './components/offers.tsx';
import { TimeLine } from './components/time-line.tsx';
import { Word } from './components/word.tsx';
import { sessionQuery } from './queries.ts';

/** The session of the address. */
export function SessionPage() {
  const { session: id = '' } = useParams();
  return <OneSession id={id} only={false} />;
}

/** One session until its warm-up: the finding, the way there, every lane; beside it what can be done, and the secretary's word. `only`: there is no list to go back to. */
export function OneSession({ id, only }: { id: string; only: boolean }) {
  const { slug } = useCentre();
  const { data, error, refetch } = useQuery(sessionQuery(slug, id));
  if (data) return <SessionScreen key={data.id} session={data} only={only} />;
  const gone = error instanceof Problem && [404, 422].includes(error.status);
  return (
    <Page title={gone ? appText.notFound : error ? text.failed : text.loading} lead={gone ? appText.notFoundMore : sentenceOf(error)}>
      {error ? (
        <div className="flex gap-3">
          <Link className={buttonLook()} to={`/${slug}/readiness`}>{text.back}</Link>
          {gone ? null : <Button onClick={() => void refetch()}>{text.retry}</Button>}
        </div>
      ) : (
        <Skeleton lines={8} label={text.loading} />
      )}
    </Page>
  );
}

function SessionScreen({ session, only }: { session: SessionView; only: boolean }) {
  const { slug } = useCentre();
  const { time } = useTimes();
  const [raising, setRaising] = useState(false);
  const aside = session.verdict === null && session.raised.length === 0 ? null : (
    <>
      <OffersPart session={session} />
      <Word session={session} onRaise={() => setRaising(true)} />
      <Concerns session={session} />
    </>
  );
  return (
    <Page title={session.name} lead={sessionLead(session, time)} aside={aside} actions={only ? null : <Link className={buttonLook({ kind: 'quiet' })} to={`/${slug}/readiness`}>{text.back}</Link>}>
      <Finding session={session} />
      {session.frozen || session.verdict === null ? null : <TimeLine session={session} />}
      {session.lanesSeen.length > 0 ? <LaneTable lanes={session.lanesSeen} /> : null}
      {raising ? <ConcernSheet session={session} onClose={() => setRaising(false)} /> : null}
    </Page>
  );
}

const TONE = { ready: 'text-green', planned: 'text-ink', 'at-risk': 'text-amber', held: 'text-amber' } as const;

/** Announced when it changes: somebody waits for it with the phone in a pocket. */
function Finding({ session }: { session: SessionView }) {
  const { time } = useTimes();
  const { verdict, frozen } = session;
  if (verdict === null) return <p className="text-lg text-dim">{frozen ? text.noVerdict : null}</p>;
  const spoken = frozen ? { lead: frozenSentence(verdict), rest: text.frozen } : sessionSentence(verdict, session.lanes, outstanding({ lanes: session.lanesSeen }), time);
  return (
    <p role="status" className="max-w-[44ch] text-[1.375rem] leading-snug max-[900px]:text-[1.1875rem]">
      <strong className={classes('font-[720]', TONE[verdict])}>{spoken.lead}</strong> {spoken.rest}
    </p>
  );
}
