import { setTimeout as pause } from 'node:timers/promises';
import { io, type Socket } from 'socket.io-client';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { FloorDelta, FloorSnapshot } from '#shared/contracts/floor.ts';
import type { Heartbeat, Topic } from '#shared/realtime/events.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { openDisplay, signedIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { aCentre } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { aDevice, type Device } from '#tests/support/device.ts';
import { served } from '#tests/support/served.ts';

type Reply = { ok: boolean; code?: string; rooms: string[] };

const clock = fixedClock('2026-05-14T18:00:00Z');
const { server } = await served({ clock });

describe('sockets', () => {
  let centre: CentreRef;
  let device: Device;
  const sockets: Socket[] = [];

  beforeEach(async () => {
    centre = await aCentre(server.slices.centre);
    device = await aDevice(server, centre);
  });
  afterEach(() => sockets.splice(0).forEach((socket) => socket.disconnect()));

  const open = (headers: Record<string, string>): Socket => {
    const socket = io(server.url, { transports: ['websocket'], extraHeaders: headers, forceNew: true, reconnection: false });
    sockets.push(socket);
    return socket;
  };
  const refusalOf = (socket: Socket) => new Promise<string>((resolve) => socket.once('connect_error', (error) => resolve(error.message)));
  const watch = async (cookie: string, slug = centre.slug): Promise<{ socket: Socket; reply: Reply }> => {
    const socket = open({ cookie });
    await new Promise<void>((resolve, reject) => socket.once('connect', resolve).once('connect_error', reject));
    const reply = await new Promise<Reply>((resolve) => socket.emit('watch', { centre: slug }, resolve));
    return { socket, reply };
  };
  const next = <T>(socket: Socket, event: string, fits: (payload: T) => boolean = () => true) => new Promise<T>((resolve, reject) => {
    const timer = setTimeout(() => reject(new Error(`no ${event}`)), 8_000);
    socket.on(event, (payload: T) => {
      if (!fits(payload)) return;
      clearTimeout(timer);
      resolve(payload);
    });
  });
  const member = (role: 'manager' | 'desk' | 'mechanic' | 'secretary', leagues?: string[]) => signedIn(server.url, server.slices.accounts, { centre, role, leagues });

  it('lets nobody in who isn’t signed in, or comes from another site', async () => {
    expect(await refusalOf(open({}))).toBe('session.required');
    const { cookie } = await member('desk');
    expect(await refusalOf(open({ cookie, origin: 'https://elsewhere.example' }))).not.toBe('');
  });

  it('puts each role into its rooms, and into none of another centre', async () => {
    const other = await aCentre(server.slices.centre);
    const league = '018f0000-0000-7000-8000-000000000001';
    for (const role of ['manager', 'desk', 'mechanic'] as const) {
      expect((await watch((await member(role)).cookie)).reply.rooms).toEqual([`floor:${centre.slug}`, `staff:${centre.slug}`, `league:${centre.slug}`]);
    }
    const secretary = await member('secretary', [league]);
    expect((await watch(secretary.cookie)).reply.rooms).toEqual([`floor:${centre.slug}`, `league:${centre.slug}:${league}`]);
    expect((await watch((await openDisplay(server.url, server.slices.accounts, centre)).cookie)).reply.rooms).toEqual([`floor:${centre.slug}`]);
    expect((await watch(secretary.cookie, other.slug)).reply).toEqual({ ok: false, code: 'centre.unknown', rooms: [] });
    expect((await watch(secretary.cookie, 'no-such-house')).reply.ok).toBe(false);
  });

  it('tells what changed after the number before, with the rows as they are now', async () => {
    const { cookie } = await member('desk');
    const { socket } = await watch(cookie);
    await pause(250);
    const snapshot = (await ask(server.url, 'GET', `/api/centres/${centre.slug}/floor`, { cookie })).body as FloorSnapshot;
    const told = next<FloorDelta>(socket, 'floor.delta');
    const hinted = next<{ topics: Topic[] }>(socket, 'hint');
    expect((await device.send([{ type: 'pinsetter.stopped', data: { lane: 3 } }])).body.accepted).toBe(1);
    const delta = await told;
    expect(delta).toMatchObject({ epoch: snapshot.epoch, seq: snapshot.seq + 1 });
    expect(delta.prevSeq).toBeLessThanOrEqual(snapshot.seq);
    expect(delta.lanes?.map(({ lane, machine }) => [lane, machine])).toContainEqual([3, 'stopped']);
    expect(delta.calls).toHaveLength(1);
    expect((await hinted).topics).toEqual(expect.arrayContaining(['floor', 'calls', 'sessions']));
  });

  it('joins a burst into few messages without a gap between them', async () => {
    const { socket } = await watch((await member('mechanic')).cookie);
    await pause(250);
    const deltas: FloorDelta[] = [];
    socket.on('floor.delta', (delta: FloorDelta) => deltas.push(delta));
    const before = (await server.deps.ledger.read(centre)).seq;
    for (let i = 0; i < 30; i += 1) await device.send([{ type: 'lane.counted', data: { lane: 1 + (i % 8), deliveries: 1 } }]);
    const { seq } = await server.deps.ledger.read(centre);
    for (let i = 0; i < 50 && deltas.at(-1)?.seq !== seq; i += 1) await pause(100);
    expect(seq).toBe(before + 30);
    expect(deltas.at(-1)?.seq).toBe(seq);
    expect(deltas.length).toBeLessThan(30);
    deltas.slice(1).forEach((delta, i) => expect(delta.prevSeq).toBe(deltas[i]?.seq));
  });

  it('beats every two seconds with the last number told', async () => {
    const { socket } = await watch((await member('desk')).cookie);
    await device.send([{ type: 'gateway.heartbeat' }]);
    const beat = await next<Heartbeat>(socket, 'heartbeat', (one) => one.gatewaysHeardAt !== null);
    expect(beat).toMatchObject({ database: 'ok', at: clock.now(), gatewaysHeardAt: clock.now(), epoch: (await server.deps.ledger.read(centre)).epoch });
  });

  it('cuts the sockets of a sign-in that ends, and of a link that is revoked, and no others', async () => {
    const [leaving, staying, manager] = [await member('desk'), await member('desk'), await member('manager')];
    const display = await openDisplay(server.url, server.slices.accounts, centre);
    const [a, b, wall] = [await watch(leaving.cookie), await watch(staying.cookie), await watch(display.cookie)];
    const gone = (socket: Socket) => new Promise<void>((resolve) => socket.once('disconnect', () => resolve()));
    const ended = gone(a.socket);
    await ask(server.url, 'DELETE', '/api/session', { cookie: leaving.cookie });
    await ended;
    const dark = gone(wall.socket);
    expect((await ask(server.url, 'DELETE', `/api/centres/${centre.slug}/displays/${display.id}`, { cookie: manager.cookie })).status).toBe(200);
    await dark;
    expect(b.socket.connected).toBe(true);
  });

  it('tells a secretary of the own league alone, and only that sessions changed', async () => {
    const secretary = await member('secretary', ['018f0000-0000-7000-8000-000000000001']);
    const { socket } = await watch(secretary.cookie);
    const hints: unknown[] = [];
    socket.on('hint', (hint) => hints.push(hint));
    await pause(250);
    await device.send([{ type: 'pinsetter.stopped', data: { lane: 3 } }]);
    await next<FloorDelta>(socket, 'floor.delta');
    await pause(200);
    // The league isn't one of this centre's: its room gets nothing, and the staff's hints stay with the staff.
    expect(hints).toEqual([]);
  });
});
