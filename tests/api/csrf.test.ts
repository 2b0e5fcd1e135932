import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makePerson, signIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { startWeb, type Web } from '#tests/support/web.ts';

const clock = fixedClock('2026-11-30T18:45:00Z');
let database: TestDatabase;
let web: Web;
let named: Web;

beforeAll(async () => {
  database = await freshDatabase();
  web = await startWeb(database.db, { clock });
  named = await startWeb(database.db, { clock, config: { publicUrl: 'http://lanes.house.test' } });
});
afterAll(async () => {
  await web.close();
  await named.close();
  await database.close();
});

/** Node's fetch won't send these headers itself, so a plain request stands for a browser. */
type Headers = Record<string, string>;

const cases: [string, (url: string) => Headers, 'allowed' | 'refused'][] = [
  ['a program: neither header', () => ({}), 'allowed'],
  ['a page of ours', () => ({ 'sec-fetch-site': 'same-origin' }), 'allowed'],
  ['typed by the user', () => ({ 'sec-fetch-site': 'none' }), 'allowed'],
  ['another site', () => ({ 'sec-fetch-site': 'cross-site', origin: 'https://elsewhere.test' }), 'refused'],
  ['another host of the same site', () => ({ 'sec-fetch-site': 'same-site', origin: 'http://other.house.test' }), 'refused'],
  ['another site that forges our Origin beside Sec-Fetch-Site', (url) => ({ 'sec-fetch-site': 'cross-site', origin: url }), 'refused'],
  ['a page of ours on plain http: Origin alone', (url) => ({ origin: url }), 'allowed'],
  ['another site on plain http', () => ({ origin: 'http://elsewhere.test' }), 'refused'],
  ['another port of this host', (url) => ({ origin: url.replace(/:\d+$/, ':1') }), 'refused'],
  ['a sandboxed frame', () => ({ origin: 'null' }), 'refused'],
];

describe.each(cases)('%s', (_name, headers, verdict) => {
  it(`is ${verdict} to change something`, async () => {
    const cookie = await signIn(web.url, await makePerson(web.accounts));
    const answer = await ask(web.url, 'DELETE', '/api/session', { cookie, headers: headers(web.url) });
    const after = await ask(web.url, 'GET', '/api/me', { cookie });
    if (verdict === 'allowed') {
      expect(answer.status).toBe(200);
      expect(after.status).toBe(401);
    } else {
      expect([answer.status, answer.body]).toMatchObject([403, { code: 'cross-site' }]);
      expect(after.status).toBe(200);
    }
  });

  it('may read all the same: what comes back stays with the other site’s browser', async () => {
    expect((await ask(web.url, 'GET', '/api/me', { headers: headers(web.url) })).status).toBe(401);
  });
});

it('takes the address that people type for its own, behind a proxy that changes Host', async () => {
  const body = { email: 'x@house.test', password: 'wrong' };
  const allowed = await ask(named.url, 'POST', '/api/session', { body, headers: { origin: 'http://lanes.house.test' } });
  expect([allowed.status, allowed.body]).toMatchObject([401, { code: 'session.wrong' }]);
  const refused = await ask(named.url, 'POST', '/api/session', { body, headers: { origin: 'http://lanes.house.test.elsewhere.test' } });
  expect(refused.status).toBe(403);
});

it('refuses what a form could send: the body must be JSON', async () => {
  for (const type of ['application/x-www-form-urlencoded', 'text/plain', 'multipart/form-data; boundary=x', '']) {
    const answer = await ask(web.url, 'POST', '/api/session', { body: '{"email":"a@b.cd","password":"x"}', headers: { 'content-type': type } });
    expect([answer.status, answer.body]).toMatchObject([415, { code: 'body.type' }]);
  }
});
