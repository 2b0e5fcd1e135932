import fc from 'fast-check';
import { beforeEach, describe, expect, it } from 'vitest';
import type { CentreRef } from '#server/platform/http/route.ts';
import { signedIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { aCentre, countRows } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { aDevice, deviceAt, type Device, type EventGiven } from '#tests/support/device.ts';
import { served } from '#tests/support/served.ts';
import { startServer } from '#tests/support/server.ts';

const MIN = 60_000;
const HOUR = 60 * MIN;
const DAY = 24 * HOUR;

const clock = fixedClock('2026-05-14T18:00:00Z');
const { server, database } = await served({ clock });

describe('POST /api/ingest/events', () => {
  const iso = (at: number) => new Date(at).toISOString();
  let centre: CentreRef;
  let device: Device;

  beforeEach(async () => {
    clock.set('2026-05-14T18:00:00Z');
    centre = await aCentre(server.slices.centre);
    device = await aDevice(server, centre);
  });

  const house = async () => (await server.deps.ledger.read(centre)).state;
  const lane = async (n: number) => (await house()).floor[n - 1]!;
  const gateway = async () => (await server.slices.centre.gateways.views(centre, clock.now()))[0]!;
  const journal = () => countRows(database.db, 'journal', centre);
  const setAside = (answer: { body: { setAside: { reason: string }[] } }) => answer.body.setAside.map((one) => one.reason);

  describe('each type of event', () => {
    const machine = { machine: 'M1', run: 'R7' };
    const cases: [string, EventGiven[], () => Promise<unknown>, unknown][] = [
      ['lane.opened', [{ type: 'lane.opened', data: { lane: 2, use: 'party', bowlers: 6, label: 'Ada', until: '2026-05-14T20:00:00Z', games: 2, bumpers: true } }],
        async () => [(await lane(2)).use, (await lane(2)).bumpers], [expect.objectContaining({ kind: 'party', bowlers: 6, label: 'Ada', games: 2, until: Date.UTC(2026, 4, 14, 20) }), true]],
      ['lane.closed', [{ type: 'lane.opened', data: { lane: 2 } }, { type: 'lane.closed', data: { lane: 2 }, time: Date.UTC(2026, 4, 14, 18, 1) }], async () => (await lane(2)).use, null],
      ['lane.moved', [{ type: 'lane.opened', data: { lane: 2, use: 'open' } }, { type: 'lane.moved', data: { from: 2, to: 5 }, time: Date.UTC(2026, 4, 14, 18, 1) }],
        async () => [(await lane(2)).use, (await lane(5)).use?.kind], [null, 'open']],
      ['lane.counted', [{ type: 'lane.counted', data: { lane: 3, deliveries: 4, cycles: 5, frames: 2, games: 0, basis: 'scored' } }],
        async () => (await lane(3)).counts, [expect.objectContaining({ kind: 'unassigned', deliveries: 4, cycles: 5, frames: 2, framesEstimated: 0 })]],
      ['game.progress', [{ type: 'game.progress', data: { lane: 3, game: 2, frame: 7 } }], async () => (await lane(3)).progress, expect.objectContaining({ game: 2, frame: 7 })],
      ['pinsetter.on', [{ type: 'pinsetter.on', data: { lane: 4 } }], async () => (await lane(4)).power, 'on'],
      ['pinsetter.off', [{ type: 'pinsetter.off', data: { lane: 4 } }], async () => [(await lane(4)).power, Object.keys((await house()).calls.open)], ['off', []]],
      ['pinsetter.stopped', [{ type: 'pinsetter.stopped', data: { lane: 4, reason: 'fault', code: 'E12', text: 'deck', pins: [1, 5] } }],
        async () => [(await lane(4)).stop, (await house()).calls.open['lane:4/pinsetter']?.code], [expect.objectContaining({ code: 'E12', pins: [1, 5] }), 'E12']],
      ['pinsetter.restarted', [{ type: 'pinsetter.stopped', data: { lane: 4 } }, { type: 'pinsetter.restarted', data: { lane: 4 }, time: Date.UTC(2026, 4, 14, 18, 2) }],
        async () => [(await lane(4)).stop, (await house()).calls.open['lane:4/pinsetter']?.returnedAt], [null, Date.UTC(2026, 4, 14, 18, 2)]],
      ['equipment.faulted', [{ type: 'equipment.faulted', data: { equipment: 'ball-return', lane: 6, text: 'stuck' } }],
        async () => (await house()).calls.open['pair:5/ball-return']?.lanesHeld, [5, 6]],
      ['equipment.restored', [{ type: 'equipment.faulted', data: { equipment: 'masking', lane: 6 } }, { type: 'equipment.restored', data: { equipment: 'masking', lane: 6 }, time: Date.UTC(2026, 4, 14, 18, 3) }],
        async () => (await house()).calls.open['lane:6/masking']?.returnedAt, Date.UTC(2026, 4, 14, 18, 3)],
      ['call.requested', [{ type: 'call.requested', data: { lane: 1, equipment: 'scoring', text: 'please' } }], async () => (await house()).calls.open['lane:1/scoring']?.origin, 'bowler'],
      ['run.started', [{ type: 'run.started', data: { ...machine, pattern: 'house', revision: 2, lanes: [1, 2] } }],
        async () => (await house()).runs.active['M1/R7'], expect.objectContaining({ status: 'under-way', pattern: 'house', revision: 2, lanes: [1, 2] })],
      ['run.lane.dressed', [{ type: 'run.lane.dressed', data: { ...machine, lane: 1, startedAt: '2026-05-14T17:55:00Z', finishedAt: '2026-05-14T17:57:00Z', conditionerMl: { a: 12.345, b: 3 }, cleanerMl: 20, measured: true } }],
        async () => [(await lane(1)).dressed?.at, (await house()).runs.active['M1/R7']?.done[0]], [Date.UTC(2026, 4, 14, 17, 57), expect.objectContaining({ aUl: 12_345, bUl: 3_000, cleanerUl: 20_000, measured: true })]],
      ['run.lane.skipped', [{ type: 'run.lane.skipped', data: { ...machine, lane: 1, reason: 'occupied' } }], async () => [(await lane(1)).dressed, (await house()).runs.active['M1/R7']?.done[0]?.outcome], [null, 'skipped']],
      ['run.finished', [{ type: 'run.started', data: machine }, { type: 'run.finished', data: machine, time: Date.UTC(2026, 4, 14, 18, 4) }], async () => (await house()).runs.ended[0]?.status, 'finished'],
      ['run.aborted', [{ type: 'run.started', data: machine }, { type: 'run.aborted', data: { ...machine, lane: 7, reason: 'belt' }, time: Date.UTC(2026, 4, 14, 18, 4) }],
        async () => [(await lane(7)).brokenOff?.run, (await house()).runs.ended[0]?.status], ['R7', 'aborted']],
      ['machine.levels', [{ type: 'machine.levels', data: { machine: 'M1', tankAMl: 500.5, batteryPct: 80 } }], async () => (await house()).runs.levels['M1'], expect.objectContaining({ tankAUl: 500_500, batteryPct: 80, tankBUl: null })],
      ['gateway.started', [{ type: 'gateway.started', data: { queued: 3, uptimeS: 1 } }], async () => (await gateway()).silent, false],
      ['gateway.heartbeat', [{ type: 'gateway.heartbeat', data: { queued: 3, uptimeS: 60 } }], async () => (await server.slices.centre.gateways.list(centre))[0]?.news.queued, 3],
    ];

    it.each(cases)('%s', async (type, events, look, seen) => {
      const answer = await device.send(events);
      expect(answer.body).toEqual({ accepted: events.length, duplicates: 0, setAside: [] });
      expect(await look()).toEqual(seen);
      expect(events.some((one) => one.type === type)).toBe(true);
    });

    it('alone, as one CloudEvent', async () => {
      expect((await device.sendOne({ type: 'lane.opened', data: { lane: 1, somethingNew: 7 } })).body).toEqual({ accepted: 1, duplicates: 0, setAside: [] });
      expect((await lane(1)).use?.kind).toBe('unknown');
    });
  });

  it('takes a repeat as a duplicate, byte for byte', async () => {
    const ids = ['Evt-a', 'evt-a', 'evt-a ', 'évt-a', 'e\u0301vt-a'];
    const batch = ids.map((id) => ({ type: 'lane.counted', data: { lane: 1, deliveries: 1 }, id }));
    expect((await device.send(batch)).body.accepted).toBe(5);
    expect((await device.send([...batch, ...batch])).body).toEqual({ accepted: 0, duplicates: 10, setAside: [] });
    expect((await lane(1)).deliveriesSince).toBe(5);
    expect((await gateway()).faults).toEqual([]);
  });

  it('shows a repeat with other content as a fault, and keeps the first', async () => {
    await device.send([{ type: 'lane.counted', data: { lane: 1, deliveries: 1 }, id: 'x', source: 'a' }]);
    const again = await device.send([{ type: 'lane.counted', data: { lane: 1, deliveries: 9 }, id: 'x', source: 'a' }, { type: 'lane.counted', data: { lane: 1, deliveries: 2 }, id: 'x', source: 'b' }]);
    expect(again.body).toMatchObject({ accepted: 1, duplicates: 1 });
    expect((await lane(1)).deliveriesSince).toBe(3);
    expect((await gateway()).faults).toEqual([expect.stringContaining('other content')]);
  });

  it('sets aside what doesn’t fit, with its reason, and applies the rest', async () => {
    const now = clock.now();
    const answer = await device.post(JSON.stringify([
      device.event({ type: 'lane.opened', data: { lane: 1 } }),
      device.event({ type: 'lane.polished', data: { lane: 1 } }),
      device.event({ type: 'lane.opened', data: { lane: 'one' } }),
      device.event({ type: 'lane.opened', data: { lane: 9 } }),
      device.event({ type: 'lane.closed', data: { lane: 1 }, time: now - 7 * DAY - 1 }),
      device.event({ type: 'lane.closed', data: { lane: 1 }, time: now + 5 * MIN + 1 }),
      { ...device.event({ type: 'lane.closed', data: { lane: 1 } }), id: undefined },
      { ...device.event({ type: 'lane.closed', data: { lane: 1 } }), time: '2026-02-30T00:00:00Z' },
      { ...device.event({ type: 'lane.closed', data: { lane: 1 } }), specversion: '0.3' },
      7,
      device.event({ type: 'run.lane.dressed', data: { machine: 'M', run: 'R', lane: 1, startedAt: iso(now - HOUR), finishedAt: iso(now + MIN) } }),
      device.event({ type: 'lane.counted', data: { lane: 1, deliveries: -5 } }),
    ]));
    expect(answer.body).toMatchObject({ accepted: 1, duplicates: 0 });
    expect(setAside(answer)).toEqual([
      'type.unknown', 'data.invalid:/lane', 'lane.unknown', 'time.too-old', 'time.in-future', 'event.id-missing', 'event.invalid:/time', 'event.invalid:/specversion',
      'event.not-an-object', 'data.invalid:/finishedAt', 'data.invalid:/deliveries',
    ]);
    expect(await journal()).toBe(12);
    expect((await lane(1)).use).not.toBeNull();
  });

  it('takes what lies just inside the window', async () => {
    const now = clock.now();
    expect((await device.send([{ type: 'lane.counted', data: { lane: 1, deliveries: 1 }, time: now - 7 * DAY }, { type: 'lane.counted', data: { lane: 1, deliveries: 1 }, time: now + 5 * MIN }])).body.accepted).toBe(2);
  });

  it('lists what was set aside, and applies it in its own time once the cause is mended', async () => {
    const manager = await signedIn(server.url, server.slices.accounts, { centre, role: 'manager' });
    const at = clock.now() - 8 * DAY;
    await device.send([{ type: 'lane.counted', data: { lane: 1, deliveries: 3 }, time: at, id: 'old', source: 's' }, { type: 'lane.gone', id: 'odd', source: 's' }]);
    const path = `/api/centres/${centre.slug}/settings/set-aside`;
    const list = await ask(server.url, 'GET', path, { cookie: manager.cookie });
    expect(list.body).toMatchObject({ events: expect.arrayContaining([expect.objectContaining({ id: 'old', reason: 'time.too-old', time: at }), expect.objectContaining({ id: 'odd', reason: 'type.unknown', sent: expect.objectContaining({ type: 'lane.gone' }) })]) });
    const applied = await ask(server.url, 'POST', `${path}/apply`, { cookie: manager.cookie, body: { events: [{ source: 's', id: 'old' }, { source: 's', id: 'odd' }, { source: 's', id: 'none' }] } });
    expect(applied.body).toMatchObject({ applied: 1, still: [{ id: 'odd', reason: 'type.unknown' }, { id: 'none', reason: 'event.not-set-aside' }] });
    expect((await lane(1)).deliveriesSince).toBe(3);
    const [row] = await database.db('quarter_counter').where({ centre_id: centre.id }).select<{ quarter_at: Date; deliveries: number }[]>('quarter_at', 'deliveries');
    expect([row?.quarter_at.getTime(), row?.deliveries]).toEqual([Math.floor(at / (15 * MIN)) * 15 * MIN, 3]);
    expect((await device.send([{ type: 'lane.counted', data: { lane: 1, deliveries: 3 }, time: at, id: 'old', source: 's' }])).body.duplicates).toBe(1);
    expect((await ask(server.url, 'POST', `${path}/apply`, { cookie: manager.cookie, body: { events: [{ source: 's', id: 'old' }] } })).body).toMatchObject({ applied: 0 });
  });

  it('corrects a clock that is six minutes wrong, keeps both times and shows the fault', async () => {
    const fast = clock.now() + 6 * MIN;
    const answer = await device.send([{ type: 'lane.opened', data: { lane: 1 }, time: fast, id: 'skewed' }], { 'Gateway-Time': iso(fast) });
    expect(answer.body.accepted).toBe(1);
    expect((await lane(1)).use?.from).toBe(clock.now());
    const [row] = await database.db('journal').where({ centre_id: centre.id, id: 'skewed' }).select('time_at', 'time_sent');
    expect([row?.time_at.getTime(), row?.time_sent?.getTime()]).toEqual([clock.now(), fast]);
    expect(await gateway()).toMatchObject({ clockErrorMs: 6 * MIN, faults: [expect.stringContaining('6 min fast')] });
    await device.send([{ type: 'gateway.heartbeat' }], { 'Gateway-Time': iso(clock.now() + 5_000) });
    expect((await gateway()).faults).toEqual([]);
  });

  it('names the numbers that a source skipped', async () => {
    const numbered = (n: number): EventGiven => ({ type: 'gateway.heartbeat', sequence: String(n) });
    await device.send([numbered(1040), numbered(1044)]);
    expect((await gateway()).missing).toBe('missing 1041–1043');
    await device.send([numbered(1042), numbered(1041), numbered(1043)]);
    expect((await gateway()).missing).toBeNull();
  });

  it('calls a gateway silent after 90 s', async () => {
    await device.send([{ type: 'gateway.heartbeat' }]);
    clock.advance(90_000);
    expect((await gateway()).silent).toBe(false);
    clock.advance(1);
    expect((await gateway()).silent).toBe(true);
  });

  describe('refuses with a problem document', () => {
    const one = () => JSON.stringify(device.event({ type: 'lane.closed', data: { lane: 1 } }));
    const single = { 'Content-Type': 'application/cloudevents+json' };
    const deep = () => `{"specversion":"1.0","id":"d","source":"s","type":"t","data":${'['.repeat(30_000)}${']'.repeat(30_000)}}`;
    const cases: [string, number, string, () => [string | Buffer, Record<string, string>?]][] = [
      ['no key', 401, 'gateway.key-required', () => [one(), { ...single, Authorization: '' }]],
      ['a key of nobody', 401, 'gateway.key-required', () => [one(), { ...single, Authorization: 'Bearer lwg_nobody' }]],
      ['plain JSON', 415, 'events.type', () => [one(), { 'Content-Type': 'application/json' }]],
      ['another charset', 415, 'events.type', () => [one(), { 'Content-Type': 'application/cloudevents+json; charset=latin1' }]],
      ['no JSON', 400, 'events.not-json', () => ['{"a":', single]],
      ['broken UTF-8', 400, 'events.not-json', () => [Buffer.from([0x22, 0xff, 0x22]), single]],
      ['an object as a batch', 400, 'events.not-cloudevents', () => [one()]],
      ['a list as one', 400, 'events.not-cloudevents', () => [`[${one()}]`, single]],
      ['an object that is no CloudEvent', 400, 'events.not-cloudevents', () => ['{"hello":1}', single]],
      ['endless nesting', 400, 'events.not-cloudevents', () => [deep(), single]],
      ['1,001 events', 413, 'events.too-large', () => [`[${Array.from({ length: 1_001 }, () => '{}').join(',')}]`]],
      ['more than 1 MiB', 413, 'events.too-large', () => [`[${JSON.stringify('x'.repeat(1_048_577))}]`]],
      ['one of more than 64 KiB', 413, 'events.too-large', () => [JSON.stringify([device.event({ type: 'lane.closed', data: { lane: 1, x: 'x'.repeat(65_536) } })])]],
      ['a Gateway-Time that is none', 400, 'events.gateway-time', () => [one(), { ...single, 'Gateway-Time': 'noon' }]],
    ];
    it.each(cases)('%s', async (_name, status, code, make) => {
      const [body, headers] = make();
      const answer = await device.post(body, headers);
      expect([answer.status, answer.body.code]).toEqual([status, code]);
      expect(answer.headers.get('content-type')).toContain('application/problem+json');
      expect(answer.body.title).not.toBe(code);
      expect(await journal()).toBe(0);
    });

    it('a revoked key, at once, while the other lives', async () => {
      const manager = await signedIn(server.url, server.slices.accounts, { centre, role: 'manager' });
      const base = `/api/centres/${centre.slug}/settings`;
      const rotated = await ask(server.url, 'POST', `${base}/gateways/${device.gateway}/keys`, { cookie: manager.cookie });
      expect(rotated.status).toBe(201);
      const { key, gateway: { keys } } = rotated.body as { key: string; gateway: { keys: { id: string }[] } };
      expect(keys).toHaveLength(2);
      expect((await ask(server.url, 'POST', `${base}/gateways/${device.gateway}/keys`, { cookie: manager.cookie })).status).toBe(409);
      const second = deviceAt(server.url, key, device.gateway, () => clock.now());
      expect((await device.send([{ type: 'gateway.heartbeat' }])).status).toBe(200);
      expect((await second.send([{ type: 'gateway.heartbeat' }])).status).toBe(200);
      expect((await ask(server.url, 'DELETE', `${base}/gateways/${device.gateway}/keys/${keys[0]!.id}`, { cookie: manager.cookie })).status).toBe(200);
      expect((await device.send([{ type: 'gateway.heartbeat' }])).status).toBe(403);
      expect((await second.send([{ type: 'gateway.heartbeat' }])).status).toBe(200);
    });

    it('requests beyond a key’s rate, and says when to come again', async () => {
      const slow = await startServer({ db: database.db, clock, ingestRate: { perSecond: 0.05, burst: 3 } });
      const target = deviceAt(slow.url, device.key, device.gateway, () => clock.now());
      const statuses: number[] = [];
      for (let i = 0; i < 4; i += 1) statuses.push((await target.post('[]')).status);
      expect(statuses).toEqual([200, 200, 200, 429]);
      const refused = await target.post('[]');
      expect(Number(refused.headers.get('retry-after'))).toBeGreaterThanOrEqual(19);
      await slow.close();
    });

    it('anything but POST', async () => {
      const response = await fetch(`${server.url}/api/ingest/events`, { headers: { Authorization: `Bearer ${device.key}` } });
      expect([response.status, response.headers.get('allow')]).toEqual([405, 'POST']);
    });
  });

  it('answers any JSON with 200 or a problem, never with 5xx', async () => {
    const open = await startServer({ db: database.db, clock, ingestRate: { perSecond: 1e6, burst: 1e6 } });
    const target = deviceAt(open.url, device.key, device.gateway, () => clock.now());
    const field = fc.oneof(fc.jsonValue(), fc.string({ unit: 'binary' }), fc.constantFrom(null, '', '\ud800', 'x'.repeat(300), -0, 1e308, '\u0000'));
    const element = fc.oneof(
      fc.jsonValue(),
      fc.record({ specversion: fc.oneof(fc.constant('1.0'), field), id: field, source: field, type: fc.oneof(fc.constantFrom('lane.opened', 'lane.counted', 'run.lane.dressed', 'machine.levels', 'constructor'), field), time: fc.oneof(fc.constant(iso(clock.now())), field), sequence: field,
        data: fc.oneof(fc.record({ lane: field, machine: field, run: field, deliveries: field, label: field, startedAt: field, finishedAt: field }, { requiredKeys: [] }), field) }, { requiredKeys: [] }),
    );
    await fc.assert(fc.asyncProperty(fc.array(element, { maxLength: 12 }), async (elements) => {
      const { status, body } = await target.post(JSON.stringify(elements));
      expect(status).toBe(200);
      expect(body.accepted + body.duplicates + body.setAside.length).toBe(elements.length);
    }), { numRuns: 150 });
    await open.close();
  });
});
