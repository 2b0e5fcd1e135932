import * as z from 'zod/mini';
import { request as httpRequest } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { contract, laneNumber, line, ok } from '#shared/contracts/contract.ts';
import { serve } from '#server/platform/http/route.ts';
import { ask, type Answer } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { startWeb, type Web } from '#tests/support/web.ts';

const clock = fixedClock('2026-11-30T18:45:00Z');
const base = { permission: 'public' as const, summary: 'for this test' };
const taken = contract({
  ...base, id: 'test.take', method: 'POST', path: '/api/test/:lane', params: z.object({ lane: z.coerce.number().check(z.int(), z.minimum(1), z.maximum(99)) }),
  query: z.object({ side: z.optional(z.enum(['left', 'right'])) }),
  body: z.object({ lanes: z.array(laneNumber).check(z.minLength(1)), name: line(5), deep: z.optional(z.object({ 'a/b~c': z.int() })) }), response: ok,
});
const surplus = contract({ ...base, id: 'test.surplus', method: 'GET', path: '/api/test-surplus', response: z.object({ a: z.int(), deep: z.object({ b: z.int() }) }) });
const broken = contract({ ...base, id: 'test.broken', method: 'GET', path: '/api/test-broken', response: ok });
const misfit = contract({ ...base, id: 'test.misfit', method: 'GET', path: '/api/test-misfit', response: ok });
const routes = [
  serve(taken, async () => ({ ok: true as const })),
  serve(surplus, async () => ({ a: 1, deep: { b: 2, hash: 'secret' } })),
  serve(broken, async () => {
    throw new Error('secret words of a fault');
  }),
  serve(misfit, async () => ({ ok: false }) as never),
];

let database: TestDatabase;
let strict: Web;
let lenient: Web;

beforeAll(async () => {
  database = await freshDatabase();
  strict = await startWeb(database.db, { clock, routes });
  lenient = await startWeb(database.db, { clock, routes, strict: false });
});
afterAll(async () => {
  await strict.close();
  await lenient.close();
  await database.close();
});

function isProblem(answer: Answer, status: number, code: string): void {
  expect([answer.status, answer.body]).toMatchObject([status, { status, code, type: `urn:lanewright:problem:${code}` }]);
  expect(answer.headers.get('content-type')).toMatch(/^application\/problem\+json/);
  expect((answer.body as { title: string }).title).not.toBe(code);
  expect((answer.body as { instance: string }).instance).toContain(answer.headers.get('x-request-id'));
}

