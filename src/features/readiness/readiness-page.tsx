import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { readinessText as text, readinessTitle } from '#shared/text/en/readiness-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { EmptyState, Page, PartTitle, Skeleton } from '../../ui/page.tsx';
import { SessionRow, UnwatchedRow } from './components/session-row.tsx';
import { WeightsSheet } from './components/weights-sheet.tsx';
import { sessionsQuery } from './queries.ts';
import { OneSession } from './session-page.tsx';

/** Sessions of this business day with their readiness; a secretary sees the own leagues, one alone at once with all its lanes. */
export function ReadinessPage() {
  const { slug, role, may } = useCentre();
  const { data, error, refetch } = useQuery(sessionsQuery(slug));
  const [weighing, setWeighing] = useState(false);
  if (!data) {
    return (
      <Page title={error ? text.failed : text.loading} lead={sentenceOf(error)}>
        {error ? <Button onClick={() => void refetch()}>{text.retry}</Button> : <Skeleton lines={6} label={text.loading} />}
      </Page>
    );
  }
  const watched = data.sessions.filter((session) => session.kind === 'league' || session.kind === 'tournament');
  const others = data.sessions.filter((session) => !watched.includes(session));
  const own = role === 'secretary';
  const [first] = watched;
  if (own && first && watched.length === 1 && others.length === 0) return <OneSession id={first.id} only />;
  return (
    <Page title={readinessTitle(watched)} actions={may('settings.edit') ? <Button kind="secondary" onClick={() => setWeighing(true)}>{text.weights}</Button> : null}>
      {watched.length === 0 ? <EmptyState title={own ? text.noneOwn : text.none}>{own ? text.noneOwnMore : text.noneMore}</EmptyState> : null}
      <ul className="max-w-4xl">
        {watched.map((session) => <SessionRow key={session.id} session={session} />)}
      </ul>
      {others.length > 0 ? (
        <section className="mt-10 max-w-4xl">
          <PartTitle note={text.othersNote}>{text.others}</PartTitle>
          <ul>{others.map((session) => <UnwatchedRow key={session.id} session={session} />)}</ul>
        </section>
      ) : null}
      {weighing ? <WeightsSheet onClose={() => setWeighing(false)} /> : null}
    </Page>
  );
}
