import { connect } from 'node:net';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { ownSettings, startProgram, type StartedProgram } from '#tests/support/started-program.ts';

/** The real start, demo off, through its day: up, refused twice over, its parts killed, stopped. In this order. */

let program: StartedProgram;
let settings: Record<string, string>;
const patience = { timeout: 30_000, interval: 100 };

beforeAll(async () => {
  settings = { ...(await ownSettings()), LANEWRIGHT_DEMO: 'off' };
  program = startProgram(settings);
  await program.printed(/Lanewright is at /);
}, 180_000);
afterAll(() => program.clear());

const isReady = async (): Promise<boolean> => {
  const answer = await fetch(`http://127.0.0.1:${program.port}/readyz`).catch(() => undefined);
  return answer?.status === 200;
};
const part = (pattern: RegExp): number => program.processes().find(({ command }) => pattern.test(command))?.pid ?? 0;
const answers = (port: number): Promise<boolean> =>
  new Promise((resolve) => {
    const socket = connect(port, '127.0.0.1', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });

test('its last line says where it is and how long that took, and it is ready', async () => {
  expect(program.output().trimEnd().split('\n').at(-1)).toMatch(new RegExp(`^Lanewright is at http://localhost:${program.port} \\(ready in \\d+\\.\\d s\\)$`));
  expect(await isReady()).toBe(true);
});

test('without the demo neither the gateway nor the mail catcher runs', () => {
  expect(part(/server\/main\.ts/)).toBeGreaterThan(0);
  expect(program.processes().filter(({ command }) => command.includes('server/fakes/'))).toEqual([]);
});

test('a second start from the same folder is refused, and the first goes on', async () => {
  const second = startProgram({ ...settings, PORT: '1' });
  expect(await second.ended).toBe(1);
  expect(second.output()).toContain(`DATA_DIR=${program.dataDir}: Lanewright already runs from it (process ${program.pid}).`);
  expect(await isReady()).toBe(true);
});

test('the server killed: started again by itself', async () => {
  const killed = part(/server\/main\.ts/);
  process.kill(killed, 'SIGKILL');
  await vi.waitFor(() => expect(part(/server\/main\.ts/)).not.toBe(killed), patience);
  await vi.waitFor(async () => expect(await isReady()).toBe(true), patience);
});

test('the database killed: started again by itself, once, and the server finds it', async () => {
  const killed = part(/mariadbd/);
  expect(killed).toBeGreaterThan(0);
  process.kill(killed, 'SIGKILL');
  await vi.waitFor(() => expect([0, killed]).not.toContain(part(/mariadbd/)), patience);
  await vi.waitFor(async () => expect(await isReady()).toBe(true), patience);
  expect(program.processes().filter(({ command }) => command.includes('mariadbd'))).toHaveLength(1);
});

test('TERM leaves nothing running and both ports free', async () => {
  process.kill(program.pid, 'SIGTERM');
  expect(await program.ended).toBe(0);
  expect(program.processes()).toEqual([]);
  expect([await answers(program.port), await answers(program.dbPort)]).toEqual([false, false]);
});
