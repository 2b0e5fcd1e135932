import * as z from 'zod/mini';
import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { centreParams, contract } from '#shared/contracts/contract.ts';
import { withBeforeCommit } from '#server/platform/db/before-commit.ts';
import { unitOfWork } from '#server/platform/db/unit-of-work.ts';
import { conflict } from '#server/platform/http/refusal.ts';
import { serve } from '#server/platform/http/route.ts';
import { createLedger } from '#server/platform/journal/create-ledger.ts';
import { signedIn } from '#tests/support/actors.ts';
import { ask, type Answer } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';
import { makeCentre, startWeb, type Web } from '#tests/support/web.ts';

const HOUR = 3_600_000;
const clock = fixedClock('2026-11-30T18:45:00Z');
const base = { method: 'POST' as const, permission: 'call.raise' as const, summary: 'for this test', params: centreParams };
const counted = z.object({ id: z.int(), note: z.string() });
const at = '/api/centres/:centre';
const note = z.object({ note: z.string() });
const contracts = {
  count: contract({ ...base, id: 'test.count', path: `${at}/count`, body: note, response: counted, status: 201 }),
  decide: contract({ ...base, id: 'test.decide', path: `${at}/decide`, body: note, response: counted }),
  slow: contract({ ...base, id: 'test.slow', path: `${at}/slow`, body: note, response: counted }),
  refuse: contract({ ...base, id: 'test.refuse', path: `${at}/refuse`, body: note, response: counted }),
  crash: contract({ ...base, id: 'test.crash', path: `${at}/crash`, body: note, response: counted }),
  late: contract({ ...base, id: 'test.late', path: `${at}/late`, body: note, response: counted }),
  secret: contract({ ...base, id: 'test.secret', path: `${at}/secret`, body: note, response: counted }),
};

let database: TestDatabase;
let web: Web;
let here: string;
let cookie: string;
let release: () => void = () => undefined;
let crashes = 0;
let n = 0;

const insert = (note: string) => async (trx: Knex.Transaction) => ({ id: (await trx('counted').insert({ note }))[0] as number, note });
const write = (note: string) => unitOfWork(database.db, insert(note));

beforeAll(async () => {
  database = await ownDatabase();
  await database.db.schema.createTable('counted', (table) => {
    table.increments('id');
    table.string('note');
  });
  const ledger = createLedger({ db: database.db, clock });
  web = await startWeb(database.db, {
    clock,
    routes: [
      serve(contracts.count, ({ body }) => write(body.note)),
      serve(contracts.decide, ({ centre, body }) => {
        const answer = { id: 0, note: body.note };
        return ledger.decide(centre, () => ({ facts: [], write: async (trx) => void (answer.id = (await insert(body.note)(trx)).id), result: () => answer }));
      }),
      serve(contracts.slow, async ({ body }) => {
        await new Promise<void>((go) => (release = go));
        return write(body.note);
      }),
      serve(contracts.refuse, async ({ body }) => {
        await write(body.note);
        throw conflict('call.already-cleared', { by: 'Ada' });
      }),
      serve(contracts.crash, async ({ body }) => {
        crashes += 1;
        if (crashes === 1) throw new Error('broken before anything was written');
        return write(body.note);
      }),
      serve(contracts.late, async ({ body }) => {
        await write(body.note);
        throw new Error('broken after the commit');
      }),
      serve(contracts.secret, ({ body }) => write(body.note), { secret: true }),
    ],
  });
  const centre = await makeCentre(database.db, clock);
  here = `/api/centres/${centre.slug}`;
  ({ cookie } = await signedIn(web.url, web.accounts, { centre, role: 'desk' }));
});
afterAll(async () => {
  await web.close();
  await database.close();
});

const newKey = () => `key-${(n += 1)}`;
const post = (path: string, key: string | undefined, note: string, who = cookie): Promise<Answer> =>
  ask(web.url, 'POST', `${here}/${path}`, { cookie: who, body: { note }, headers: key === undefined ? {} : { 'idempotency-key': key } });
const rows = async (note: string) => (await database.db('counted').where({ note })).length;

describe.each(['count', 'decide'])('a repeat with the same key (%s)', (path) => {
  it('has the effect of once and answers the same', async () => {
    const key = newKey();
    const first = await post(path, key, key);
    const again = await post(path, key, key);
    expect(first.status, JSON.stringify(first.body)).toBeLessThan(300);
    expect([again.status, again.body]).toEqual([first.status, first.body]);
    expect(await rows(key)).toBe(1);
  });

  it('runs once out of fifty at the same time', async () => {
    const key = newKey();
    const answers = await Promise.all(Array.from({ length: 50 }, () => post(path, key, key)));
    expect(await rows(key)).toBe(1);
    for (const answer of answers) if (answer.status >= 300) expect([answer.status, answer.body]).toMatchObject([409, { code: 'idempotency.under-way' }]);
    expect(answers.some((answer) => answer.status < 300)).toBe(true);
  });
});

