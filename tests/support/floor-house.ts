import type { LeagueForm } from '#shared/contracts/leagues.ts';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import { wallOf, weekdayOf } from '#shared/domain/business-day.ts';
import { signedIn } from './actors.ts';
import { type Answer, ask } from './ask.ts';
import { aCentre } from './builders.ts';
import { aDevice, type Device } from './device.ts';
import { eveningZone } from './league-evening.ts';
import { aRevision, CAN } from './sample-house.ts';
import type { TestServer } from './server.ts';

const MIN = 60_000;

/** A house with its gateway, a lane machine and two patterns, and somebody of the staff's roles signed in. It is about six in the evening there. */
export async function floorHouse(server: TestServer, lanes: number) {
  const { slices } = server;
  const zone = eveningZone(server.deps.clock.now());
  const centre = await aCentre(slices.centre, { lanes, name: 'Tarn Ferry Bowl', zone, family: 'free-fall' });
  await slices.runs.addPattern(centre, { code: 'house', name: 'House', revision: aRevision(40), by: 'test' });
  await slices.runs.addPattern(centre, { code: 'owls', name: 'Night Owls', revision: { ...aRevision(45), lengthFt: 44 }, by: 'test' });
  await slices.runs.addMachine(centre, { code: 'm1', name: 'Machine 1', capabilities: CAN });
  const come = (role: 'desk' | 'mechanic' | 'manager') => signedIn(server.url, slices.accounts, { centre, role });
  const [desk, mechanic, manager] = [await come('desk'), await come('mechanic'), await come('manager')];
  const gateway: Device = await aDevice(server, centre);
  async function device<T extends keyof DeviceData>(type: T, data: object, ago = 0): Promise<void> {
    const { body } = await gateway.sendOne({ type, data, time: server.deps.clock.now() - ago });
    if (body.accepted !== 1) throw new Error(`not accepted: ${JSON.stringify(body)}`);
  }
  async function as(who: { cookie: string }, method: string, path: string, body?: unknown): Promise<Answer['body']> {
    const answer = await ask(server.url, method, `/api/centres/${centre.slug}${path}`, { cookie: who.cookie, body });
    if (answer.status >= 300) throw new Error(`${method} ${path}: ${answer.status} ${JSON.stringify(answer.body)}`);
    return answer.body;
  }
  /** A league whose only night begins in so many minutes (negative: it bowls already); its id and the session's. */
  async function league(change: Partial<LeagueForm> & { name: string; inMinutes: number }): Promise<{ league: string; session: string }> {
    const { inMinutes, ...form } = change;
    const start = wallOf(server.deps.clock.now() + inMinutes * MIN, zone);
    const id = await slices.leagues.createLeague(centre, {
      weekday: weekdayOf(start.date), startMinutes: start.minutes, warmUpMinutes: 10, fromLane: 1, toLane: 4, teams: 4, bowlersATeam: 4, games: 3, absent: 0, crossesLanes: true,
      firstDate: start.date, lastDate: start.date, skipDates: [], pattern: 'owls', revision: 1, fresh: false, sanctioned: false, ...form,
    }, { now: server.deps.clock.now() - 3 * 60 * MIN });
    const [session] = (await slices.leagues.sessionsOfDate(centre, start.date)).filter((one) => one.leagueId === id);
    if (!session) throw new Error('the league made no session');
    return { league: id, session: session.id };
  }
  return { centre, desk, mechanic, manager, gateway, device, as, league, at: (path: string) => `/${centre.slug}${path}` };
}
export type FloorHouse = Awaited<ReturnType<typeof floorHouse>>;

const pinsetters = (lanes: readonly number[], now: number, device: Device) => device.send(lanes.map((lane) => ({ type: 'pinsetter.on', data: { lane }, time: now - 90 * MIN })));

/** Dresses lanes one after the other at two minutes each, the last one `endedAgo` ms ago. */
async function dress({ gateway }: FloorHouse, now: number, { run, pattern, lanes, endedAgo }: { run: string; pattern: string; lanes: readonly number[]; endedAgo: number }): Promise<void> {
  const end = now - endedAgo;
  const startOf = (i: number) => end - (lanes.length - i) * 2 * MIN;
  await gateway.send([
    { type: 'run.started', data: { machine: 'm1', run, pattern, revision: 1, lanes }, time: startOf(0) - 1 },
    ...lanes.map((lane, i) => ({ type: 'run.lane.dressed', data: { machine: 'm1', run, lane, startedAt: new Date(startOf(i)).toISOString(), finishedAt: new Date(startOf(i + 1)).toISOString() }, time: startOf(i + 1) })),
    { type: 'run.finished', data: { machine: 'm1', run }, time: end + 1 },
  ]);
}

