import { afterEach, describe, expect, it, vi } from 'vitest';
import { floorContracts } from '#shared/contracts/floor.ts';
import type { Problem } from './api.ts';
import { addressOf, call, newKey } from './api.ts';

const answer = (status: number, body: unknown, headers: Record<string, string> = {}) =>
  new Response(body === null ? null : JSON.stringify(body), { status, headers: { 'content-type': 'application/json', ...headers } });
afterEach(() => vi.unstubAllGlobals());

describe('addresses', () => {
  it('fills the path and leaves undefined queries out', () => {
    expect(addressOf('/api/centres/:centre/lanes/:lane', { centre: 'tarn-ferry', lane: 9 }, { from: 5, to: undefined })).toBe('/api/centres/tarn-ferry/lanes/9?from=5');
  });
  it('a part of a path cannot break out of it', () => expect(addressOf('/a/:x', { x: '../b?c' })).toBe('/a/..%2Fb%3Fc'));
});

describe('call', () => {
  it('sends method, body and key as the contract says', async () => {
    const fetched = vi.fn<typeof fetch>(() => Promise.resolve(answer(200, { from: {}, to: {} })));
    vi.stubGlobal('fetch', fetched);
    await call(floorContracts.move, { params: { centre: 'a', lane: 3 }, body: { to: 4 }, idempotencyKey: 'k' });
    const [address, init] = fetched.mock.calls[0]!;
    expect(address).toBe('/api/centres/a/lanes/3/move');
    expect(init).toMatchObject({ method: 'POST', body: '{"to":4}', headers: { 'content-type': 'application/json', 'idempotency-key': 'k' } });
  });

  it('throws what the server refused, with fields and the time to wait', async () => {
    vi.stubGlobal('fetch', () => Promise.resolve(answer(422, { code: 'lane.same', params: { lane: 3 }, errors: [{ in: 'body', pointer: '/to', code: 'lane.same' }, { in: 'path', pointer: '/lane', code: 'field.type' }] }, { 'retry-after': '2' })));
    const problem = await call(floorContracts.move, { params: { centre: 'a', lane: 3 }, body: { to: 3 } }).catch((e: unknown) => e);
    expect(problem).toMatchObject({ status: 422, code: 'lane.same', params: { lane: 3 }, retryAfter: 2 });
    expect((problem as Problem).field('to')?.code).toBe('lane.same');
    expect((problem as Problem).field('lane')).toBeNull();
  });

  it('a failure of the network is a problem of its own, a page of a proxy is its status', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('fetch failed')));
    await expect(call(floorContracts.snapshot, { params: { centre: 'a' } })).rejects.toMatchObject({ status: 0, code: 'network.away' });
    vi.stubGlobal('fetch', () => Promise.resolve(new Response('<html>', { status: 502 })));
    await expect(call(floorContracts.snapshot, { params: { centre: 'a' } })).rejects.toMatchObject({ status: 502, code: 'http.502' });
  });
});

it('keys are 32 hex digits and differ', () => {
  expect(newKey()).toMatch(/^[0-9a-f]{32}$/);
  expect(newKey()).not.toBe(newKey());
});
