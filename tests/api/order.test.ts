import { describe, expect, it } from 'vitest';
import type { DeviceData } from '#shared/domain/journal/fact.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { checkReplay } from '#server/platform/journal/replay-check.ts';
import { signedIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { aCentre } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { deviceAt } from '#tests/support/device.ts';
import { aNight, ASKED_AT_THE_LANE, canonical, deliveries, type Night, type NightAct, type NightEvent, NIGHT_FROM } from '#tests/support/night.ts';
import { served } from '#tests/support/served.ts';

const HOUR = 3_600_000;
const SEEDS = [1, 2, 3, 4, 5];
const KINDS = 20;
/** Events a request, as a gateway that was away sends them. */
const BATCH = 400;

const clock = fixedClock(new Date(NIGHT_FROM).toISOString());
const { server, database } = await served({ clock, ingestRate: { perSecond: 1e6, burst: 1e6 } });

const goTo = (at: number): void => void clock.set(new Date(Math.round(at)).toISOString());

/** As a gateway sends it: times within data are RFC 3339. */
function sent(event: NightEvent): { type: string; data: object; time: number; id: string; source: string } {
  const times = event.type === 'run.lane.dressed' ? { startedAt: new Date(event.data.startedAt).toISOString(), finishedAt: new Date(event.data.finishedAt).toISOString() } : {};
  return { type: event.type, data: { ...event.data, ...times }, time: event.time, id: event.id, source: encodeURI(event.source) };
}

interface Told {
  centre: CentreRef;
  screens: string;
  accepted: number;
  duplicate: number;
  cleared: number;
}

/** One night over HTTP into a house of its own: device events by a gateway's key, a mechanic by the routes of calls. */
async function tell(night: Night, seed: number, shuffled: boolean): Promise<Told> {
  goTo(NIGHT_FROM);
  const centre = await aCentre(server.slices.centre, { lanes: night.lanes, name: 'Tarn Ferry Bowl', zone: 'UTC', family: 'free-fall' });
  const mechanic = await signedIn(server.url, server.slices.accounts, { centre, role: 'mechanic' });
  const { id, key } = await server.slices.centre.addGateway(centre, 'Back room');
  const gateway = deviceAt(server.url, key, id, () => clock.now());
  const go = async (method: string, path: string, body?: unknown, who = mechanic): Promise<unknown> => {
    const answer = await ask(server.url, method, `/api/centres/${centre.slug}${path}`, { cookie: who.cookie, body });
    if (answer.status !== 200) throw new Error(`${method} ${path}: ${answer.status} ${JSON.stringify(answer.body)}`);
    return answer.body;
  };
  const raised = new Map(night.events.flatMap((event) => (event.type === 'call.requested' ? [[event.id, event.data] as const] : [])));
  const act = async ({ raise, what }: NightAct): Promise<void> => {
    const data = raised.get(raise) as DeviceData['call.requested'];
    const { open } = (await go('GET', '/calls')) as { open: { id: string; lane: number; equipment: string }[] };
    const call = open.find((one) => one.lane === data.lane && one.equipment === data.equipment);
    if (!call) throw new Error(`nothing is open on lane ${data.lane} for ${what}`);
    await go('POST', `/calls/${call.id}/${what}`, what === 'clear' ? { cause: 'other.adjusted' } : undefined);
  };
  const told = { accepted: 0, duplicate: 0, cleared: 0 };
  for (const step of deliveries(night, seed, shuffled, BATCH)) {
    goTo(step.at);
    if ('act' in step) {
      await act(step.act);
      told.cleared += step.act.what === 'clear' ? 1 : 0;
      continue;
    }
    const { status, body } = await gateway.send(step.events.map(sent));
    if (status !== 200 || body.setAside.length > 0) throw new Error(`${status} ${JSON.stringify(body)}`);
    told.accepted += body.accepted;
    told.duplicate += body.duplicates;
  }
  goTo(NIGHT_FROM + 14 * HOUR);
  const manager = await signedIn(server.url, server.slices.accounts, { centre, role: 'manager' });
  const { date } = businessDayAt(NIGHT_FROM + HOUR, centre.zone, centre.cut);
  const screens: unknown[] = [];
  for (const path of ['/floor', '/calls', `/runs?date=${date}`, `/nights/${date}`]) screens.push(await go('GET', path, undefined, manager));
  // When and by which gateway it was heard belongs to the arrival.
  const { gateways: _gateways, ...floor } = screens[0] as Record<string, unknown>;
  return { centre, screens: canonical([floor, ...screens.slice(1)], { [centre.slug]: 'house', [mechanic.name]: 'mechanic', [mechanic.id]: 'mechanic', [manager.id]: 'manager' }), ...told };
}

describe('order of arrival, over HTTP into the database', () => {
  it.each(SEEDS)('night %i: floor, calls, runs and figures are the same shuffled, repeated and late', async (seed) => {
    const night = aNight(seed, 3_000, ASKED_AT_THE_LANE);
    expect(new Set(night.events.map((event) => event.type)).size).toBe(KINDS);
    const straight = await tell(night, seed, false);
    const shuffled = await tell(night, seed, true);
    expect([straight.accepted, shuffled.accepted]).toEqual([3_000, 3_000]);
    expect(shuffled.duplicate).toBeGreaterThan(100);
    expect(straight.cleared).toBeGreaterThan(5);
    expect(shuffled.screens === straight.screens, `night ${seed}: ${firstDifference(straight.screens, shuffled.screens)}`).toBe(true);
    for (const { centre } of [straight, shuffled]) expect((await checkReplay(database.db, centre)).differences).toEqual([]);
  });

  it('a house that was told one event differently shows it', async () => {
    const night = aNight(6, 400, ASKED_AT_THE_LANE);
    const one = night.events.findIndex((event) => event.type === 'lane.counted' && (event.data.deliveries ?? 0) > 0);
    const other = { ...night, events: night.events.map((event, i) => (i === one && event.type === 'lane.counted' ? { ...event, data: { ...event.data, deliveries: (event.data.deliveries ?? 0) + 1 } } : event)) };
    expect((await tell(other, 6, false)).screens).not.toBe((await tell(night, 6, false)).screens);
  });
});

/** Where two long texts part, for who reads the failure. */
function firstDifference(a: string, b: string): string {
  let at = 0;
  while (at < a.length && a[at] === b[at]) at += 1;
  return `${a.slice(Math.max(0, at - 160), at + 60)} ≠ ${b.slice(at, at + 60)}`;
}
