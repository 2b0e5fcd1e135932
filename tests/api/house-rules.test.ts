import { beforeEach, describe, expect, it } from 'vitest';
import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import { type HouseRules, USUAL_RULES } from '#shared/domain/house-rules.ts';
import { ask } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { good, refused } from '#tests/support/league-house.ts';
import { served } from '#tests/support/served.ts';

const START = '2026-05-14T18:00:00Z';
const MIN = 60_000;
const clock = fixedClock(START);
const { server, database } = await served({ clock });
beforeEach(() => void clock.set(START));

async function house() {
  const given = await floorHouse(server, 8);
  const save = (change: Partial<HouseRules>, who = given.manager) =>
    ask(server.url, 'PUT', `/api/centres/${given.centre.slug}/settings/rules`, { cookie: who.cookie, body: { ...USUAL_RULES, ...change } });
  const floor = async () => (await given.as(given.desk, 'GET', '/floor')) as FloorSnapshot;
  const rules = async () => ((await given.as(given.manager, 'GET', '/settings')) as { rules: HouseRules }).rules;
  return { ...given, save, floor, rules };
}

describe('rules of a house', () => {
  it('are what is usual until the manager changes them, and then his', async () => {
    const { save, rules, desk } = await house();
    expect(await rules()).toEqual(USUAL_RULES);
    expect((await save({ deskMin: 8 }, desk)).status).toBe(403);
    expect(good(await save({ deskMin: 8, wornHours: 12 })).body).toEqual({ ...USUAL_RULES, deskMin: 8, wornHours: 12 });
    expect(await rules()).toEqual({ ...USUAL_RULES, deskMin: 8, wornHours: 12 });
  });

  it('that contradict each other are refused beside the field, and nothing is saved', async () => {
    const { save, rules } = await house();
    for (const [change, at] of [[{ deskMin: 2 }, '/deskMin'], [{ managerMin: 4 }, '/managerMin'], [{ planLeadMin: 10, dressMarginMin: 10 }, '/planLeadMin'], [{ wornDeliveries: 100 }, '/wornDeliveries']] as const) {
      expect(refused(await save(change))).toMatchObject({ status: 422, code: 'rules.contradict', at });
    }
    expect(refused(await save({ otherMechanicMin: 0 }))).toMatchObject({ status: 422, code: 'input.invalid', at: '/otherMechanicMin' });
    expect(await rules()).toEqual(USUAL_RULES);
  });

  it('say who is asked about a call that nobody answers', async () => {
    const { save, floor, device } = await house();
    await device('pinsetter.stopped', { lane: 3 });
    const asked = async () => (await floor()).calls.map(({ escalation }) => escalation);
    clock.advance(2 * MIN);
    expect(await asked()).toEqual(['none']);
    good(await save({ otherMechanicMin: 1, deskMin: 2, managerMin: 10 }));
    expect(await asked()).toEqual(['desk']);
    good(await save({ otherMechanicMin: 1, deskMin: 2, managerMin: 2 }));
    expect(await asked()).toEqual(['manager']);
  });

  it('say when the letter about it is written', async () => {
    const { save, device, centre } = await house();
    good(await save({ otherMechanicMin: 5 }));
    await device('pinsetter.stopped', { lane: 3 });
    const letters = async () => database.db('mail_outbox').where({ centre_id: centre.id }).pluck<string[]>('text_body');
    clock.advance(5 * MIN - 1);
    await server.slices.calls.mailUnanswered(clock.now());
    expect(await letters()).toEqual([]);
    clock.advance(1);
    await server.slices.calls.mailUnanswered(clock.now());
    expect(await letters()).toEqual([expect.stringContaining('nobody had answered 5 minutes later')]);
  });

  it('say what still counts as fresh', async () => {
    const { save, floor, device } = await house();
    await device('run.lane.dressed', { machine: 'm1', run: '1', lane: 1, startedAt: new Date(clock.now() - 3 * MIN).toISOString(), finishedAt: new Date(clock.now() - MIN).toISOString() });
    await device('lane.counted', { lane: 1, deliveries: 60 });
    const film = async () => (await floor()).lanes[0]?.film;
    expect(await film()).toMatchObject({ freshness: 'fresh', strength: 0.92 });
    good(await save({ freshDeliveries: 59 }));
    expect(await film()).toMatchObject({ freshness: 'ageing', strength: 0.92 });
    good(await save({ freshDeliveries: 30, wornDeliveries: 59 }));
    // Strength halves with each limit of deliveries: 2^(−60/59).
    expect(await film()).toMatchObject({ freshness: 'worn', strength: 0.49 });
  });

  it('say until when a lane may be without a plan', async () => {
    const { save, floor, league } = await house();
    await league({ name: 'Night Owls', fromLane: 1, toLane: 4, inMinutes: 70, pattern: 'owls' });
    const verdict = async () => (await floor()).sessions.map((session) => session.verdict);
    expect(await verdict()).toEqual(['held']);
    good(await save({ planLeadMin: 30 }));
    expect(await verdict()).toEqual(['at-risk']);
  });
});
