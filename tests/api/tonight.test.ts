import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { TonightView } from '#shared/contracts/runs.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { good, type LeagueHouse, leagueHouse } from '#tests/support/league-house.ts';

const clock = fixedClock('2026-05-14T18:30:00Z');
const MIN = 60_000;
const WARM_UP = Date.parse('2026-05-14T20:05:00Z');
let database: TestDatabase;
let world: LeagueHouse;
beforeAll(async () => {
  database = await freshDatabase();
  world = await leagueHouse(database, clock);
});
beforeEach(() => void clock.set('2026-05-14T18:30:00Z'));
afterAll(async () => {
  await world.close();
  await database.close();
});

describe('what sessions of tonight still want dressed', () => {
  it('proposes a run for lanes that nobody has planned; planned as proposed, the session is as planned', async () => {
    const house = await world.house({ certifiedUntil: '2026-12-31' });
    const { sessions } = await house.league();
    await house.dress([1, 2], { ago: 60 * MIN });
    const tonight = async (): Promise<TonightView> => good(await house.go(house.mechanic, 'GET', '/runs/tonight')).body as TonightView;
    const first = await tonight();
    expect(first).toMatchObject({ possible: true, late: [], unplanned: [], proof: { method: 'exact', proven: { sessionsLate: true, lateness: true } } });
    const [block] = first.blocks;
    // Four lanes at this machine's own two minutes; ready four minutes before warm-up, at the latest at warm-up.
    expect(block).toMatchObject({
      run: null, session: { name: 'Night Owls', warmUpAt: WARM_UP }, machine: 'm1', pattern: 'owls', revision: 3, lanes: [5, 6, 7, 8],
      startAt: WARM_UP - 12 * MIN, endAt: WARM_UP - 4 * MIN, startBy: WARM_UP - 8 * MIN, breaksFirst: 'Night Owls', freeUnknown: [],
    });
    good(await house.go(house.mechanic, 'POST', '/runs/planned', { machine: block?.machine, pattern: block?.pattern, revision: block?.revision, lanes: block?.lanes, startAt: block?.startAt }));
    const after = await tonight();
    expect(after.blocks).toHaveLength(1);
    expect(after.blocks[0]).toMatchObject({ session: { name: 'Night Owls' }, lanes: [5, 6, 7, 8], startBy: WARM_UP - 8 * MIN });
    expect(after.blocks[0]?.run).toMatch(/^m1\//);
    expect(await house.view(house.manager, sessions[0]?.id ?? '')).toMatchObject({ verdict: 'planned' });
  });

  it('says that a session can’t be in time, by how much and why', async () => {
    clock.set('2026-05-14T20:00:00Z');
    const house = await world.house({ certifiedUntil: '2026-12-31' });
    await house.league();
    await house.dress([1, 2], { ago: 60 * MIN });
    const view = good(await house.go(house.mechanic, 'GET', '/runs/tonight')).body as TonightView;
    expect(view.blocks).toMatchObject([{ lanes: [5, 6, 7, 8] }]);
    expect(view.late).toMatchObject([{ session: 'Night Owls', because: [{ code: 'late.even-alone' }, {}] }]);
    expect(view.late[0]?.byMs).toBeGreaterThanOrEqual(7 * MIN);
  });

  it('a machine whose median lane took half a millisecond more still gives whole instants everywhere', async () => {
    const house = await world.house({ certifiedUntil: '2026-12-31' });
    const { sessions } = await house.league();
    const begin = clock.now() - 60 * MIN;
    const lanes = [9, 10, 11, 12, 1, 2, 3, 4];
    await house.device('run.started', { machine: 'm1', run: 'odd', pattern: 'owls', revision: 3, lanes }, begin);
    for (const [i, lane] of lanes.entries()) {
      const [startedAt, finishedAt] = [begin + i * 100_000, begin + (i + 1) * 100_000 + (i > 3 ? i - 3 : 0)];
      await house.device('run.lane.dressed', { machine: 'm1', run: 'odd', lane, startedAt, finishedAt }, finishedAt);
    }
    good(await house.go(house.mechanic, 'POST', '/runs/planned', { machine: 'm1', pattern: 'owls', lanes: [5, 6, 7, 8], startAt: WARM_UP - 30 * MIN }));
    expect((await house.view(house.manager, sessions[0]?.id ?? '')).verdict).toBe('planned');
    expect((good(await house.go(house.desk, 'GET', '/runs/tonight')).body as TonightView).blocks).toHaveLength(1);
    good(await house.go(house.desk, 'GET', '/runs'));
    // 4 loads × 37 boards × 50 µL = 7.4 mL a lane: 10 mL are short on the second.
    await house.device('machine.levels', { machine: 'm1', tankAMl: 10 });
    const { runsOut } = good(await house.go(house.desk, 'GET', '/runs/tonight')).body as TonightView;
    expect(runsOut).toEqual([{ machine: 'm1', store: 'tankA', lane: 6, shortUl: 4800 }]);
  });

  it('nothing to do where all lanes are as asked', async () => {
    const house = await world.house({ certifiedUntil: '2026-12-31' });
    await house.league();
    await house.dress([5, 6, 7, 8], { ago: 20 * MIN });
    expect(good(await house.go(house.desk, 'GET', '/runs/tonight')).body).toMatchObject({ blocks: [], late: [], unplanned: [] });
  });
});
