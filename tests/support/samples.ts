import type { CallDetail } from '#shared/contracts/calls.ts';
import type { GatewaySettings } from '#shared/contracts/centre.ts';
import type { SessionView } from '#shared/contracts/readiness.ts';
import { USUAL_RULES } from '#shared/domain/house-rules.ts';
import { ISOLATION_STEPS, RELEASE_STEPS } from '#shared/domain/calls/lockout-steps.ts';
import { ask } from './ask.ts';
import { aLeague, aRevision, CAN, type SampleHouse, type Who } from './sample-house.ts';

/** One sensible request: what goes into the path besides the centre, the query and the body. */
export interface Asked {
  params?: Record<string, string | number>;
  query?: Record<string, string>;
  body?: unknown;
  /** Where the asker's own sign-in would end by it. */
  cookie?: string;
}

/** Makes a request that whoever may do it can do, on things of its own. `who`: it is for this asker, where that matters. */
export type Sample = (house: SampleHouse, who: Who) => Asked | Promise<Asked>;

/** An id that nothing has. */
const NOTHING = '0197a000-0000-7000-8000-00000000dead';
const LANES = 60;
/** Lanes 5–12 are the leagues'; calls, people and moved pairs keep out of each other's way. */
const callLane = (n: number): number => 13 + (n % 24);
const laneOf = (n: number): number => 37 + (n % 12);
const freePair = (n: number): number => 49 + 2 * (n % 6);
/** Equipment of one lane alone: each lane and kind is a call of its own. */
const KINDS = ['pinsetter', 'foul-unit', 'scoring', 'console', 'channel', 'lane-surface', 'approach'] as const;

async function call(house: SampleHouse, steps: readonly [who: string, path: string, body?: unknown][] = [], kind?: (typeof KINDS)[number]): Promise<Asked> {
  const n = house.next();
  const { id } = (await house.as('desk', 'POST', '/calls', { lane: callLane(n), equipment: kind ?? KINDS[Math.floor(n / 24) % KINDS.length] })) as CallDetail;
  for (const [who, path, body] of steps) await house.as(who, 'POST', `/calls/${id}${path}`, body);
  return { params: { call: id } };
}
const inLockout: [string, string, unknown?] = ['mechanic', '/lockout'];
const stepped = (codes: readonly string[]): [string, string, unknown][] => codes.map((code) => ['mechanic', '/lockout/step', { step: code, done: true }]);

async function openLane(house: SampleHouse): Promise<number> {
  const lane = await freeLane(house);
  await house.as('desk', 'POST', `/lanes/${lane}/open`, {}).catch(() => undefined);
  return lane;
}

async function freeLane(house: SampleHouse): Promise<number> {
  const lane = laneOf(house.next());
  // Whatever an earlier request left there; refused where there is nothing to undo.
  await house.as('desk', 'POST', `/lanes/${lane}/close`).catch(() => undefined);
  await house.as('manager', 'POST', `/lanes/${lane}/back-in-service`).catch(() => undefined);
  return lane;
}

async function person(house: SampleHouse): Promise<string> {
  const n = house.next();
  const { person: added } = (await house.as('manager', 'POST', '/people', { name: `Sample ${n}`, email: `sample-${n}-${house.centre.slug}@house.test`, role: 'desk' })) as { person: { id: string } };
  return added.id;
}

/** A league of its own evening: two lanes, by turns of weekday and hour. */
function leagueForm(n: number) {
  const fromLane = 13 + 2 * (n % 24);
  return aLeague({ name: `League ${n}`, weekday: 1 + (n % 7), startMinutes: 600 + 60 * (Math.floor(n / 24) % 4), fromLane, toLane: fromLane + 1, teams: 2, games: 1, firstDate: '2027-01-04', lastDate: '2027-02-15' });
}
async function league(house: SampleHouse): Promise<string> {
  const made = (await house.as('desk', 'POST', '/leagues', leagueForm(house.next()))) as { league: { id: string } };
  return made.league.id;
}

const bookingForm = (n: number) => {
  const day = String(1 + (n % 28)).padStart(2, '0');
  const fromLane = 1 + 2 * (n % 30);
  return { kind: 'party', name: `Party ${n}`, date: `2026-${String(7 + (Math.floor(n / 28) % 5)).padStart(2, '0')}-${day}`, startMinutes: 900, minutes: 60, fromLane, toLane: fromLane + 1 };
};
async function booking(house: SampleHouse): Promise<{ id: string; date: string; lanes: number[] }> {
  return (await house.as('desk', 'POST', '/bookings', bookingForm(house.next()))) as { id: string; date: string; lanes: number[] };
}

async function gateway(house: SampleHouse): Promise<GatewaySettings> {
  const { gateway: made } = (await house.as('manager', 'POST', '/settings/gateways', { name: `Gateway ${house.next()}` })) as { gateway: GatewaySettings };
  return made;
}

