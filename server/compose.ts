import type { Job } from './platform/schedule/job.ts';
import { mailUnansweredCalls } from '../jobs/calls-unanswered.ts';
import { nightReport } from '../jobs/night-report.ts';
import { readinessWatch } from '../jobs/readiness-watch.ts';
import { sendMail } from '../jobs/send-mail.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import type { SessionNight } from '#shared/domain/numbers/night/input.ts';
import { type Accounts, createAccounts } from './capabilities/accounts/index.ts';
import { type Calls, createCalls } from './capabilities/calls/index.ts';
import { type Centre, createCentre } from './capabilities/centre/index.ts';
import { createFloor, type Floor } from './capabilities/floor/index.ts';
import { createIngest, type IngestSlice, type Rate } from './capabilities/ingest/index.ts';
import { createLeagues, type Leagues, patternNames } from './capabilities/leagues/index.ts';
import { createNotices, type Notices } from './capabilities/notices/index.ts';
import { createNumbers, type Numbers } from './capabilities/numbers/index.ts';
import { createReadiness, type Readiness } from './capabilities/readiness/index.ts';
import { createRuns, type Runs } from './capabilities/runs/index.ts';
import type { Deps } from './deps.ts';
import type { CentreRef, Route } from './platform/http/route.ts';
import type { Postman } from './platform/mail/postman.ts';

export interface Slices {
  accounts: Accounts;
  calls: Calls;
  centre: Centre;
  floor: Floor;
  ingest: IngestSlice;
  leagues: Leagues;
  notices: Notices;
  numbers: Numbers;
  readiness: Readiness;
  runs: Runs;
}

export interface Composition {
  slices: Slices;
  routes: Route[];
  jobs: Job[];
  stop(): Promise<void>;
}

/**
 * The only file that knows every slice: joins their front doors along the declared edges. `postman` null: mail waits.
 * `ingestRate`: what a gateway key may ask for where it isn't the usual, for measuring.
 */
export function compose(deps: Deps, postman: Postman | null, ingestRate?: Rate): Composition {
  const centre = createCentre(deps);
  const notices = createNotices(deps, postman);
  const ingest = createIngest(deps, { centre }, ingestRate);
  // Runs ask who wants a pattern and which lanes wait; leagues and readiness ask what there is to want: each when it needs the other.
  const runs: Runs = createRuns(deps, { usedBy: (house) => leagues.patternUsers(house), wants: (...night) => readiness.dressingWanted(...night) });
  const leagues = createLeagues(deps, { patternsOf: async (house) => patternNames(await runs.readLibrary(house)) });
  const accounts = createAccounts(deps, { leaguesOf: leagues.leagueIds });
  const managers = (house: CentreRef) => accounts.emails(house, ['manager']);
  const calls = createCalls(deps, { centre, notices, managers });
  const readiness: Readiness = createReadiness(deps, { centre, leagues, notices, runs });
  const numbers = createNumbers(deps, {
    sessions: async (house, from, to) => (await leagues.sessionsBetween(house, from, to)).map(sessionNight),
    readyAtWarmUp: async (house, from, to) => {
      const { ready, sessions } = await readiness.readyAtWarmUp(house, from, to);
      return { ready, of: sessions };
    },
    opening: centre.opening, managers,
  }, notices, centre.all);
  const floor = createFloor(deps, {
    callView: calls.callView, runBars: runs.bars, machines: runs.machines, patterns: runs.patterns, sessions: readiness.upcoming,
    gateways: centre.gateways.views, tonight: numbers.tonight,
  });
  leagues.onChanged(readiness.forget);
  const slices = { accounts, calls, centre, floor, ingest, leagues, notices, numbers, readiness, runs };
  return {
    slices,
    routes: [accounts, calls, centre, floor, ingest, leagues, numbers, readiness, runs].flatMap((slice) => slice.routes),
    jobs: [sendMail(notices), readinessWatch(readiness), mailUnansweredCalls(calls), nightReport(numbers)],
    async stop() {
      accounts.stop();
      await centre.stop();
    },
  };
}

const sessionNight = (session: Session): SessionNight => ({
  kind: session.kind, lanes: session.lanes, warmUpAt: session.warmUpAt, startAt: session.startAt, endAt: session.endAt,
});
