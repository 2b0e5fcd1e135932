import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createAccounts } from '#server/capabilities/accounts/index.ts';
import { createLog } from '#server/platform/log.ts';
import { cookieOf, makePerson, openDisplay, signedIn, signIn, type TestPerson } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { makeCentre, startWeb, testConfig, type Web } from '#tests/support/web.ts';

const HOUR = 3_600_000;
const clock = fixedClock('2026-11-30T18:45:00Z');
let database: TestDatabase;
let web: Web;

beforeAll(async () => {
  database = await freshDatabase();
  web = await startWeb(database.db, { clock });
});
afterAll(async () => {
  await web.close();
  await database.close();
});

const wrong = (person: TestPerson) => ask(web.url, 'POST', '/api/session', { body: { email: person.email, password: 'not this one' } });

describe('signing in', () => {
  it('opens a session in a cookie that scripts cannot read, and says who it is', async () => {
    const centre = await makeCentre(database.db, clock);
    const person = await makePerson(web.accounts, { centre, role: 'desk' });
    const answer = await ask(web.url, 'POST', '/api/session', { body: { email: ` ${person.email.toUpperCase()} `, password: person.password } });
    expect(answer.status).toBe(200);
    const cookie = answer.headers.getSetCookie()[0];
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
    expect(cookie).not.toMatch(/Secure/i);
    const me = await ask(web.url, 'GET', '/api/me', { cookie: cookie?.split(';')[0] });
    expect(me.body).toEqual({
      kind: 'user', id: person.id, name: person.name, email: person.email, centres: [{ slug: centre.slug, name: centre.name, zone: centre.zone, cut: centre.cut, role: 'desk', leagues: [] }],
    });
    expect(answer.body).toEqual(me.body);
  });

  it('keeps neither the cookie nor the password in the database', async () => {
    const { cookie, password } = await signedIn(web.url, web.accounts, { centre: await makeCentre(database.db, clock), role: 'desk' });
    const secret = cookie.split('=')[1] ?? '';
    const stored = JSON.stringify([await database.db('user_session'), await database.db('user')], (_, v: unknown) => (Buffer.isBuffer(v) ? v.toString('latin1') : v));
    expect(secret.length).toBeGreaterThan(30);
    expect(stored).not.toContain(secret);
    expect(stored).not.toContain(password);
    expect(stored).toContain('$argon2id$v=19$m=19456,t=2,p=1$');
  });

  it('answers a wrong password and an unknown account alike, in the same time', async () => {
    const person = await makePerson(web.accounts);
    const unknown = { ...person, email: 'nobody-at-all@house.test' };
    const timed = async (who: TestPerson) => {
      const from = performance.now();
      const answer = await wrong(who);
      return { ms: performance.now() - from, code: (answer.body as { code: string }).code, status: answer.status };
    };
    await wrong(unknown);
    const known = [];
    const strange = [];
    for (let i = 0; i < 6; i += 1) {
      known.push(await timed(person));
      strange.push(await timed({ ...unknown, email: `nobody-${i}@house.test` }));
    }
    for (const answer of [...known, ...strange]) expect(answer).toMatchObject({ status: 401, code: 'session.wrong' });
    const median = (list: { ms: number }[]) => list.map((a) => a.ms).sort((a, b) => a - b)[3] ?? 0;
    expect(median(strange)).toBeGreaterThan(median(known) * 0.5);
    expect(median(known)).toBeGreaterThan(median(strange) * 0.5);
  });

  it('gives a new session at each sign-in and ends the one the browser had', async () => {
    const person = await makePerson(web.accounts);
    const first = await signIn(web.url, person);
    const again = await fetch(`${web.url}/api/session`, {
      method: 'POST', headers: { 'content-type': 'application/json', cookie: first }, body: JSON.stringify({ email: person.email, password: person.password }),
    });
    const second = cookieOf(again);
    expect(second).not.toBe(first);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: first })).status).toBe(401);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: second })).status).toBe(200);
  });

  it('ends at sign-out, and sign-out without a session is no error', async () => {
    const person = await makePerson(web.accounts);
    const cookie = await signIn(web.url, person);
    expect((await ask(web.url, 'DELETE', '/api/session', { cookie })).status).toBe(200);
    expect((await ask(web.url, 'GET', '/api/me', { cookie })).status).toBe(401);
    expect((await ask(web.url, 'DELETE', '/api/session')).status).toBe(200);
  });

  it('marks cookies Secure and __Host- on HTTPS only', async () => {
    const https = createAccounts({ db: database.db, clock, log: createLog('silent'), config: { ...testConfig, https: true } }, { leaguesOf: async () => [] });
    const person = await makePerson(web.accounts);
    const cookies: string[] = [];
    const http = { cookies: undefined, address: '192.0.2.9', agent: 'test', setCookie: (c: string) => void cookies.push(c), redirect: () => undefined };
    const open = https.routes.find((route) => route.contract.id === 'session.open');
    await open?.handle({ actor: { kind: 'nobody' }, centre: await makeCentre(database.db, clock), params: {}, query: {}, body: { email: person.email, password: person.password }, now: 0, http } as never);
    https.stop();
    expect(cookies[0]).toMatch(/^__Host-lanewright-session=.*; Secure/);
  });
});

