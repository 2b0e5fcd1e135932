import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { createDatabase } from '#server/platform/db/database.ts';
import { isDatabaseAway } from '#server/platform/db/errors.ts';
import { ownDatabaseServer, type OwnDatabaseServer } from '#tests/support/database-server.ts';
import { isAlive } from '../../server/boot/processes.mjs';

/** The private MariaDB by itself. */

let server: OwnDatabaseServer;
beforeAll(async () => {
  server = await ownDatabaseServer();
});
afterAll(() => server.release());

test('killed under writes: it comes back by itself, and every row whose commit was answered is there', async () => {
  const db = createDatabase(server.url);
  await db.raw('create table kept (id int primary key) engine = InnoDB');
  const answered: number[] = [];
  let next = 0;
  let writing = true;
  const write = async () => {
    while (writing) {
      next += 1;
      const id = next;
      const error: unknown = await db('kept').insert({ id }).then(() => null, (reason: unknown) => reason);
      if (error === null) answered.push(id);
      else expect(isDatabaseAway(error)).toBe(true);
    }
  };
  const writers = Promise.all([write(), write(), write()]);
  for (let round = 0; round < 3; round += 1) {
    const before = answered.length;
    await vi.waitFor(() => expect(answered.length).toBeGreaterThan(before + 50), { timeout: 20_000 });
    const killed = server.pid();
    server.signal('SIGKILL');
    await vi.waitFor(() => expect([0, killed]).not.toContain(server.pid()), { timeout: 20_000 });
  }
  const last = answered.length;
  await vi.waitFor(() => expect(answered.length).toBeGreaterThan(last), { timeout: 20_000 });
  writing = false;
  await writers;
  const stored = new Set((await db('kept').pluck('id')) as number[]);
  expect(answered.filter((id) => !stored.has(id))).toEqual([]);
  await db.destroy();
});

const USER = `import { useDatabase } from ${JSON.stringify(new URL('../../server/boot/database-use.mjs', import.meta.url).href)};
const database = await useDatabase(process.argv[1], { small: true });
process.once('SIGTERM', () => database.release().then(() => process.exit(0)));
console.log(database.pid());
setInterval(() => {}, 1000);`;

async function user(base: string) {
  const child = spawn(process.execPath, ['--input-type=module', '-e', USER, base], { stdio: ['ignore', 'pipe', 'inherit'] });
  const [said] = (await once(child.stdout, 'data')) as [Buffer];
  return {
    database: Number(said.toString()),
    end: async (signal: NodeJS.Signals) => {
      child.kill(signal);
      await once(child, 'exit');
    },
  };
}

test('two that start at once share one server, and the last one out stops it', async () => {
  const base = mkdtempSync(join(tmpdir(), 'lanewright-shared-'));
  const [first, second] = await Promise.all([user(base), user(base)]);
  expect(second.database).toBe(first.database);
  await first.end('SIGTERM');
  expect(isAlive(first.database)).toBe(true);
  await second.end('SIGTERM');
  expect(isAlive(first.database)).toBe(false);
  rmSync(base, { recursive: true });
});

test('a user that was killed does not keep the server from being stopped by the next', async () => {
  const base = mkdtempSync(join(tmpdir(), 'lanewright-orphan-'));
  const killed = await user(base);
  await killed.end('SIGKILL');
  expect(isAlive(killed.database)).toBe(true);
  const next = await user(base);
  expect(next.database).toBe(killed.database);
  await next.end('SIGTERM');
  expect(isAlive(killed.database)).toBe(false);
  rmSync(base, { recursive: true });
  expect(existsSync(base)).toBe(false);
});
