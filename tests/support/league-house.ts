import { createHash } from 'node:crypto';
import type { LeagueForm } from '#shared/contracts/leagues.ts';
import type { SessionView } from '#shared/contracts/readiness.ts';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import type { MachineCapability } from '#shared/domain/runs/capability.ts';
import type { PatternRevision } from '#shared/domain/runs/pattern.ts';
import { createCentre } from '#server/capabilities/centre/index.ts';
import { createLeagues, patternNames } from '#server/capabilities/leagues/index.ts';
import { createNotices } from '#server/capabilities/notices/index.ts';
import { createReadiness, type Readiness } from '#server/capabilities/readiness/index.ts';
import { createRuns, type Runs } from '#server/capabilities/runs/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { createLedger } from '#server/platform/journal/create-ledger.ts';
import { createLog } from '#server/platform/log.ts';
import { signedIn } from './actors.ts';
import { type Answer, ask } from './ask.ts';
import type { FixedClock } from './clock.ts';
import type { TestDatabase } from './db.ts';
import { startWeb, testConfig } from './web.ts';

const log = createLog('silent');
let told = 0;
/** µL a board of each revision: 2L–2R is 37 boards. */
const revision = (lengthFt: number, ul: number): PatternRevision => ({
  lengthFt, passes: [{ direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 4, ul, product: 'A', fromFt: 0, toFt: 30 }],
});

const CAN: MachineCapability = {
  oils: true, cleans: true, deckTreatment: false, products: ['A'], volume: { kind: 'per-load', minUl: 20, maxUl: 60, stepUl: 5 }, headBoards: { first: 2, last: 38 }, maxLengthFt: 60,
  tailOffFt: 0, maxPasses: 40, maxLoads: 6, buffer: { minRpm: 100, maxRpm: 700 }, travel: { min: 100, max: 300 }, cleaner: { kind: 'premixed', waterParts: 4 }, moves: 'walks',
  battery: true, patterns: 'network',
};

/** A league on Thursdays at 20:15, lanes 5–8; what a test cares about it says. */
export const aLeague = (change: Partial<LeagueForm> = {}): LeagueForm => ({
  name: 'Night Owls', weekday: 4, startMinutes: 20 * 60 + 15, warmUpMinutes: 10, fromLane: 5, toLane: 8, teams: 4, bowlersATeam: 4, games: 3, absent: 0, crossesLanes: true,
  firstDate: '2026-05-14', lastDate: '2026-06-11', skipDates: [], pattern: 'owls', revision: 3, fresh: false, sanctioned: false, ...change,
});