describe('limits', () => {
  it('counts failures of one account, answers 429 with Retry-After, and lets others in', async () => {
    const limited = await startWeb(database.db, { clock });
    const [person, other] = [await makePerson(limited.accounts), await makePerson(limited.accounts)];
    const tryOnce = (password: string) => ask(limited.url, 'POST', '/api/session', { body: { email: person.email, password } });
    for (let i = 0; i < 5; i += 1) expect((await tryOnce(person.password)).status).toBe(200);
    for (let i = 0; i < 10; i += 1) expect((await tryOnce('wrong')).status).toBe(401);
    const refused = await tryOnce(person.password);
    expect(refused.status).toBe(429);
    expect(refused.body).toMatchObject({ code: 'session.too-many-tries' });
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
    await expect(signIn(limited.url, other)).resolves.toContain('lanewright');
    await limited.close();
  });

  it('counts tries that come all at once', async () => {
    const limited = await startWeb(database.db, { clock });
    const person = await makePerson(limited.accounts);
    const statuses = await Promise.all(Array.from({ length: 40 }, async () => (await ask(limited.url, 'POST', '/api/session', { body: { email: person.email, password: 'wrong' } })).status));
    expect(statuses.filter((status) => status === 401)).toHaveLength(10);
    expect(statuses.filter((status) => status === 429)).toHaveLength(30);
    await limited.close();
  });

  it('limits one address over many accounts', async () => {
    const limited = await startWeb(database.db, { clock });
    const statuses = [];
    for (let i = 0; i < 55; i += 1) statuses.push((await ask(limited.url, 'POST', '/api/session', { body: { email: `spray-${i}@house.test`, password: 'wrong' } })).status);
    expect(statuses.filter((status) => status === 401)).toHaveLength(50);
    expect(statuses.at(-1)).toBe(429);
    await limited.close();
  });

  it.each([
    ['manager', 4, 24],
    ['desk', 12, 24],
    ['mechanic', 48, 168],
    ['secretary', 336, 2160],
  ] as const)('a %s is out after %d idle hours and after %d hours in any case', async (role, idle, absolute) => {
    const centre = await makeCentre(database.db, clock);
    const status = async (cookie: string) => (await ask(web.url, 'GET', '/api/me', { cookie })).status;
    const { cookie: left } = await signedIn(web.url, web.accounts, { centre, role });
    clock.advance(idle * HOUR - 1000);
    expect(await status(left)).toBe(200);
    clock.advance(idle * HOUR + 1000);
    expect(await status(left)).toBe(401);

    const { cookie: busy } = await signedIn(web.url, web.accounts, { centre, role });
    const steps = Math.ceil(absolute / (idle * 0.9));
    for (let i = 1; i < steps; i += 1) {
      clock.advance((absolute * HOUR) / steps);
      expect(await status(busy)).toBe(200);
    }
    clock.advance((absolute * HOUR) / steps + 1);
    expect(await status(busy)).toBe(401);
  });
});

