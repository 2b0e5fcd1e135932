import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { compose } from '#server/compose.ts';
import { systemClock } from '#server/platform/clock.ts';
import { createDatabase, type Database } from '#server/platform/db/database.ts';
import { createLedger } from '#server/platform/journal/create-ledger.ts';
import { createLog } from '#server/platform/log.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { signedIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { aCentre } from '#tests/support/builders.ts';
import { ownDatabase } from '#tests/support/db.ts';
import { type Device, deviceAt } from '#tests/support/device.ts';
import { ownSettings, startProgram, type StartedProgram } from '#tests/support/started-program.ts';
import { testConfig } from '#tests/support/web.ts';
import { type DatabaseInUse, useDatabase } from '../../server/boot/database-use.mjs';

/** The real program under load: what it has acknowledged outlives -9 of the server and of the database. In this order. */

const ROOT = fileURLToPath(new URL('../../', import.meta.url));
const LANES = 8;
const BATCH = 10;
const patience = { timeout: 40_000, interval: 100 };
let program: StartedProgram;
let database: DatabaseInUse;
let db: Database;
let centre: CentreRef;
let mechanic: { cookie: string };
let key: string;
let gateway: Device;

beforeAll(async () => {
  program = startProgram({ ...(await ownSettings()), LANEWRIGHT_DEMO: 'off' });
  await program.printed(/Lanewright is at /);
  database = await useDatabase(program.dataDir, { port: program.dbPort });
  db = createDatabase(database.url);
  const deps = { db, clock: systemClock, ledger: createLedger({ db, clock: systemClock }), log: createLog('silent'), config: testConfig };
  const whole = compose(deps, null);
  centre = await aCentre(whole.slices.centre, { lanes: LANES, family: 'free-fall' });
  const url = `http://127.0.0.1:${program.port}`;
  mechanic = await signedIn(url, whole.slices.accounts, { centre, role: 'mechanic' });
  await whole.stop();
}, 180_000);
afterAll(async () => {
  await db?.destroy();
  await database?.release();
  await program.clear();
});

/** A command of package.json, as somebody at the machine runs it. */
function command(name: string, args: readonly string[], env: Record<string, string>): Promise<{ code: number | null; output: string; last: string }> {
  return new Promise((resolve) => {
    const file = name === 'replay:check' ? 'server/cli/replay-check.ts' : 'server/cli/gateway-key.ts';
    const child = spawn(process.execPath, ['server/boot/run.mjs', file, ...args], { cwd: ROOT, env: { ...process.env, NODE_ENV: '', ...env }, stdio: ['ignore', 'pipe', 'pipe'] });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) stream.on('data', (bytes: Buffer) => (output += bytes.toString()));
    child.once('close', (code) => resolve({ code, output, last: output.trimEnd().split('\n').at(-1) ?? '' }));
  });
}
const ofProgram = () => ({ DATA_DIR: program.dataDir, DB_PORT: String(program.dbPort), PORT: String(program.port) });

test('gateway:key prints its key alone on the last line, and the key opens the door; for a centre that isn’t there it says which there are', async () => {
  const made = await command('gateway:key', [centre.slug], ofProgram());
  expect(made.code).toBe(0);
  key = made.last;
  gateway = deviceAt(`http://127.0.0.1:${program.port}`, key, '', () => Date.now());
  const { status, body } = await gateway.sendOne({ type: 'gateway.started', id: 'first' });
  expect([status, body.accepted]).toEqual([200, 1]);
  const unknown = await command('gateway:key', ['nowhere'], ofProgram());
  expect(unknown.code).toBe(1);
  expect(unknown.output).toContain(centre.slug);
});

interface Kept {
  events: Set<string>;
  calls: Set<string>;
  refused: number;
}

/** Sends without a pause until told to stop; what has no answer is sent again with the same ids, as a gateway does. */
async function load(from: number, kept: Kept, going: () => boolean): Promise<void> {
  for (let round = 0; going(); round += 1) {
    const events = Array.from({ length: BATCH }, (_, i) => ({ type: 'lane.counted', id: `${from}-${round}-${i}`, source: `load/${from}`, data: { lane: 1 + (i % LANES), deliveries: 1, frames: 1, basis: 'scored' }, time: Date.now() - 1000 }));
    for (let sent = false; !sent && going(); ) {
      const answer = await gateway.send(events).catch(() => null);
      sent = answer?.status === 200 && answer.body.accepted + answer.body.duplicates === BATCH;
      if (sent) for (const { id } of events) kept.events.add(id);
      else {
        kept.refused += 1;
        await new Promise((done) => setTimeout(done, 60));
      }
    }
  }
}