/** Leagues and readiness over HTTP upon a real database, on a free port. */
export async function leagueHouse({ db }: TestDatabase, clock: FixedClock) {
  const config = { ...testConfig, publicUrl: 'https://lanes.example' };
  const ledger = createLedger({ db, clock });
  const centres = createCentre({ db, ledger, log, clock });
  const notices = createNotices({ db, clock, log }, null);
  const runs: Runs = createRuns({ db, ledger }, { usedBy: (centre) => leagues.patternUsers(centre), wants: (...night) => readiness.dressingWanted(...night) });
  const leagues = createLeagues({ db, ledger }, { patternsOf: async (centre) => patternNames(await runs.readLibrary(centre)) });
  const readiness: Readiness = createReadiness({ db, ledger, clock, config }, { centre: centres, leagues, notices, runs });
  leagues.onChanged(readiness.forget);
  const web = await startWeb(db, { clock, routes: [...leagues.routes, ...readiness.routes, ...runs.routes], leaguesOf: leagues.leagueIds });

  async function house(given: { zone?: string; lanes?: number; certifiedUntil?: string } = {}) {
    told += 1;
    const centre: CentreRef = await centres.add({ slug: `owls-${process.pid}-${told}`, name: 'Tarn Ferry Bowl', zone: 'UTC', lanes: 12, ...given });
    await runs.addPattern(centre, { code: 'owls', name: 'Night Owls', revision: revision(40, 40), by: 'test' });
    for (const ul of [45, 50]) await runs.revisePattern(centre, { code: 'owls', revision: revision(40, ul), by: 'test' });
    await runs.addPattern(centre, { code: 'house', name: 'House', revision: revision(42, 40), by: 'test' });
    await runs.addMachine(centre, { code: 'm1', name: 'Machine 1', capabilities: CAN });
    const [manager, desk, mechanic] = await Promise.all((['manager', 'desk', 'mechanic'] as const).map((role) => signedIn(web.url, web.accounts, { centre, role })));
    if (!manager || !desk || !mechanic) throw new Error('nobody came');
    const at = `/api/centres/${centre.slug}`;
    const go = (who: { cookie: string }, method: string, path: string, body?: unknown): Promise<Answer> => ask(web.url, method, at + path, { cookie: who.cookie, body });
    const device = <T extends keyof DeviceData>(type: T, data: DeviceData[T], time = clock.now()) => {
      told += 1;
      const raw = { source: 'gateway/test', id: `event-${told}`, type, data };
      return ledger.submit(centre, [{ source: raw.source, id: raw.id, type, time, raw, hash: createHash('sha256').update(JSON.stringify(raw)).digest(), gateway: { id: 'g1', name: 'Back end' }, data, reason: null }], clock.now());
    };
    /** Dresses lanes one after the other, two minutes each, the last done `ago` ms before now. */
    const dress = async (lanes: number[], { ago = 0, pattern = 'owls', revision = 3, run = `r${told}` } = {}): Promise<void> => {
      const end = clock.now() - ago;
      await device('run.started', { machine: 'm1', run, pattern, revision, lanes }, end - lanes.length * 120_000);
      for (const [i, lane] of lanes.entries()) {
        const finishedAt = end - (lanes.length - 1 - i) * 120_000;
        await device('run.lane.dressed', { machine: 'm1', run, lane, startedAt: finishedAt - 120_000, finishedAt }, finishedAt);
      }
      await device('run.finished', { machine: 'm1', run }, end);
    };
    const secretary = (ids: string[]) => signedIn(web.url, web.accounts, { centre, role: 'secretary', leagues: ids });
    /** A league made by the desk; its id and the sessions of its season. */
    const league = async (change: Partial<LeagueForm> = {}): Promise<{ id: string; sessions: { id: string; date: string; lanes: number[]; status: string; startAt: number }[] }> => {
      const made = good(await go(desk, 'POST', '/leagues', aLeague(change)));
      const detail = made.body as { league: { id: string }; sessions: { id: string; date: string; lanes: number[]; status: string; startAt: number }[] };
      return { id: detail.league.id, sessions: detail.sessions };
    };
    const mails = async (): Promise<{ recipient: string; mail_key: string; message_id: string; subject: string; text_body: string }[]> =>
      db('mail_outbox').where('centre_id', centre.id).orderBy(['mail_key', 'recipient']);
    const view = async (who: { cookie: string }, session: string): Promise<SessionView> => good(await go(who, 'GET', `/sessions/${session}`)).body as SessionView;
    return { centre, manager, desk, mechanic, go, device, dress, secretary, league, mails, view, watch: () => readiness.watch(centre, clock.now()) };
  }
  const close = async (): Promise<void> => {
    await web.close();
    await centres.stop();
  };
  return { house, close, leagues, readiness, ledger, db };
}
export type LeagueHouse = Awaited<ReturnType<typeof leagueHouse>>;

/** An answer that must have gone well. */
export function good(answer: Answer): Answer {
  if (answer.status >= 300) throw new Error(`${answer.status} ${JSON.stringify(answer.body)}`);
  return answer;
}

/** Status, code and the field beside which it stands. */
export function refused({ status, body }: Answer): { status: number; code: string; at: string | undefined; params: Record<string, unknown> } {
  const problem = body as { code: string; params: Record<string, unknown>; errors: { pointer: string }[] };
  return { status, code: problem.code, at: problem.errors[0]?.pointer, params: problem.params };
}