describe('own sessions', () => {
  it('lists them without their secret, ends one, and tells who listens', async () => {
    const person = await makePerson(web.accounts);
    const [here, there] = [await signIn(web.url, person), await signIn(web.url, person)];
    const ended: string[] = [];
    const stop = web.accounts.onRevoked((handle) => ended.push(handle));
    const { sessions } = (await ask(web.url, 'GET', '/api/me/sessions', { cookie: here })).body as { sessions: { id: string; current: boolean }[] };
    expect(sessions).toHaveLength(2);
    const other = sessions.find((s) => !s.current)!;
    expect((await ask(web.url, 'DELETE', `/api/me/sessions/${other.id}`, { cookie: here })).status).toBe(200);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: there })).status).toBe(401);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: here })).status).toBe(200);
    expect(ended).toEqual([`session:${other.id}`]);
    stop();
  });

  it("doesn't end somebody else's", async () => {
    const [mine, theirs] = [await makePerson(web.accounts), await makePerson(web.accounts)];
    const [cookie, strange] = [await signIn(web.url, mine), await signIn(web.url, theirs)];
    const { sessions } = (await ask(web.url, 'GET', '/api/me/sessions', { cookie: strange })).body as { sessions: { id: string }[] };
    expect((await ask(web.url, 'DELETE', `/api/me/sessions/${sessions[0]!.id}`, { cookie })).status).toBe(404);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: strange })).status).toBe(200);
  });

  it('changes the password, ends the others, and refuses what is easy to guess', async () => {
    const person = await makePerson(web.accounts);
    const [here, there] = [await signIn(web.url, person), await signIn(web.url, person)];
    const change = (present: string, next: string) => ask(web.url, 'PUT', '/api/me/password', { cookie: here, body: { present, next } });
    const field = (answer: { body: unknown }) => (answer.body as { errors: { pointer: string; code: string }[] }).errors[0];
    expect(field(await change('not mine', 'seven oaks by the mill'))).toMatchObject({ pointer: '/present', code: 'password.wrong' });
    for (const [next, code] of [['short', 'password.too-short'], ['password1234', 'password.too-common'], ['123456789012', 'password.too-common'], ['aaaaaaaaaaaaaa', 'password.too-common'], [`${person.name}1`, 'password.about-you']] as const) {
      expect(field(await change(person.password, next)), next).toMatchObject({ pointer: '/next', code });
    }
    expect((await change(person.password, 'seven oaks by the mill')).status).toBe(200);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: there })).status).toBe(401);
    expect((await wrong(person)).status).toBe(401);
    await expect(signIn(web.url, { ...person, password: 'seven oaks by the mill' })).resolves.toBeTruthy();
  });
});

describe('people of a centre', () => {
  it('adds somebody with a password shown once, changes the role, ends their sessions, keeps one manager', async () => {
    const centre = await makeCentre(database.db, clock);
    const manager = await signedIn(web.url, web.accounts, { centre, role: 'manager' });
    const people = `/api/centres/${centre.slug}/people`;
    const email = `new-${manager.id.slice(-8)}@house.test`;
    const added = await ask(web.url, 'POST', people, { cookie: manager.cookie, body: { name: 'New Hand', email, role: 'desk' } });
    expect(added.status).toBe(201);
    const { person, password } = added.body as { person: { id: string }; password: string };
    const cookie = await signIn(web.url, { id: person.id, name: 'New Hand', email, password });
    expect((await ask(web.url, 'POST', people, { cookie: manager.cookie, body: { name: 'New Hand', email, role: 'desk' } })).body).toMatchObject({ code: 'person.already-here' });
    expect((await ask(web.url, 'PUT', `${people}/${person.id}`, { cookie: manager.cookie, body: { role: 'mechanic' } })).body).toMatchObject({ role: 'mechanic' });
    expect((await ask(web.url, 'GET', '/api/me', { cookie })).status).toBe(401);
    expect((await ask(web.url, 'DELETE', `${people}/${manager.id}`, { cookie: manager.cookie })).body).toMatchObject({ code: 'person.last-manager' });
    expect((await ask(web.url, 'DELETE', `${people}/${person.id}`, { cookie: manager.cookie })).status).toBe(200);
    expect((await ask(web.url, 'GET', people, { cookie: manager.cookie })).body).toMatchObject({ people: [{ id: manager.id }] });
  });

  it("gives a secretary leagues of this centre only, and no one else leagues", async () => {
    const centre = await makeCentre(database.db, clock);
    const [own, strange] = ['0197a000-0000-7000-8000-000000000001', '0197a000-0000-7000-8000-000000000002'];
    const house = await startWeb(database.db, { clock, leaguesOf: async () => [own] });
    const manager = await signedIn(house.url, house.accounts, { centre, role: 'manager' });
    const add = (role: string, leagues: string[]) => ask(house.url, 'POST', `/api/centres/${centre.slug}/people`, { cookie: manager.cookie, body: { name: 'S', email: `s-${leagues.length}-${role}-${manager.id.slice(-8)}@house.test`, role, leagues } });
    expect((await add('secretary', [own, strange])).body).toMatchObject({ status: 422, errors: [{ pointer: '/leagues/1', code: 'league.not-here' }] });
    expect((await add('desk', [own])).body).toMatchObject({ status: 422, code: 'person.leagues-of-secretary-only' });
    expect((await add('secretary', [own])).body).toMatchObject({ person: { leagues: [own] } });
    await house.close();
  });

  it('lets only one of two managers who remove each other succeed', async () => {
    const centre = await makeCentre(database.db, clock);
    const [a, b] = [await signedIn(web.url, web.accounts, { centre, role: 'manager' }), await signedIn(web.url, web.accounts, { centre, role: 'manager' })];
    const remove = (who: typeof a, whom: typeof a) => ask(web.url, 'DELETE', `/api/centres/${centre.slug}/people/${whom.id}`, { cookie: who.cookie });
    await Promise.all([remove(a, b), remove(b, a)]);
    const left = await database.db('membership').where({ centre_id: centre.id, role: 'manager' });
    expect(left).toHaveLength(1);
  });
});

