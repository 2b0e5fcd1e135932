import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { BookingView, LeagueForm, LeagueView } from '#shared/contracts/leagues.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { appText } from '#shared/text/en/app.ts';
import { wallTime } from '#shared/text/en/formats.ts';
import { leagueLine, leaguesText as text, patternLine, secretariesLine } from '#shared/text/en/leagues-page.ts';
import { Problem } from '../../lib/api.ts';
import { useCentre } from '../../lib/centre.ts';
import { serverNow } from '../../lib/clock.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Refused } from '../../ui/banner.tsx';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Page, Skeleton } from '../../ui/page.tsx';
import { LeagueFields, type PatternChoice, useLeagueForm } from './components/league-form.tsx';
import { SeasonPreview } from './components/season-preview.tsx';
import { SessionList } from './components/session-list.tsx';
import { draftOf, newLeague } from './league-draft.ts';
import { useEndLeague } from './mutations.ts';
import { leagueQuery, leaguesQuery } from './queries.ts';

/** One league with its season; `new` makes one. Who may not change it sees what it is. */
export function LeaguePage() {
  const { league: id = '' } = useParams();
  const { slug, zone, cut, may } = useCentre();
  const fresh = id === 'new';
  const house = useQuery(leaguesQuery(slug));
  const found = useQuery({ ...leagueQuery(slug, id), enabled: !fresh });
  const error = house.error ?? found.error;
  if (!house.data || (!fresh && !found.data)) {
    const gone = error instanceof Problem && [404, 422].includes(error.status);
    return (
      <Page title={gone ? appText.notFound : error ? text.failed : text.loading} lead={gone ? appText.notFoundMore : sentenceOf(error)}>
        {error ? <Link className={buttonLook()} to={`/${slug}/leagues`}>{text.back}</Link> : <Skeleton lines={8} label={text.loading} />}
      </Page>
    );
  }
  const { patterns, lanes } = house.data;
  const detail = found.data;
  if (!detail) return <Editor key="new" id={null} title={text.newTitle} start={newLeague(businessDayAt(serverNow(), zone, cut).date, lanes)} patterns={patterns} sessions={[]} />;
  if (!may('league.edit') || detail.league.ended) return <Shown league={detail.league} sessions={detail.sessions} />;
  return <Editor key={detail.league.id} id={detail.league.id} title={detail.league.name} start={draftOf(detail.league)} patterns={patterns} sessions={detail.sessions} />;
}

interface EditorProps {
  id: string | null;
  title: string;
  start: LeagueForm;
  patterns: readonly PatternChoice[];
  sessions: readonly BookingView[];
}

function Editor({ id, title, start, patterns, sessions }: EditorProps) {
  const { slug, zone } = useCentre();
  const [ending, setEnding] = useState(false);
  const form = useLeagueForm(start);
  const rule = form.watch();
  return (
    <Page
      title={title}
      actions={<Link className={buttonLook({ kind: 'quiet' })} to={`/${slug}/leagues`}>{text.back}</Link>}
      aside={<SeasonPreview rule={{ ...rule, zone }} onSkip={(dates) => { form.setValue('skipDates', dates, { shouldDirty: true }); form.clearErrors(['skipDates', 'startMinutes']); }} />}
    >
      <LeagueFields id={id} form={form} patterns={patterns} />
      {sessions.length > 0 ? <SessionList sessions={sessions} /> : null}
      {id === null ? null : <Button kind="secondary" className="mt-10" onClick={() => setEnding(true)}>{text.end}</Button>}
      {ending && id !== null ? <EndDialog id={id} onClose={() => setEnding(false)} /> : null}
    </Page>
  );
}

function EndDialog({ id, onClose }: { id: string; onClose: () => void }) {
  const end = useEndLeague(id);
  return (
    <Dialog open onClose={onClose} title={text.endTitle} lead={text.endLead} actions={<Button kind="danger" size="hand" busy={end.isPending} onClick={() => end.mutate(undefined, { onSuccess: onClose })}>{text.end}</Button>}>
      <Refused>{sentenceOf(end.error)}</Refused>
    </Dialog>
  );
}

function Shown({ league, sessions }: { league: LeagueView; sessions: readonly BookingView[] }) {
  const { slug } = useCentre();
  return (
    <Page title={league.name} lead={leagueLine(league, wallTime(league.startMinutes))} actions={<Link className={buttonLook({ kind: 'quiet' })} to={`/${slug}/leagues`}>{text.back}</Link>}>
      <p>{patternLine(league.pattern, league.revision, league.fresh)}</p>
      <p className="text-dim">{league.ended ? text.ended : secretariesLine(league.secretaries)}</p>
      <SessionList sessions={sessions} />
    </Page>
  );
}
