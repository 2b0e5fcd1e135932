import { createServer, type Server as HttpServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import express from 'express';
import { type CDPSession, chromium, type Page } from 'playwright-core';
import { Server } from 'socket.io';
import type { Identity } from '#shared/contracts/accounts.ts';
import type { FloorDelta, FloorSnapshot, LaneView } from '#shared/contracts/floor.ts';
import { CHROMIUM } from '#tests/support/browser.ts';

const DIST = fileURLToPath(new URL('../../dist', import.meta.url));
const LANES = 80;
const UPDATES_A_LANE = 5;
/** The relay's tick: what changed within it travels as one message. */
const TICK_MS = 100;
const MEASURED_MS = 10_000;
const SETTLE_MS = 3_000;
const CENTRE = 'bench';

export interface BoardBench {
  lanes: number;
  updatesPerSecond: number;
  /** Main-thread time, ms per second: the floor under load, the floor at rest, a bare page that takes the same messages. */
  msPerSecond: number;
  restMsPerSecond: number;
  bareMsPerSecond: number;
  /** Floor under load ÷ bare page. */
  ratio: number;
}

/** Only what a delivery changes changes: times of the past stay. */
function laneAt(lane: number, deliveries: number, began: number): LaneView {
  return {
    lane, use: { kind: 'league', label: 'Bench League', since: began - 3_600_000, until: null, bowlers: 4, games: 3, session: null, quiet: false },
    progress: { game: 1 + (deliveries % 3), frame: 1 + (deliveries % 10) }, bumpers: false, machine: lane % 16 === 0 ? 'stopped' : 'running', stoppedSince: lane % 16 === 0 ? began - 90_000 : null, pins: null,
    outOfService: null, call: lane % 16 === 0 ? { id: '0190a000-0000-7000-8000-000000000001', status: 'unanswered', since: began - 90_000, equipment: 'pinsetter', safety: null, returned: false } : null, mechanicIn: null,
    film: { lengthFt: 41, strength: Math.max(0.1, 1 - deliveries / 2000), deliveries, at: began - 3_600_000, pattern: 'bench', revision: 1, verified: true, freshness: 'fresh' },
    brokenOff: false, dressing: null, unheard: false, hearsDeliveries: true,
  };
}

const laneNumbers = Array.from({ length: LANES }, (_, i) => i + 1);

function snapshotAt(seq: number, now: number, round: number, began: number): FloorSnapshot {
  return {
    epoch: 'bench', seq, at: now, centre: { slug: CENTRE, name: 'Bench House', zone: 'UTC', lanes: LANES }, business: { date: '2026-05-14', from: now - 1, to: now + 1 },
    lanes: laneNumbers.map((lane) => laneAt(lane, round, began)), calls: [], sessions: [], runs: [], machines: [], gateways: [],
    tonight: { lanes: LANES, inUse: LANES, occupancyPct: 100, frames: 0, framesEstimated: 0, deliveries: 0, stops: 0, rate: null },
  };
}

/** Takes the same messages over the same kind of socket and sets one text a lane: what no board can do without. */
const BARE = `<!doctype html><title>bare</title>${laneNumbers.map((n) => `<b id="l${n}"></b>`).join('')}<script src="/socket.io/socket.io.js"></script>
<script>const s = io({ transports: ['websocket'] }); s.on('floor.delta', (d) => { for (const l of d.lanes) document.getElementById('l' + l.lane).textContent = l.film.deliveries; }); s.on('connect', () => s.emit('watch', { centre: '${CENTRE}' }, () => {}));</script>`;

interface Source {
  url: string;
  /** Begins or stops the updates. */
  run(on: boolean): void;
  close(): Promise<void>;
}

/** Speaks what the server speaks to a screen, and nothing else, so that only the screen is measured. */
async function source(): Promise<Source> {
  const app = express();
  const me: Identity = { kind: 'user', id: '0190a000-0000-7000-8000-000000000002', name: 'Bench', email: 'bench@house.test', centres: [{ slug: CENTRE, name: 'Bench House', zone: 'UTC', cut: 240, role: 'desk', leagues: [] }] };
  const began = Date.now();
  let [seq, round, on] = [1, 0, false];
  app.get('/api/me', (_, response) => void response.json(me));
  app.get(`/api/centres/${CENTRE}/floor`, (_, response) => void response.json(snapshotAt(seq, Date.now(), round, began)));
  app.get(`/api/centres/${CENTRE}/calls`, (_, response) => void response.json({ open: [], closed: [] }));
  app.get('/bare', (_, response) => void response.type('html').send(BARE));
  app.use(express.static(DIST, { index: false }));
  app.use((_, response) => response.sendFile('index.html', { root: DIST }));
  const server: HttpServer = createServer(app);
  const io = new Server(server, { perMessageDeflate: false });
  const beat = setInterval(() => io.emit('heartbeat', { epoch: 'bench', seq, at: Date.now(), database: 'ok', gatewaysHeardAt: Date.now() }), 2000);
  const updates = setInterval(() => {
    if (!on) return;
    round += 1;
    const lanes = laneNumbers.filter((lane) => lane % 2 === round % 2).map((lane) => laneAt(lane, round, began));
    const delta: FloorDelta = { epoch: 'bench', prevSeq: seq, seq: seq + 1, at: Date.now(), lanes };
    seq += 1;
    io.emit('floor.delta', delta);
  }, TICK_MS);
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    run: (next) => (on = next),
    async close() {
      clearInterval(beat);
      clearInterval(updates);
      await io.close();
    },
  };
}

/** Main-thread time of a page over the measured span, ms per second (Chromium's TaskDuration). */
async function mainThread(page: Page): Promise<number> {
  const cdp: CDPSession = await page.context().newCDPSession(page);
  await cdp.send('Performance.enable');
  const read = async () => (await cdp.send('Performance.getMetrics')).metrics.find((m) => m.name === 'TaskDuration')?.value ?? 0;
  await page.waitForTimeout(SETTLE_MS);
  const [before, began] = [await read(), performance.now()];
  await page.waitForTimeout(MEASURED_MS);
  return ((await read()) - before) * 1000 / ((performance.now() - began) / 1000);
}

/** 80 lanes, each updated five times a second: how much of a second the floor keeps the main thread busy. Needs a built client. */
export async function benchBoard(): Promise<BoardBench> {
  const from = await source();
  const browser = await chromium.launch(CHROMIUM);
  try {
    const page = await browser.newPage({ viewport: { width: 1920, height: 1080 } });
    await page.goto(`${from.url}/${CENTRE}/floor`);
    await page.locator(`[data-lane="${LANES}"]`).waitFor();
    await page.waitForTimeout(SETTLE_MS);
    const restMsPerSecond = await mainThread(page);
    from.run(true);
    const msPerSecond = await mainThread(page);
    const shown = await page.locator('[data-lane="1"] .balls').textContent();
    if (Number(shown) < 10) throw new Error('the board shows no updates');
    await page.goto(`${from.url}/bare`);
    const bareMsPerSecond = await mainThread(page);
    return { lanes: LANES, updatesPerSecond: LANES * UPDATES_A_LANE, msPerSecond, restMsPerSecond, bareMsPerSecond, ratio: msPerSecond / bareMsPerSecond };
  } finally {
    await browser.close();
    await from.close();
  }
}
