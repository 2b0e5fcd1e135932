import type { Knex } from 'knex';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Server } from 'socket.io';
import { io, type Socket } from 'socket.io-client';
import { systemClock } from '#server/platform/clock.ts';
import { median } from '#shared/domain/numbers/percentiles.ts';
import { signedIn } from '#tests/support/actors.ts';
import { aCentre } from '#tests/support/builders.ts';
import { aDevice } from '#tests/support/device.ts';
import { startServer } from '#tests/support/server.ts';
import { type Figure, figure } from './figure.ts';

const SOCKETS = 100;
const ROUNDS = 20;

const connected = (socket: Socket): Promise<void> => new Promise((resolve, reject) => {
  socket.once('connect', resolve);
  socket.once('connect_error', reject);
});
const all = (sockets: readonly Socket[], event: string): Promise<unknown> => Promise.all(sockets.map((s) => new Promise((resolve) => { s.once(event, resolve); })));

/** Median ms from `start` until every socket has heard `event`. */
async function heardIn(sockets: readonly Socket[], event: string, start: () => unknown): Promise<number> {
  const times: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    const heard = all(sockets, event);
    const began = performance.now();
    await start();
    await heard;
    times.push(performance.now() - began);
  }
  return median(times).value ?? 0;
}

/** From the post of an event until a hundred screens have it (the relay ticks every 100 ms), against a bare emit to a hundred sockets. */
export async function benchFanout(db: Knex): Promise<Figure[]> {
  const server = await startServer({ db, clock: systemClock });
  const bare = createServer();
  const plain = new Server(bare, { transports: ['websocket'], perMessageDeflate: false });
  await new Promise<void>((resolve) => bare.listen(0, '127.0.0.1', resolve));
  const connect = (url: string, headers?: Record<string, string>) => io(url, { transports: ['websocket'], forceNew: true, reconnection: false, extraHeaders: headers });
  const sockets: Socket[] = [];
  try {
    const centre = await aCentre(server.slices.centre, { lanes: 32 });
    const device = await aDevice(server, centre);
    const { cookie } = await signedIn(server.url, server.slices.accounts, { centre, role: 'desk' });
    const screens = Array.from({ length: SOCKETS }, () => connect(server.url, { cookie }));
    const others = Array.from({ length: SOCKETS }, () => connect(`http://127.0.0.1:${(bare.address() as AddressInfo).port}`));
    sockets.push(...screens, ...others);
    await Promise.all(sockets.map(connected));
    await Promise.all(screens.map((s) => s.emitWithAck('watch', { centre: centre.slug })));
    let lane = 0;
    const post = () => device.sendOne({ type: 'lane.counted', data: { lane: (lane++ % 32) + 1, deliveries: 1 } });
    await heardIn(screens.slice(0, 1), 'floor.delta', post);
    const ours = await heardIn(screens, 'floor.delta', post);
    const theirs = await heardIn(others, 'floor.delta', () => plain.emit('floor.delta', { seq: 1, lanes: Array.from({ length: 10 }, (_, i) => ({ lane: i, text: 'twenty-four characters..' })) }));
    return [figure(`post of an event to ${SOCKETS} screens (tick of 100 ms in it) ÷ bare emit to ${SOCKETS} sockets`, 'ms, median', ours, theirs)];
  } finally {
    sockets.forEach((s) => s.close());
    await plain.close();
    await server.close();
  }
}
