import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LeagueView } from '#shared/contracts/leagues.ts';
import { wallTime } from '#shared/text/en/formats.ts';
import { leagueLine, leaguesText as text, leaguesTitle, seasonLine, secretariesLine } from '#shared/text/en/leagues-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { useTimes } from '../../lib/formats.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { EmptyState, Page, Skeleton } from '../../ui/page.tsx';
import { leaguesQuery } from './queries.ts';

/** Leagues of the house by weekday and start; a secretary sees the own ones. */
export function LeaguesPage() {
  const { slug, may } = useCentre();
  const { data, error, refetch } = useQuery(leaguesQuery(slug));
  if (!data) {
    return (
      <Page title={error ? text.failed : text.loading} lead={sentenceOf(error)}>
        {error ? <Button onClick={() => void refetch()}>{text.retry}</Button> : <Skeleton lines={6} label={text.loading} />}
      </Page>
    );
  }
  const open = data.leagues.filter((league) => !league.ended);
  return (
    <Page title={leaguesTitle(open.length)} actions={may('league.edit') ? <Link className={buttonLook({ kind: 'primary' })} to={`/${slug}/leagues/new`}>{text.add}</Link> : null}>
      {data.leagues.length === 0 ? <EmptyState title={text.none}>{text.noneMore}</EmptyState> : null}
      <ul className="max-w-4xl">
        {[...open, ...data.leagues.filter((league) => league.ended)].map((league) => <LeagueRow key={league.id} league={league} />)}
      </ul>
    </Page>
  );
}

function LeagueRow({ league }: { league: LeagueView }) {
  const { slug } = useCentre();
  const { day } = useTimes();
  return (
    <li className="border-t border-rule">
      <Link to={`/${slug}/leagues/${league.id}`} className="block px-1 py-3.5 hover:bg-card">
        <span className="flex flex-wrap items-baseline justify-between gap-x-4">
          <span className="type-name text-lg">{league.name}</span>
          <span className="text-sm text-dim">{league.ended ? text.ended : seasonLine(league.nights, league.nextAt === null ? null : day(league.nextAt))}</span>
        </span>
        <span className="block text-dim">{leagueLine(league, wallTime(league.startMinutes))}</span>
        <span className="block text-sm text-dim">{secretariesLine(league.secretaries)}</span>
      </Link>
    </li>
  );
}
