import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { io } from 'socket.io-client';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Contract } from '#shared/contracts/contract.ts';
import { allContracts } from '#shared/contracts/index.ts';
import { addressOf } from '../../src/lib/api.ts';
import { decide, POLICY, type Actor, type Verdict } from '#shared/policy/policy.ts';
import { ROOMS, roomName, type Room } from '#shared/realtime/events.ts';
import { ask, type Answer } from '#tests/support/ask.ts';
import { complaints } from '#tests/support/complaints.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';
import { SAMPLE_TIME, sampleHouse, type SampleHouse, type Who } from '#tests/support/sample-house.ts';
import { SAMPLES } from '#tests/support/samples.ts';
import { startServer, type TestServer } from '#tests/support/server.ts';

const TABLE = fileURLToPath(new URL('./rights.table.txt', import.meta.url));
const WHO = [
  'nobody', 'manager', 'desk', 'mechanic', 'secretary', 'secretary of another league', 'manager elsewhere', 'desk elsewhere', 'mechanic elsewhere', 'secretary elsewhere',
  'display', 'display elsewhere', 'gateway',
] as const;

let database: TestDatabase;
let server: TestServer;
let house: SampleHouse;
const complained = complaints();
/** What was answered, by contract or room and by who asked. */
const heard = new Map<string, Map<string, Verdict>>();

beforeAll(async () => {
  database = await ownDatabase();
  const clock = fixedClock(SAMPLE_TIME);
  server = await startServer({ db: database.db, clock, log: complained.log });
  house = await sampleHouse(server, clock);
});
afterAll(async () => {
  await server.close();
  await database.close();
});

const isGatewaysDoor = (contract: Contract): boolean => POLICY[contract.permission].to === 'gateway';

/** Each door looks at one kind of proof: a key at the gateways' own, a cookie everywhere else. */
function seenAs(contract: Contract, who: Who): Actor {
  return (who.actor.kind === 'gateway') === isGatewaysDoor(contract) ? who.actor : { kind: 'nobody' };
}

/** Which league a request is about, where its sample names one: the secretary's own. */
const leagueOf = (contract: Contract): string | undefined => (/:(league|session)\b/.test(contract.path) && contract.path.startsWith('/api/centres/') ? house.league.id : undefined);

const expected = (contract: Contract, who: Who): Verdict =>
  decide(contract.permission, seenAs(contract, who), { centre: contract.path.includes(':centre') ? house.centre.slug : undefined, league: leagueOf(contract) });

/** 404 is what somebody hears who may not know: with a sample that exists it means nothing else. */
function verdictOf(answer: Answer): Verdict {
  const code = (answer.body as { code?: string } | null)?.code;
  if (answer.status === 401 && code !== 'session.wrong') return 'unauthenticated';
  if (answer.status === 403 && code === 'forbidden') return 'forbidden';
  return answer.status === 404 ? 'hidden' : 'ok';
}

async function request(contract: Contract, who: Who): Promise<Answer> {
  const asked = await (SAMPLES[contract.id] as NonNullable<(typeof SAMPLES)[string]>)(house, who);
  const path = addressOf(contract.path, { centre: house.centre.slug, ...asked.params }, asked.query);
  const headers = { ...who.headers, ...(asked.cookie ? { cookie: asked.cookie } : {}), ...(isGatewaysDoor(contract) ? { 'content-type': 'application/cloudevents+json' } : {}) };
  return ask(server.url, contract.method, path, { headers, body: asked.body });
}

function note(row: string, who: string, verdict: Verdict): void {
  heard.set(row, (heard.get(row) ?? new Map<string, Verdict>()).set(who, verdict));
}

it('has a sample for every contract, and no other', () => {
  expect(Object.keys(SAMPLES).sort()).toEqual(allContracts.map(({ id }) => id).sort());
});

it('asks as everybody there is', () => {
  expect(house.everybody.map(({ name }) => name)).toEqual(WHO);
  const asked = new Set(house.everybody.flatMap(({ actor }) => (actor.kind === 'user' ? actor.memberships.map(({ role }) => role) : [actor.kind])));
  expect([...asked].sort()).toEqual(['desk', 'display', 'gateway', 'manager', 'mechanic', 'nobody', 'secretary']);
});

describe.each(allContracts.map((contract) => [contract.id, contract] as const))('%s', (id, contract) => {
  it('gives each the verdict of the policy table, and serves whoever may', async () => {
    const served: string[] = [];
    const refused: unknown[] = [];
    for (const who of house.everybody) {
      const answer = await request(contract, who);
      const verdict = verdictOf(answer);
      note(id, who.name, verdict);
      expect([who.name, verdict, JSON.stringify(answer.body)?.slice(0, 200)]).toEqual([who.name, expected(contract, who), expect.anything()]);
      if (answer.status === contract.status) served.push(who.name);
      else if (verdict === 'ok') refused.push(answer.body);
    }
    // The state of things may refuse one of them (the mechanic who has the call is another), with a code of the contract.
    for (const body of refused) expect([...contract.refusals, 'input.invalid'], JSON.stringify(body)).toContain((body as { code: string }).code);
    expect(served.length, `somebody must be served, or the sample proves nothing: ${JSON.stringify(refused)}`).toBeGreaterThan(0);
  });
});

