import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { tryLock, unlock, withLock } from './lock.mjs';

let folder: string;
let file: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'lanewright-lock-'));
  file = join(folder, 'lock');
});
afterEach(() => rmSync(folder, { recursive: true }));

const HOLDER = `import { tryLock } from ${JSON.stringify(new URL('./lock.mjs', import.meta.url).href)};
console.log(tryLock(process.argv[1])); setInterval(() => {}, 1000);`;

/** Another process that takes the lock and keeps it. */
async function holder() {
  const child = spawn(process.execPath, ['--input-type=module', '-e', HOLDER, file], { cwd: fileURLToPath(new URL('.', import.meta.url)), stdio: ['ignore', 'pipe', 'inherit'] });
  const [said] = (await once(child.stdout, 'data')) as [Buffer];
  return { child, said: Number(said.toString()) };
}

test('it is ours, and nobody else’s, until it is given back', async () => {
  expect(tryLock(file)).toBe(0);
  const other = await holder();
  expect(other.said).toBe(process.pid);
  other.child.kill('SIGKILL');
  unlock(file);
  expect(tryLock(file)).toBe(0);
});

test('a holder that was killed holds nothing; one that lives does', async () => {
  const other = await holder();
  expect(other.said).toBe(0);
  expect(tryLock(file)).toBe(other.child.pid);
  other.child.kill('SIGKILL');
  await once(other.child, 'exit');
  expect(tryLock(file)).toBe(0);
  expect(readdirSync(folder)).toEqual(['lock']);
});

test('the number of a process used again by another is not the holder', () => {
  writeFileSync(file, `${process.pid} 1`);
  expect(tryLock(file)).toBe(0);
});

test('work under the lock never overlaps', async () => {
  let inside = 0;
  let most = 0;
  const work = async () => {
    inside += 1;
    most = Math.max(most, inside);
    await new Promise((resolve) => setTimeout(resolve, 5));
    inside -= 1;
  };
  await Promise.all(Array.from({ length: 5 }, () => withLock(file, work)));
  expect(most).toBe(1);
});