async function pattern(house: SampleHouse): Promise<string> {
  const code = `sample-${house.next()}`;
  await house.as('mechanic', 'POST', '/patterns', { code, name: code, revision: aRevision(40) });
  return code;
}
const plan = (house: SampleHouse) => {
  const n = house.next();
  return { run: `run-${n}`, machine: 'm1', pattern: 'owls', lanes: [1 + (n % LANES)], startAt: house.clock.now() + 3_600_000 };
};

async function concern(house: SampleHouse): Promise<string> {
  const view = (await house.as('secretary', 'POST', `/sessions/${house.league.session}/concerns`, { text: `Lane looks dry ${house.next()}` })) as SessionView;
  return view.raised.at(-1)?.id ?? NOTHING;
}
async function otherPair(house: SampleHouse): Promise<{ fromPair: number; toPair: number }> {
  const view = (await house.as('desk', 'GET', `/sessions/${house.league.session}`)) as SessionView;
  return { fromPair: view.lanes.at(-2) ?? 7, toPair: freePair(house.next()) };
}
const event = (house: SampleHouse) => ({
  specversion: '1.0', source: 'gateway/sample', id: `sample-${house.next()}`, type: 'lane.counted', time: new Date(house.clock.now()).toISOString(), data: { lane: 3, deliveries: 2 },
});

