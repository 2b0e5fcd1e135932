import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import type { RunDetail } from '#shared/contracts/runs.ts';
import { type Answer, ask } from './ask.ts';
import { countRows } from './builders.ts';
import type { EventGiven } from './device.ts';
import { floorHouse } from './floor-house.ts';
import { good } from './league-house.ts';
import type { TestServer } from './server.ts';

type Somebody = { cookie: string };

/** A house of twelve lanes with its lane machine, and what tests do with runs there; `at` gives the instant so many minutes after the test's start. */
export async function runsHouse(server: TestServer, at: (minutes: number) => number) {
  const given = await floorHouse(server, 12);
  const go = (who: Somebody, method: string, path: string, body?: unknown): Promise<Answer> => ask(server.url, method, `/api/centres/${given.centre.slug}${path}`, { cookie: who.cookie, body });
  const runs = async (date?: string) => (good(await go(given.desk, 'GET', date ? `/runs?date=${date}` : '/runs')).body as { date: string; runs: RunDetail[] }).runs;
  const floor = async () => good(await go(given.desk, 'GET', '/floor')).body as FloorSnapshot;
  const laneOf = async (lane: number) => (await floor()).lanes.find((one) => one.lane === lane);
  const plan = (change: object = {}) => go(given.mechanic, 'POST', '/runs/planned', { machine: 'm1', pattern: 'house', lanes: [1, 2, 3, 4], startAt: at(30), ...change });
  const record = (change: object = {}) => go(given.mechanic, 'POST', '/runs', { machine: 'm1', pattern: 'house', startedAt: at(-40), finishedAt: at(-20), lanes: [{ lane: 1, outcome: 'dressed' }, { lane: 2, outcome: 'dressed' }], ...change });
  const cancel = (run: string, who: Somebody = given.mechanic) => go(who, 'POST', `/runs/m1/${run}/cancel`, { reason: 'League called off' });
  const send = async (...events: EventGiven[]) => {
    const { body } = await given.gateway.send(events);
    if (body.accepted !== events.length || body.setAside.length > 0) throw new Error(`not accepted: ${JSON.stringify(body)}`);
  };
  const written = async () => Promise.all(['journal', 'run', 'run_lane'].map((table) => countRows(server.deps.db, table, given.centre)));
  return { ...given, go, runs, floor, laneOf, plan, record, cancel, send, written };
}

/** What the lane machine m1 tells of its runs. */
export function runEvents(at: (minutes: number) => number) {
  const started = (run: string, lanes: number[], minutes: number, more: object = {}): EventGiven => ({ type: 'run.started', data: { machine: 'm1', run, pattern: 'house', revision: 1, lanes, ...more }, time: at(minutes) });
  const dressed = (run: string, lane: number, minutes: number, more: object = {}): EventGiven => (
    { type: 'run.lane.dressed', data: { machine: 'm1', run, lane, startedAt: new Date(at(minutes - 2)).toISOString(), finishedAt: new Date(at(minutes)).toISOString(), ...more }, time: at(minutes) });
  const skipped = (run: string, lane: number, minutes: number): EventGiven => ({ type: 'run.lane.skipped', data: { machine: 'm1', run, lane, reason: 'occupied' }, time: at(minutes) });
  return { started, dressed, skipped };
}
