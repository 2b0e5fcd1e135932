import { beforeEach, describe, expect, it } from 'vitest';
import type * as z from 'zod/mini';
import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import type { machineDetail } from '#shared/contracts/runs.ts';
import { signIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import type { EventGiven } from '#tests/support/device.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { good } from '#tests/support/league-house.ts';
import { served } from '#tests/support/served.ts';

const START = '2026-05-14T18:00:00Z';
const MIN = 60_000;
const HOUR = 60 * MIN;
const clock = fixedClock(START);
const at = (minutes: number): number => Date.parse(START) + minutes * MIN;
const { server } = await served({ clock });
beforeEach(() => void clock.set(START));

const dressed = (lane: number, minutes: number): EventGiven => (
  { type: 'run.lane.dressed', data: { machine: 'm1', run: '118', lane, startedAt: new Date(at(minutes - 2)).toISOString(), finishedAt: new Date(at(minutes)).toISOString() }, time: at(minutes) });
const counted = (lane: number, deliveries: number, minutes: number): EventGiven => ({ type: 'lane.counted', data: { lane, deliveries }, time: at(minutes) });

async function house() {
  const given = await floorHouse(server, 8);
  /** As the desk, who signs in anew: an evening of ageing is longer than a session is idle. */
  const read = async (path: string) => good(await ask(server.url, 'GET', `/api/centres/${given.centre.slug}${path}`, { cookie: await signIn(server.url, given.desk) })).body;
  const floor = async () => (await read('/floor')) as FloorSnapshot;
  const film = async (lane = 1) => (await floor()).lanes.find((one) => one.lane === lane)?.film;
  const machine = async () => ((await read('/machines')) as { machines: z.infer<typeof machineDetail>[] }).machines[0];
  const send = async (...events: EventGiven[]) => {
    const { body } = await given.gateway.send(events);
    expect(body).toMatchObject({ accepted: events.length, setAside: [] });
  };
  return { ...given, floor, film, machine, send };
}

/** Limits of common practice: fresh to 100 deliveries and 4 h, worn from 501 or beyond 24 h. Strength halves for each 500 deliveries and each 24 h. */
describe('the film of a lane ages', () => {
  it.each([
    [0, 'fresh', 1], [100, 'fresh', 0.87], [101, 'ageing', 0.87], [500, 'ageing', 0.5], [501, 'worn', 0.5], [1_000, 'worn', 0.25],
  ])('after %d deliveries: %s', async (deliveries, freshness, strength) => {
    const { send, film } = await house();
    await send(dressed(1, 0), counted(1, deliveries, 0.001));
    expect(await film()).toMatchObject({ at: at(0), deliveries, freshness, strength });
  });

  it('by the hours alone, with nobody bowling: fresh for four, worn after twenty-four', async () => {
    const { send, film } = await house();
    await send(dressed(1, 0));
    for (const [hours, freshness, strength] of [[4, 'fresh', 0.89], [4.001, 'ageing', 0.89], [24, 'ageing', 0.5], [24.001, 'worn', 0.5], [48, 'worn', 0.25]] as const) {
      clock.set(new Date(at(0) + hours * HOUR).toISOString());
      expect(await film()).toMatchObject({ deliveries: 0, freshness, strength });
    }
  });

  it('counts from the end of the dressing, whenever the count and the dressing arrive', async () => {
    const { send, film } = await house();
    clock.set(new Date(at(60)).toISOString());
    await send(counted(1, 30, 20), counted(1, 40, -5));
    expect(await film()).toBeNull();
    await send(dressed(1, 10));
    expect(await film()).toMatchObject({ deliveries: 30 });
    await send(counted(1, 12, 15), counted(1, 50, 9));
    expect(await film()).toMatchObject({ deliveries: 42 });
    // Dressed again at 18:18: what was rolled at 18:15 wore the film before.
    await send(dressed(1, 18));
    expect(await film()).toMatchObject({ at: at(18), deliveries: 30, freshness: 'fresh' });
  });

  it('lane by lane, also over the cut of the day', async () => {
    const { send, film, floor } = await house();
    const given = await floor();
    await send(dressed(1, 0), dressed(2, 0), counted(1, 300, 0.001));
    clock.set(new Date(given.business.to + MIN).toISOString());
    await send({ type: 'lane.counted', data: { lane: 1, deliveries: 201 }, time: clock.now() });
    expect((await floor()).business.from).toBe(given.business.to);
    expect([await film(1), await film(2)]).toMatchObject([{ deliveries: 501, freshness: 'worn' }, { deliveries: 0 }]);
  });

  it('is gone where a machine broke off, until the lane is done anew', async () => {
    const { send, floor, film } = await house();
    await send(dressed(1, -20), { type: 'run.aborted', data: { machine: 'm1', run: '118', lane: 1, reason: 'battery' }, time: at(-10) });
    expect((await floor()).lanes[0]).toMatchObject({ brokenOff: true });
    await send(dressed(1, -3));
    expect((await floor()).lanes[0]).toMatchObject({ brokenOff: false, film: { at: at(-3) } });
    expect(await film(2)).toBeNull();
  });
});

describe('levels of a machine', () => {
  it('are the last that were told of each, whatever arrives late; none is not nought', async () => {
    const { send, machine, floor } = await house();
    expect(await machine()).toMatchObject({ code: 'm1', tankAMl: null, tankBMl: null, cleanerMl: null, wasteMl: null, batteryPct: null, at: null });
    await send({ type: 'machine.levels', data: { machine: 'm1', tankAMl: 1_480.5, cleanerMl: 9_000, batteryPct: 76 }, time: at(-20) });
    await send({ type: 'machine.levels', data: { machine: 'm1', tankAMl: 1_474.6, wasteMl: 0 }, time: at(-10) });
    await send({ type: 'machine.levels', data: { machine: 'm1', tankAMl: 2_000, cleanerMl: 9_500 }, time: at(-30) });
    const levels = { tankAMl: 1_474.6, tankBMl: null, cleanerMl: 9_000, wasteMl: 0, batteryPct: 76, at: at(-10) };
    expect(await machine()).toMatchObject(levels);
    expect((await floor()).machines).toMatchObject([levels]);
  });

  it('its pace is the median of its own lanes, moves included; none until it has made some', async () => {
    const { send, machine } = await house();
    expect(await machine()).toMatchObject({ lanesDressed: 0, paceMs: null });
    // The first took two minutes, each of the others ended three after the one before.
    await send(...[-16, -13, -10, -7, -4].map((minutes, i) => dressed(i + 1, minutes)), { type: 'run.lane.skipped', data: { machine: 'm1', run: '118', lane: 6, reason: 'occupied' }, time: at(-3) });
    expect(await machine()).toMatchObject({ lanesDressed: 5, paceMs: 3 * MIN });
  });
});