/** Every contract's sample. A contract without one fails the tests of rights and of bad input. */
export const SAMPLES: Readonly<Record<string, Sample>> = {
  'api.document': () => ({}),

  'session.open': async (house, who) => ({ cookie: await house.signInAgain(who), body: { email: house.who('desk').person?.email, password: house.who('desk').person?.password } }),
  'session.close': async (house, who) => ({ cookie: await house.signInAgain(who) }),
  'me.see': () => ({}),
  'me.sessions': () => ({}),
  'me.endSession': async (house, who) => {
    if (!who.person) return { params: { session: NOTHING } };
    await house.signInAgain(who);
    const { body } = await ask(house.server.url, 'GET', '/api/me/sessions', { headers: who.headers });
    return { params: { session: (body as { sessions: { id: string; current: boolean }[] }).sessions.find((one) => !one.current)?.id ?? NOTHING } };
  },
  'me.changePassword': (_house, who) => ({ body: { present: who.person?.password ?? 'none', next: who.person?.password ?? 'none' } }),
  'people.list': () => ({}),
  'people.add': (house) => ({ body: { name: 'New Hand', email: `new-${house.next()}-${house.centre.slug}@house.test`, role: 'secretary', leagues: [house.league.id] } }),
  'people.change': async (house) => ({ params: { person: await person(house) }, body: { role: 'mechanic', leagues: [] } }),
  'people.remove': async (house) => ({ params: { person: await person(house) } }),
  'displays.list': () => ({}),
  'displays.add': () => ({ body: { name: 'Over lane 16' } }),
  'displays.revoke': async (house) => {
    const made = (await house.as('manager', 'POST', '/displays', { name: 'Old' })) as { display: { id: string } };
    return { params: { display: made.display.id } };
  },
  'displays.open': async (house) => {
    const { path } = (await house.as('manager', 'POST', '/displays', { name: 'New' })) as { path: string };
    return { params: { token: path.slice('/d/'.length) } };
  },

  'centre.settings': () => ({}),
  'centre.saveRules': () => ({ body: { ...USUAL_RULES, deskMin: 8 } }),
  'centre.save': () => ({ body: { name: 'Sample House', zone: 'UTC', cut: 240, opening: Array.from({ length: 7 }, () => ({ from: 600, to: 1440 })) } }),
  'centre.lane': () => ({ params: { lane: 12 }, body: { family: 'string', certifiedUntil: '2027-01-31', stopCoverage: 'heard' } }),
  'centre.addGateway': (house) => ({ body: { name: `Gateway ${house.next()}` } }),
  'centre.addGatewayKey': async (house) => ({ params: { gateway: (await gateway(house)).id } }),
  'centre.revokeGatewayKey': async (house) => {
    const { id, keys } = await gateway(house);
    return { params: { gateway: id, key: keys[0]?.id ?? NOTHING } };
  },
  'ingest.events': (house) => ({ body: event(house) }),
  'ingest.setAside': () => ({}),
  'ingest.applySetAside': () => ({ body: { events: [{ source: 'gateway/sample', id: 'never-came' }] } }),

  'floor.snapshot': () => ({}),
  'floor.open': async (house) => ({ params: { lane: await freeLane(house) }, body: { use: 'open', label: 'Walk-in', bowlers: 4, games: 2, bumpers: false, until: house.clock.now() + 3_600_000 } }),
  'floor.close': async (house) => ({ params: { lane: await openLane(house) } }),
  'floor.move': async (house) => ({ params: { lane: await openLane(house) }, body: { to: await freeLane(house) } }),
  'floor.outOfService': async (house) => {
    const lane = laneOf(house.next());
    await house.as('manager', 'POST', `/lanes/${lane}/back-in-service`).catch(() => undefined);
    return { params: { lane }, body: { reason: 'Ball return is taken apart' } };
  },
  'floor.backInService': async (house) => {
    const lane = laneOf(house.next());
    await house.as('manager', 'POST', `/lanes/${lane}/out-of-service`, { reason: 'Sample' }).catch(() => undefined);
    return { params: { lane } };
  },
  'floor.enterCounts': (house) => ({ params: { lane: laneOf(house.next()) }, body: { games: 3, frames: 30 } }),

  'calls.list': () => ({}),
  'calls.see': (house) => call(house),
  'calls.raise': (house) => ({ body: { lane: callLane(house.next()), equipment: 'scoring', text: 'Screen is dark' } }),
  'calls.acknowledge': (house) => call(house),
  'calls.takeOver': (house, who) => call(house, [[who.name === 'mechanic' ? 'manager' : 'mechanic', '/acknowledge']]),
  'calls.onLane': (house) => call(house),
  'calls.clear': async (house) => ({ ...(await call(house, [], 'pinsetter')), body: { cause: 'distributor.pin-jam', note: 'Reset' } }),
  'calls.park': async (house) => ({ ...(await call(house)), body: { reason: 'Part is on its way', until: house.clock.now() + 3_600_000 } }),
  'calls.unpark': (house) => call(house, [['mechanic', '/park', { reason: 'Later', until: house.clock.now() + 3_600_000 }]]),
  'calls.outOfService': async (house) => ({ ...(await call(house)), body: { reason: 'Gearbox' } }),
  'calls.backInService': async (house) => ({ ...(await call(house, [['mechanic', '/out-of-service', { reason: 'Gearbox' }]])), body: { note: 'Changed' } }),
  'calls.lockoutBegin': (house) => call(house),
  'calls.lockoutStep': async (house) => ({ ...(await call(house, [inLockout])), body: { step: ISOLATION_STEPS[0]?.code, done: true } }),
  'calls.lockoutRelease': (house) => call(house, [inLockout, ...stepped(ISOLATION_STEPS.map((one) => one.code)), ...stepped(RELEASE_STEPS)]),
  'calls.lockoutLeftBehind': async (house) => ({ ...(await call(house, [inLockout])), body: { procedure: 'Owner is away; checked with two people' } }),

  'leagues.list': () => ({}),
  'leagues.see': (house) => ({ params: { league: house.league.id } }),
  'leagues.create': (house) => ({ body: leagueForm(house.next()) }),
  'leagues.change': async (house) => ({ params: { league: await league(house) }, body: leagueForm(house.next()) }),
  'leagues.end': async (house) => ({ params: { league: await league(house) } }),
  'bookings.list': () => ({ query: { date: '2026-05-14' } }),
  'bookings.create': (house) => ({ body: bookingForm(house.next()) }),
  'bookings.move': async (house) => {
    const { id, date } = await booking(house);
    return { params: { session: id }, body: { lanes: [1 + 2 * (house.next() % 30)], date, startMinutes: 1080 } };
  },
  'bookings.cancel': async (house) => ({ params: { session: (await booking(house)).id } }),

  'readiness.list': () => ({ query: { date: '2026-05-14' } }),
  'readiness.see': (house) => ({ params: { session: house.league.session } }),
  'readiness.confirm': (house) => ({ params: { session: house.league.session } }),
  'readiness.concern': (house) => ({ params: { session: house.league.session }, body: { text: 'Lane 5 looks dry', lane: null } }),
  'readiness.settle': async (house) => ({ params: { session: house.league.session, concern: await concern(house) }, body: { note: 'Dressed again' } }),
  'readiness.move': async (house) => ({ params: { session: house.league.session }, body: await otherPair(house) }),
  'readiness.weights': () => ({}),
  'readiness.setWeights': async (house) => ({ body: await house.as('manager', 'GET', '/readiness-checks') }),

  'runs.patterns': () => ({}),
  'runs.pattern': () => ({ params: { code: 'owls' } }),
  'runs.addPattern': (house) => ({ body: { code: `new-${house.next()}`, name: 'New', note: 'First', revision: aRevision(45) } }),
  'runs.revise': async (house) => ({ params: { code: await pattern(house) }, body: { note: 'More', revision: aRevision(50) } }),
  'runs.machines': () => ({}),
  'runs.addMachine': (house) => ({ body: { code: `machine-${house.next()}`, name: 'Second', capabilities: CAN } }),
  'runs.list': () => ({ query: { date: '2026-05-14' } }),
  'runs.tonight': () => ({}),
  'runs.plan': (house) => ({ body: plan(house) }),
  'runs.record': (house) => ({
    body: { run: `made-${house.next()}`, machine: 'm1', pattern: 'owls', startedAt: house.clock.now() - 600_000, finishedAt: house.clock.now() - 300_000, lanes: [{ lane: 3, outcome: 'dressed' }, { lane: 4, outcome: 'skipped', reason: 'In play' }] },
  }),
  'runs.cancel': async (house) => {
    const body = plan(house);
    await house.as('mechanic', 'POST', '/runs/planned', body);
    return { params: { machine: body.machine, run: body.run }, body: { reason: 'Not needed' } };
  },

  'numbers.night': () => ({ params: { date: '2026-05-14' } }),
  'numbers.lanes': () => ({}),
};
