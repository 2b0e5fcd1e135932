import type { LeagueForm } from '#shared/contracts/leagues.ts';
import type { MachineCapability } from '#shared/domain/runs/capability.ts';
import type { RevisionBody } from '#shared/contracts/runs.ts';
import type { Actor } from '#shared/policy/policy.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { openDisplay, signedIn, signIn, type TestPerson } from './actors.ts';
import { ask, type Answer } from './ask.ts';
import { aCentre } from './builders.ts';
import type { FixedClock } from './clock.ts';
import type { TestServer } from './server.ts';

/** Somebody or something that asks: how it says who it is, and who the policy takes it for. */
export interface Who {
  name: string;
  headers: Record<string, string>;
  actor: Actor;
  /** Those who sign in. */
  person: TestPerson | null;
}

const NOBODY: Who = { name: 'nobody', headers: {}, actor: { kind: 'nobody' }, person: null };

export const CAN: MachineCapability = {
  oils: true, cleans: true, deckTreatment: false, products: ['A'], volume: { kind: 'per-load', minUl: 20, maxUl: 60, stepUl: 5 }, headBoards: { first: 2, last: 38 },
  maxLengthFt: 60, tailOffFt: 0, maxPasses: 40, maxLoads: 6, buffer: { minRpm: 100, maxRpm: 700 }, travel: { min: 100, max: 300 },
  cleaner: { kind: 'premixed', waterParts: 4 }, moves: 'walks', battery: true, patterns: 'network',
};

export const aRevision = (ul: number): RevisionBody => ({
  lengthFt: 40, passes: [{ direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 4, ul, product: 'A', fromFt: 0, toFt: 30 }],
});

/** Thursdays at 20:15 on lanes 5–8. The clock of these tests stands on Thursday 14 May 2026, 17:00. */
export const aLeague = (change: Partial<LeagueForm>): LeagueForm => ({
  name: 'Night Owls', weekday: 4, startMinutes: 20 * 60 + 15, warmUpMinutes: 10, fromLane: 5, toLane: 8, teams: 4, bowlersATeam: 4, games: 3, absent: 0, crossesLanes: true,
  firstDate: '2026-05-14', lastDate: '2026-06-11', skipDates: [], pattern: null, revision: null, fresh: false, sanctioned: false, ...change,
});
export const SAMPLE_TIME = '2026-05-14T17:00:00Z';

export interface SampleHouse {
  server: TestServer;
  clock: FixedClock;
  centre: CentreRef;
  /** The secretary's league, with today's session; and one that is another's. */
  league: { id: string; session: string };
  /** Everybody who can ask, here and in another centre. */
  everybody: readonly Who[];
  who(name: string): Who;
  /** As somebody, below this centre's path; throws where it doesn't go well. */
  as(name: string, method: string, path: string, body?: unknown): Promise<Answer['body']>;
  /** Counts up: for names, lanes and codes that nobody uses yet. */
  next(): number;
  /** A second sign-in of somebody. */
  signInAgain(who: Who): Promise<string>;
}

/** A house in which every route can be asked sensibly, on the whole program. */
export async function sampleHouse(server: TestServer, clock: FixedClock): Promise<SampleHouse> {
  const { centre: centres, runs, leagues } = server.slices;
  const [centre, elsewhere] = [await aCentre(centres, { lanes: 60 }), await aCentre(centres, { lanes: 12 })];
  for (const house of [centre, elsewhere]) {
    await runs.addPattern(house, { code: 'owls', name: 'Night Owls', revision: aRevision(40), by: 'test' });
    await runs.addMachine(house, { code: 'm1', name: 'Machine 1', capabilities: CAN });
  }
  const own = await leagues.createLeague(centre, aLeague({}));
  const others = await leagues.createLeague(centre, aLeague({ name: 'Early Birds', fromLane: 9, toLane: 12 }));
  const there = await leagues.createLeague(elsewhere, aLeague({}));
  const [session] = (await leagues.sessionsOfDate(centre, '2026-05-14')).filter((one) => one.leagueId === own);
  const everybody = await gather(server, { centre, elsewhere, own, others, there });
  let counted = 0;
  const who = (name: string): Who => {
    const found = everybody.find((one) => one.name === name);
    if (!found) throw new Error(`There is no ${name}`);
    return found;
  };
  return {
    server, clock, centre, everybody, who,
    league: { id: own, session: session?.id ?? '' },
    next: () => (counted += 1),
    signInAgain: async ({ person }) => (person ? signIn(server.url, person) : ''),
    async as(name, method, path, body) {
      const answer = await ask(server.url, method, `/api/centres/${centre.slug}${path}`, { headers: who(name).headers, body });
      if (answer.status >= 300) throw new Error(`${method} ${path} as ${name}: ${answer.status} ${JSON.stringify(answer.body)}`);
      return answer.body;
    },
  };
}

interface Places {
  centre: CentreRef;
  elsewhere: CentreRef;
  own: string;
  others: string;
  there: string;
}

async function gather(server: TestServer, { centre, elsewhere, own, others, there }: Places): Promise<Who[]> {
  const { accounts, centre: centres } = server.slices;
  const known = async (name: string, cookie: string, person: TestPerson | null): Promise<Who> => ({ name, headers: { cookie }, actor: await accounts.authenticate(cookie), person });
  const somebody = async (name: string, place: Parameters<typeof signedIn>[2]): Promise<Who> => {
    const { cookie, ...person } = await signedIn(server.url, accounts, place);
    return known(name, cookie, person);
  };
  const people: Who[] = [];
  for (const role of ['manager', 'desk', 'mechanic'] as const) people.push(await somebody(role, { centre, role }));
  people.push(await somebody('secretary', { centre, role: 'secretary', leagues: [own] }));
  people.push(await somebody('secretary of another league', { centre, role: 'secretary', leagues: [others] }));
  for (const role of ['manager', 'desk', 'mechanic'] as const) people.push(await somebody(`${role} elsewhere`, { centre: elsewhere, role }));
  people.push(await somebody('secretary elsewhere', { centre: elsewhere, role: 'secretary', leagues: [there] }));
  const displays = [await known('display', (await openDisplay(server.url, accounts, centre)).cookie, null), await known('display elsewhere', (await openDisplay(server.url, accounts, elsewhere)).cookie, null)];
  const gateway = async (name: string, house: CentreRef): Promise<Who> => {
    const { id, key } = await centres.addGateway(house, 'Back end');
    return { name, headers: { authorization: `Bearer ${key}` }, actor: { kind: 'gateway', gateway: id, centre: house.slug, name: 'Back end' }, person: null };
  };
  return [NOBODY, ...people, ...displays, await gateway('gateway', centre)];
}