/** Connects and asks for the centre's rooms, as the client does. */
async function roomsOf(who: Who): Promise<string[] | 'unauthenticated'> {
  const socket = io(server.url, { transports: ['websocket'], reconnection: false, extraHeaders: who.headers });
  try {
    return await new Promise((done, fail) => {
      socket.on('connect_error', (error) => (error.message === 'session.required' ? done('unauthenticated') : fail(error)));
      socket.on('connect', () => socket.emit('watch', { centre: house.centre.slug }, (reply: { rooms: string[] }) => done(reply.rooms)));
    });
  } finally {
    socket.disconnect();
  }
}

describe.each(WHO)('rooms for %s', (name) => {
  it('are those of the policy table', async () => {
    const who = house.who(name);
    const actor: Actor = who.actor.kind === 'gateway' ? { kind: 'nobody' } : who.actor;
    const rooms = await roomsOf(who);
    for (const room of Object.keys(ROOMS) as Room[]) {
      const verdict = decide(ROOMS[room].permission, actor, { centre: house.centre.slug });
      note(`room ${room}`, name, verdict);
      const ownOnly = actor.kind === 'user' && actor.memberships.some((m) => m.role === 'secretary' && m.centre === house.centre.slug);
      const names = room === 'league' && ownOnly && actor.kind === 'user' ? actor.memberships.flatMap((m) => m.leagues.map((league) => roomName(room, house.centre.slug, league))) : [roomName(room, house.centre.slug)];
      if (actor.kind === 'nobody') expect(rooms).toBe('unauthenticated');
      else for (const one of names) expect((rooms as string[]).includes(one), `${one} for ${name}`).toBe(verdict === 'ok');
    }
    if (rooms !== 'unauthenticated') for (const room of rooms) expect(room).toContain(`:${house.centre.slug}`);
  });
});

it('breaks nothing on the way', () => expect(complained.said).toEqual([]));

it('ends the sockets of a sign-in that is revoked', async () => {
  const who = house.who('desk');
  const cookie = await house.signInAgain(who);
  const socket = io(server.url, { transports: ['websocket'], reconnection: false, extraHeaders: { cookie } });
  await new Promise((done) => socket.on('connect', () => done(undefined)));
  const cut = new Promise<string>((done) => socket.on('disconnect', (reason) => done(reason)));
  await ask(server.url, 'DELETE', '/api/session', { cookie });
  expect(await cut).toBe('io server disconnect');
});

it('mounts no route that isn’t a contract', async () => {
  const known = new Set(allContracts.map(({ method, path }) => `${method} ${path}`));
  const { mountedWays } = await import('#tests/support/mounted-ways.ts');
  const ways = mountedWays(server.deps);
  expect(ways.length).toBeGreaterThanOrEqual(known.size);
  expect(ways.filter((way) => !known.has(way))).toEqual([]);
  expect([...known].filter((way) => !ways.includes(way))).toEqual([]);
});

/** The table that people read and review: what everybody got, row by row. */
it('is the reviewed table', async () => {
  const MARK: Record<Verdict, string> = { ok: 'yes', unauthenticated: '401', hidden: '404', forbidden: '403' };
  const rows = [...allContracts.map((contract) => [contract.id, contract.permission] as const), ...(Object.keys(ROOMS) as Room[]).map((room) => [`room ${room}`, ROOMS[room].permission] as const)];
  const line = (cells: readonly string[]) => cells.map((cell, i) => cell.padEnd(i < 2 ? 26 : 4)).join(' ').trimEnd();
  const legend = WHO.map((name, i) => `${String.fromCharCode(65 + i)} ${name}`);
  const table = [
    'Who may do what: the answer of every route and room to everybody. The centre in the path is that of B–F and K, the league that of E.',
    'yes: served, or refused for its state · 401 not signed in · 403 the wrong role · 404 not theirs to know', ...legend, '',
    line(['route or room', 'permission', ...WHO.map((_, i) => String.fromCharCode(65 + i))]),
    ...rows.map(([row, permission]) => line([row, permission, ...WHO.map((name) => MARK[heard.get(row)?.get(name) ?? 'ok'])])),
  ].join('\n');
  expect(heard.size).toBe(rows.length);
  expect(existsSync(TABLE), 'the table is reviewed and committed, never made on the way').toBe(true);
  await expect(`${table}\n`).toMatchFileSnapshot(TABLE);
});