/** Everything at once that the first eight lanes can show, every kind of play on the rest: the fullest picture of a house. */
export async function busyHouse(server: TestServer, lanes: number) {
  const house = await floorHouse(server, lanes);
  const { gateway, device, as, mechanic, desk } = house;
  const now = server.deps.clock.now();
  const all = Array.from({ length: lanes }, (_, i) => i + 1);
  await pinsetters(all.slice(0, -1), now, gateway);
  await dress(house, now, { run: '117', pattern: 'house', lanes: all, endedAgo: 40 * MIN });
  if (lanes > 8) {
    await house.league({ name: 'Thursday Scratch', fromLane: 9, toLane: Math.min(16, lanes), inMinutes: -50, pattern: 'house' });
    await house.league({ name: 'Early Birds of the Ferry', fromLane: 21, toLane: 28, inMinutes: 70 });
  }
  const late = await house.league({ name: 'Night Owls', fromLane: 5, toLane: 8, inMinutes: 65, crossesLanes: true });
  const opened = all.flatMap((lane) => (lane > 16 && lane % 7 !== 0 ? [{ lane, use: lane % 5 === 0 ? 'party' : 'open', ...(lane % 5 === 0 ? { label: 'Marchbank', bumpers: true } : {}), bowlers: 4, until: new Date(now + 48 * MIN).toISOString() }] : lane > 8 && lane <= 16 ? [{ lane, use: 'league' }] : []));
  await gateway.send(opened.map((data) => ({ type: 'lane.opened', data, time: now - 35 * MIN })));
  await gateway.send(all.map((lane) => ({ type: 'lane.counted', data: { lane, deliveries: 3 * lane, frames: 2 * lane, basis: 'scored' }, time: now - 5 * MIN })));
  await device('lane.opened', { lane: 1, use: 'party', label: 'Odell and friends', until: new Date(now + 33 * MIN).toISOString() }, 20 * MIN);
  await device('pinsetter.stopped', { lane: 1, pins: [7, 10], text: 'Deck jam' }, 192_000);
  await device('equipment.faulted', { lane: 3, equipment: 'ball-return' }, 75 * MIN);
  await device('pinsetter.stopped', { lane: 5 }, 12 * MIN);
  await device('pinsetter.restarted', { lane: 5 }, 10 * MIN);
  await device('pinsetter.stopped', { lane: 6 }, 47 * MIN);
  await device('pinsetter.off', { lane: 7 }, 3 * MIN);
  const open = (await as(mechanic, 'GET', '/calls')) as { open: { id: string; lane: number }[] };
  const callOn = (lane: number) => open.open.find((call) => call.lane === lane)?.id ?? '';
  await as(mechanic, 'POST', `/calls/${callOn(6)}/acknowledge`);
  await as(mechanic, 'POST', `/calls/${callOn(6)}/on-lane`);
  await as(mechanic, 'POST', `/calls/${callOn(6)}/lockout`);
  for (const step of ['told-desk', 'machine-stopped', 'neighbour-balls', 'machine-isolated', 'lift-isolated', 'lock-and-tag', 'energy-released', 'try']) await as(mechanic, 'POST', `/calls/${callOn(6)}/lockout/step`, { step, done: true });
  await as(desk, 'POST', '/lanes/8/out-of-service', { reason: 'Belt of the ball lift is torn' });
  if (lanes > 8) {
    await as(desk, 'POST', '/calls', { lane: 13, equipment: 'approach', safety: 'wet-approach' });
    await device('run.started', { machine: 'm1', run: '118', pattern: 'owls', revision: 1, lanes: [28, 29, 30, 31] }, 3 * MIN);
    await device('run.aborted', { machine: 'm1', run: '118', lane: 28, reason: 'battery' }, 2 * MIN);
  }
  await device('run.started', { machine: 'm1', run: '119', pattern: 'nobody-knows', lanes: [2, 4] }, MIN);
  await device('machine.levels', { machine: 'm1', tankAMl: 1480, cleanerMl: 9000, batteryPct: 76 });
  return { ...house, late, call: callOn(1) };
}
export type BusyHouse = Awaited<ReturnType<typeof busyHouse>>;
