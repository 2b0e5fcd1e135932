import { type ComponentType, lazy, Suspense } from 'react';
import { BrowserRouter, Navigate, Route, Routes } from 'react-router-dom';
import { wording } from '#shared/text/en/app.ts';
import { FloorPage, WallPage } from '../features/floor/index.ts';
import { patient } from '../lib/patient.ts';
import { Skeleton } from '../ui/page.tsx';
import { Home } from './home.tsx';
import { CentreLayout } from './layouts/centre-layout.tsx';
import { NotFound } from './not-found.tsx';

/** A page of a slice, fetched when it is first gone to. */
function page<M, K extends keyof M>(load: () => Promise<M>, name: K) {
  return lazy(async () => ({ default: (await patient(load))[name] as ComponentType }));
}

const accounts = () => import('../features/accounts/index.ts');
const SignInPage = page(accounts, 'SignInPage');
const AccountPage = page(accounts, 'AccountPage');
const calls = () => import('../features/calls/index.ts');
const CallsPage = page(calls, 'CallsPage');
const CallPage = page(calls, 'CallPage');
const runs = () => import('../features/runs/index.ts');
const RunsPage = page(runs, 'RunsPage');
const PatternsPage = page(runs, 'PatternsPage');
const PatternPage = page(runs, 'PatternPage');
const NumbersPage = page(() => import('../features/numbers/index.ts'), 'NumbersPage');
const SettingsPage = page(() => import('../features/centre/index.ts'), 'SettingsPage');
const readiness = () => import('../features/readiness/index.ts');
const ReadinessPage = page(readiness, 'ReadinessPage');
const SessionPage = page(readiness, 'SessionPage');
const leagues = () => import('../features/leagues/index.ts');
const LeaguesPage = page(leagues, 'LeaguesPage');
const LeaguePage = page(leagues, 'LeaguePage');

export function Router() {
  return (
    <BrowserRouter>
      <Suspense fallback={<div className="p-8"><Skeleton label={wording.loading} /></div>}>
        <Routes>
          <Route path="/" element={<Home />} />
          <Route path="/sign-in" element={<SignInPage />} />
          <Route path="/:centre/wall" element={<CentreLayout bare />}>
            <Route index element={<WallPage />} />
          </Route>
          <Route path="/:centre" element={<CentreLayout />}>
            <Route index element={<Navigate to="floor" replace />} />
            <Route path="floor" element={<FloorPage />} />
            <Route path="calls" element={<CallsPage />} />
            <Route path="calls/:call" element={<CallPage />} />
            <Route path="runs" element={<RunsPage />} />
            <Route path="patterns" element={<PatternsPage />} />
            <Route path="patterns/:code" element={<PatternPage />} />
            <Route path="readiness" element={<ReadinessPage />} />
            <Route path="readiness/:session" element={<SessionPage />} />
            <Route path="leagues" element={<LeaguesPage />} />
            <Route path="leagues/:league" element={<LeaguePage />} />
            <Route path="numbers/:date?" element={<NumbersPage />} />
            <Route path="account" element={<AccountPage />} />
            <Route path="settings" element={<SettingsPage />} />
            <Route path="*" element={<NotFound />} />
          </Route>
          <Route path="*" element={<NotFound />} />
        </Routes>
      </Suspense>
    </BrowserRouter>
  );
}