describe('displays', () => {
  it('opens the wall by a link, sees one centre, and is out as soon as the link is revoked', async () => {
    const centre = await makeCentre(database.db, clock);
    const manager = await signedIn(web.url, web.accounts, { centre, role: 'manager' });
    const displays = `/api/centres/${centre.slug}/displays`;
    const made = await ask(web.url, 'POST', displays, { cookie: manager.cookie, body: { name: 'Over lane 16' } });
    const { display, path } = made.body as { display: { id: string }; path: string };
    const opened = await ask(web.url, 'GET', path);
    expect(opened.status).toBe(303);
    expect(opened.headers.get('location')).toBe(`/${centre.slug}/wall`);
    expect(opened.headers.getSetCookie()[0]).toMatch(/HttpOnly/);
    const cookie = opened.headers.getSetCookie()[0]!.split(';')[0]!;
    expect((await ask(web.url, 'GET', '/api/me', { cookie })).body).toMatchObject({ kind: 'display', id: display.id, email: null, centres: [{ slug: centre.slug, role: 'display' }] });
    const stored = JSON.stringify(await database.db('display_link'), (_, v: unknown) => (Buffer.isBuffer(v) ? v.toString('latin1') : v));
    expect(stored).not.toContain(path.slice(3));

    const ended: string[] = [];
    const stop = web.accounts.onRevoked((handle) => ended.push(handle));
    expect((await ask(web.url, 'DELETE', `${displays}/${display.id}`, { cookie: manager.cookie })).status).toBe(200);
    expect(ended).toEqual([`display:${display.id}`]);
    expect((await ask(web.url, 'GET', '/api/me', { cookie })).status).toBe(401);
    expect((await ask(web.url, 'GET', path)).body).toMatchObject({ status: 404, code: 'display.unknown' });
    const browser = await ask(web.url, 'GET', path, { headers: { accept: 'text/html' } });
    expect([browser.status, browser.headers.get('location')]).toEqual([303, '/sign-in?because=display.unknown']);
    stop();
  });

  it("isn't revoked by a manager of another centre", async () => {
    const [here, there] = [await makeCentre(database.db, clock), await makeCentre(database.db, clock)];
    const stranger = await signedIn(web.url, web.accounts, { centre: there, role: 'manager' });
    const display = await openDisplay(web.url, web.accounts, here);
    for (const slug of [here.slug, there.slug]) expect((await ask(web.url, 'DELETE', `/api/centres/${slug}/displays/${display.id}`, { cookie: stranger.cookie })).status).toBe(404);
    expect((await ask(web.url, 'GET', '/api/me', { cookie: display.cookie })).status).toBe(200);
  });
});
