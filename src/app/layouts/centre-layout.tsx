import { useQuery, useQueryClient } from '@tanstack/react-query';
import { lazy, Suspense, useEffect, useState } from 'react';
import { Navigate, Outlet, useLocation, useParams } from 'react-router-dom';
import { floorContracts } from '#shared/contracts/floor.ts';
import type { Identity } from '#shared/contracts/accounts.ts';
import { appText, wording } from '#shared/text/en/app.ts';
import { BoardContext, BoardStore } from '../../features/floor/index.ts';
import { call, isAway, Problem } from '../../lib/api.ts';
import { CentreContext, type CentreHere, useCentre } from '../../lib/centre.ts';
import { heardServerTime } from '../../lib/clock.ts';
import { heardWord, linkStarted } from '../../lib/live.ts';
import { patient } from '../../lib/patient.ts';
import { Skeleton } from '../../ui/page.tsx';
import { ToastRegion } from '../../ui/toast.tsx';
import { ErrorBoundary } from '../error-boundary.tsx';
import { NotFound } from '../not-found.tsx';
import type { PageName } from '../navigation.ts';
import { connect } from '../realtime.ts';
import { meQuery } from '../session.ts';
import { AwayBanner } from './away-banner.tsx';
import { Header } from './header.tsx';
import { TabBar } from './tab-bar.tsx';

/** Sound and notification of calls: fetched once the first screen stands, so that it doesn't wait for them. */
const ALERTS_AFTER_MS = 1500;
const CallAlerts = lazy(async () => {
  await new Promise((done) => setTimeout(done, ALERTS_AFTER_MS));
  return { default: (await patient(() => import('../../features/calls/index.ts'))).CallAlerts };
});

/** Who looks, and at which of their centres; sends to the sign-in page, or says that nothing is there. */
function useCentreHere(): { here: CentreHere; me: Identity } | 'loading' | 'sign-in' | 'not-found' {
  const { centre } = useParams();
  const me = useQuery(meQuery);
  if (me.data === undefined) return 'loading';
  if (me.data === null) return 'sign-in';
  const place = me.data.centres.find((c) => c.slug === centre);
  if (!place) return 'not-found';
  const person = me.data.kind === 'user' ? { id: me.data.id, name: me.data.name } : null;
  return { here: { slug: place.slug, name: place.name, zone: place.zone, cut: place.cut, role: place.role, me: person }, me: me.data };
}

/** Everything of one centre: its live floor, and the frame around its pages (none around the wall). */
export function CentreLayout({ bare = false }: { bare?: boolean }) {
  const location = useLocation();
  const found = useCentreHere();
  if (found === 'loading') return <Loading />;
  if (found === 'sign-in') return <Navigate to={`/sign-in?next=${encodeURIComponent(location.pathname + location.search)}`} replace />;
  if (found === 'not-found') return <NotFound />;
  // A screen on the wall has nothing to press: every address of its centre is the wall.
  if (found.here.role === 'display' && !bare) return <Navigate to={`/${found.here.slug}/wall`} replace />;
  return (
    <CentreContext value={found.here}>
      <LiveBoard key={found.here.slug} slug={found.here.slug}>
        {bare ? <Outlet /> : <Framed me={found.me} />}
      </LiveBoard>
    </CentreContext>
  );
}

function Loading() {
  const me = useQuery(meQuery);
  return (
    <div className="mx-auto w-full max-w-3xl p-8">
      {me.failureCount > 2 ? <p role="status" className="mb-6">{appText.serverAway}</p> : null}
      <Skeleton lines={6} label={wording.loading} />
    </div>
  );
}

const isPage = (page: string): page is PageName => page in wording.nav;

function Framed({ me }: { me: Identity }) {
  const { pathname } = useLocation();
  const { name } = useCentre();
  const onFloor = /\/floor\/?$/.test(pathname);
  const page = pathname.split('/')[2] ?? '';
  return (
    <div className={onFloor ? 'flex min-h-dvh flex-col min-[900px]:h-dvh min-[900px]:min-h-[40rem]' : 'flex min-h-dvh flex-col'}>
      <title>{appText.documentTitle(isPage(page) ? wording.nav[page] : page === 'settings' ? wording.settings : page === 'account' ? wording.account : null, name)}</title>
      <a href="#page" className="sr-only z-50 bg-ink px-4 py-2 text-paper focus:not-sr-only focus:absolute">{wording.skip}</a>
      <Header me={me} />
      <AwayBanner />
      <main id="page" tabIndex={-1} className="flex min-h-0 grow flex-col outline-none max-[900px]:pb-20">
        <ErrorBoundary place={pathname}>
          <Suspense fallback={<div className="p-6"><Skeleton lines={6} label={wording.loading} /></div>}>
            <Outlet />
          </Suspense>
        </ErrorBoundary>
      </main>
      <TabBar />
      <ToastRegion />
      <ErrorBoundary place="alerts">
        <Suspense fallback={null}>
          <CallAlerts />
        </Suspense>
      </ErrorBoundary>
    </div>
  );
}

function LiveBoard({ slug, children }: { slug: string; children: React.ReactNode }) {
  const queries = useQueryClient();
  const [board] = useState(() => makeBoard(slug, () => queries.setQueryData(meQuery.queryKey, null)));
  useEffect(() => {
    linkStarted();
    const end = connect(slug, board, queries);
    return end;
  }, [slug, board, queries]);
  return <BoardContext value={board}>{children}</BoardContext>;
}

function makeBoard(centre: string, onSignedOut: () => void): BoardStore {
  return new BoardStore({
    fetchSnapshot: () => call(floorContracts.snapshot, { params: { centre } }),
    after: (ms, run) => {
      const timer = setTimeout(run, ms);
      return () => clearTimeout(timer);
    },
    chance: Math.random,
    onHeard: (at) => {
      heardServerTime(at);
      heardWord(at, 'ok');
    },
    isRefusal: (error) => !isAway(error) && error instanceof Problem && error.status < 500,
    onRefused: (error) => (error instanceof Problem && error.status === 401 ? onSignedOut() : undefined),
  });
}