it('runs each time without a key', async () => {
  await post('count', undefined, 'twice');
  await post('count', undefined, 'twice');
  expect(await rows('twice')).toBe(2);
});

it('refuses the key for another body or path', async () => {
  const key = newKey();
  await post('count', key, key);
  for (const answer of [await post('count', key, 'other'), await post('decide', key, key)]) expect([answer.status, answer.body]).toMatchObject([422, { code: 'idempotency.mismatch' }]);
  expect(await rows('other')).toBe(0);
});

it('keeps keys of two people apart', async () => {
  const centre = await makeCentre(database.db, clock);
  const other = await signedIn(web.url, web.accounts, { centre, role: 'desk' });
  const key = newKey();
  await post('count', key, key);
  const answer = await ask(web.url, 'POST', `/api/centres/${centre.slug}/count`, { cookie: other.cookie, body: { note: key }, headers: { 'idempotency-key': key } });
  expect(answer.status).toBe(201);
  expect(await rows(key)).toBe(2);
});

it('says so while the first is under way', async () => {
  const key = newKey();
  const first = post('slow', key, key);
  await expect.poll(async () => (await database.db('idempotency').where({ idempotency_key: key })).length).toBe(1);
  const second = await post('slow', key, key);
  expect([second.status, second.body, second.headers.get('retry-after')]).toMatchObject([409, { code: 'idempotency.under-way' }, '1']);
  release();
  expect((await first).status).toBe(200);
  expect((await post('slow', key, key)).status).toBe(200);
});

it('repeats a refusal as it was', async () => {
  const key = newKey();
  const first = await post('refuse', key, key);
  const again = await post('refuse', key, key);
  expect(first.status).toBe(409);
  expect([again.status, again.body, again.headers.get('content-type')]).toEqual([first.status, first.body, first.headers.get('content-type')]);
  expect(await rows(key)).toBe(1);
});

it('never keeps a 5xx: the same key may try again when nothing was written', async () => {
  const key = newKey();
  expect((await post('crash', key, key)).status).toBe(500);
  expect((await post('crash', key, key)).status).toBe(200);
});

it("doesn't do again what was committed before the answer was lost", async () => {
  const key = newKey();
  expect((await post('late', key, key)).status).toBe(500);
  const again = await post('late', key, key);
  expect([again.status, again.body]).toMatchObject([409, { code: 'idempotency.answer-lost' }]);
  expect(await rows(key)).toBe(1);
});

it('keeps no secret for a repeat', async () => {
  const key = newKey();
  expect((await post('secret', key, key)).status).toBe(200);
  expect((await post('secret', key, key)).body).toMatchObject({ code: 'idempotency.answer-lost' });
  expect(await database.db('idempotency').where({ idempotency_key: key }).first()).toMatchObject({ state: 'answered', answer: null });
});

it('rolls the mark back with the effect', async () => {
  let marked = 0;
  const failing = withBeforeCommit(async (trx) => {
    marked += 1;
    await insert('mark')(trx);
    throw new Error('cut off');
  }, () => write('effect'));
  await expect(failing).rejects.toThrow('cut off');
  expect([marked, await rows('mark'), await rows('effect')]).toEqual([1, 0, 0]);
});

it('lets go of a claim whose process died, and of every key after a day', async () => {
  const key = newKey();
  const answer = await post('count', key, key);
  await database.db('idempotency').where({ idempotency_key: key }).update({ state: 'pending', status: null, answer: null });
  expect((await post('count', key, key)).status).toBe(409);
  clock.advance(61_000);
  expect((await post('count', key, key)).status).toBe(201);
  expect(answer.status).toBe(201);
  clock.advance(11 * HOUR);
  await ask(web.url, 'GET', '/api/me', { cookie });
  expect((await post('count', key, key)).status).toBe(201);
  expect(await rows(key)).toBe(2);
  await database.db('idempotency').update({ created_at: new Date(clock.now() - 25 * HOUR) });
  expect((await post('count', key, key)).status).toBe(201);
  expect(await rows(key)).toBe(3);
});

it('refuses a key that is no key', async () => {
  for (const key of ['with space', 'x'.repeat(201)]) expect((await post('count', key, 'never')).body).toMatchObject({ code: 'idempotency.key-invalid' });
  expect(await rows('never')).toBe(0);
});