/** A mechanic who raises calls with a key each, and repeats what has no answer. */
async function person(kept: Kept, going: () => boolean): Promise<void> {
  for (let n = 0; going(); n += 1) {
    const [lane, equipment] = [1 + (n % LANES), ['masking', 'console', 'foul-unit', 'scoring'][Math.floor(n / LANES) % 4]];
    const answer = await ask(`http://127.0.0.1:${program.port}`, 'POST', `/api/centres/${centre.slug}/calls`, { cookie: mechanic.cookie, body: { lane, equipment }, headers: { 'idempotency-key': `raise-${n}` } }).catch(() => null);
    if (answer?.status === 201) kept.calls.add((answer.body as { id: string }).id);
    await new Promise((done) => setTimeout(done, 40));
  }
}

const part = (pattern: RegExp): number => program.processes().find(({ command: line }) => pattern.test(line))?.pid ?? 0;
const isReady = async (): Promise<boolean> => (await fetch(`http://127.0.0.1:${program.port}/readyz`).catch(() => null))?.status === 200;

async function killed(pattern: RegExp): Promise<void> {
  const pid = part(pattern);
  expect(pid).toBeGreaterThan(0);
  process.kill(pid, 'SIGKILL');
  await vi.waitFor(() => expect([0, pid]).not.toContain(part(pattern)), patience);
  await vi.waitFor(async () => expect(await isReady()).toBe(true), patience);
}

test('killed with -9 under load, server and database, nothing acknowledged is lost and nothing is there twice', async () => {
  const kept: Kept = { events: new Set(), calls: new Set(), refused: 0 };
  let on = true;
  const workers = [...[1, 2, 3, 4].map((n) => load(n, kept, () => on)), person(kept, () => on)];
  const more = (by: number) => {
    const wanted = kept.events.size + by;
    return vi.waitFor(() => expect(kept.events.size).toBeGreaterThan(wanted), patience);
  };
  await more(300);
  await killed(/server\/main\.ts/);
  await more(300);
  await killed(/mariadbd/);
  await more(300);
  on = false;
  await Promise.all(workers);
  expect(kept.refused).toBeGreaterThan(0);
  const rows = await db('journal').where({ centre_id: centre.id }).where('source', 'like', 'load/%').select<{ source: string; id: string }[]>('source', 'id');
  const there = rows.map((row) => row.id);
  expect(new Set(there).size).toBe(there.length);
  expect([...kept.events].filter((id) => !there.includes(id))).toEqual([]);
  const calls = await db('call').where({ centre_id: centre.id }).select<{ raises: string }[]>('*');
  const known = JSON.stringify(calls.map((row) => Object.values(row).map((value) => (Buffer.isBuffer(value) ? value.toString('hex') : value))));
  expect(kept.calls.size).toBeGreaterThan(0);
  expect([...kept.calls].filter((id) => !known.includes(id) && !known.includes(id.replaceAll('-', '')))).toEqual([]);
}, 180_000);

test('replay:check says what it read; one altered field of a row ends it with 1 and its name; nothing to read ends it with 2', async () => {
  const sound = await command('replay:check', [], ofProgram());
  expect(sound.last).toMatch(/^\d+ events read, \d+ rows compared, 0 differences$/);
  expect(Number(sound.last.split(' ')[0])).toBeGreaterThan(900);
  expect(sound.code).toBe(0);
  const altered: [table: string, field: string, value: string | number][] = [['lane_state', 'deliveries_since', 4_000_000], ['quarter_counter', 'frames', 4_000_000], ['call', 'text', 'never said']];
  for (const [table, field, value] of altered) {
    const first = () => db(table).where({ centre_id: centre.id }).limit(1);
    const before: Record<string, unknown> = await first().first(field);
    await first().update({ [field]: value });
    const found = await command('replay:check', [], ofProgram());
    expect([found.code, found.output], `${table}.${field}`).toEqual([1, expect.stringMatching(new RegExp(`${table}.*${field}`))]);
    await first().update({ [field]: before[field] });
  }
  const empty = await ownDatabase();
  expect(await command('replay:check', [], { ...ofProgram(), DATABASE_URL: empty.url })).toMatchObject({ code: 2, last: '0 events read, 0 rows compared, 0 differences' });
  await empty.close();
}, 120_000);