describe('problem+json', () => {
  it('names every field with its place, code and sentence', async () => {
    const answer = await ask(strict.url, 'POST', '/api/test/0?side=up', { body: { lanes: [4, 100, 'x'], name: ' ', deep: { 'a/b~c': 1.5 } } });
    isProblem(answer, 422, 'input.invalid');
    expect((answer.body as { errors: unknown[] }).errors).toEqual([
      { in: 'path', pointer: '/lane', code: 'field.too-small', params: { min: 1 }, detail: 'Not below 1.' },
      { in: 'query', pointer: '/side', code: 'field.choice', params: { allowed: 'left, right' }, detail: 'Choose one of: left, right.' },
      { in: 'body', pointer: '/lanes/1', code: 'field.too-large', params: { max: 99 }, detail: 'Not above 99.' },
      { in: 'body', pointer: '/lanes/2', code: 'field.type', params: { expected: 'number' }, detail: 'This must be a number.' },
      { in: 'body', pointer: '/name', code: 'field.required', params: {}, detail: 'This is needed.' },
      { in: 'body', pointer: '/deep/a~1b~0c', code: 'field.type', params: { expected: 'int' }, detail: 'This must be a whole number.' },
    ]);
  });

  it.each([
    ['an unknown address', 'GET', '/api/nothing-here', {}, 404, 'route.unknown'],
    ['a path that is not well formed', 'POST', '/api/test/%E0%A4%A', { body: {} }, 400, 'path.invalid'],
    ['JSON that ends too early', 'POST', '/api/test/1', { body: '{"lanes": [1', headers: { 'content-type': 'application/json' } }, 400, 'body.not-json'],
    ['a lone value', 'POST', '/api/test/1', { body: '7', headers: { 'content-type': 'application/json' } }, 400, 'body.not-json'],
    ['a body of over 100 kB', 'POST', '/api/test/1', { body: { name: 'x'.repeat(103_000) } }, 413, 'body.too-large'],
    ['another character set', 'POST', '/api/test/1', { body: '{}', headers: { 'content-type': 'application/json; charset=latin1' } }, 415, 'body.type'],
    ['no body where one is needed', 'POST', '/api/test/1', {}, 422, 'input.invalid'],
    ['nobody signed in', 'GET', '/api/me', {}, 401, 'session.required'],
    ['a fault of ours', 'GET', '/api/test-broken', {}, 500, 'unexpected'],
    ['an answer that does not fit its contract', 'GET', '/api/test-misfit', {}, 500, 'unexpected'],
    ['a field that the contract does not name, in tests', 'GET', '/api/test-surplus', {}, 500, 'unexpected'],
  ] as const)('answers %s', async (_name, method, path, given, status, code) => {
    isProblem(await ask(strict.url, method, path, given), status, code);
  });

  it('names the methods that an address takes', async () => {
    const answer = await ask(strict.url, 'PUT', '/api/session', { body: {} });
    isProblem(answer, 405, 'method.not-allowed');
    expect(answer.headers.get('allow')).toBe('POST, DELETE');
  });

  it('leaks nothing of a fault', async () => {
    expect(JSON.stringify((await ask(strict.url, 'GET', '/api/test-broken')).body)).not.toContain('secret');
  });

  it('leaves out what the contract does not name', async () => {
    expect((await ask(lenient.url, 'GET', '/api/test-surplus')).body).toEqual({ a: 1, deep: { b: 2 } });
  });

  it('takes up with the next request on the connection after a body it did not read', async () => {
    const answers = await Promise.all([1, 2, 3].map(() => ask(strict.url, 'POST', '/api/test/1', { body: { name: 'x'.repeat(300_000) } })));
    for (const answer of answers) isProblem(answer, 413, 'body.too-large');
    expect((await ask(strict.url, 'POST', '/api/test/1', { body: { lanes: [1], name: 'ok' } })).status).toBe(200);
  });
});

describe('headers', () => {
  it('allow no inline script, no frame, no guess at types, and say nothing of HTTPS on plain http', async () => {
    const { headers } = await ask(strict.url, 'GET', '/api/me');
    const policy = headers.get('content-security-policy') ?? '';
    expect(policy).toContain("script-src 'self'");
    expect(policy.match(/script-src[^;]*/)?.[0]).not.toContain('unsafe');
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('upgrade-insecure-requests');
    expect(headers.get('strict-transport-security')).toBeNull();
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('x-powered-by')).toBeNull();
    expect(headers.get('cache-control')).toBe('no-store');
  });

  it('ask for HTTPS once the address is one', async () => {
    const https = await startWeb(database.db, { clock, config: { https: true, publicUrl: 'https://lanes.house.test' } });
    const { headers } = await ask(https.url, 'GET', '/api/me');
    expect(headers.get('content-security-policy')).toContain('upgrade-insecure-requests');
    expect(headers.get('strict-transport-security')).toMatch(/max-age=31536000/);
    await https.close();
  });
});

it('answers a request whose body never ends when its sender goes away, without harm to others', async () => {
  const url = new URL(strict.url);
  const half = httpRequest({ host: url.hostname, port: url.port, method: 'POST', path: '/api/session', headers: { 'content-type': 'application/json', 'content-length': '50' } });
  const gone = new Promise<void>((done) => half.on('error', () => done()));
  half.write('{"email":');
  half.destroy();
  await gone;
  expect((await ask(strict.url, 'GET', '/api/me')).status).toBe(401);
});
