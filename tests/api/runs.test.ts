import { beforeEach, describe, expect, it } from 'vitest';
import type { RunDetail } from '#shared/contracts/runs.ts';
import { signedIn } from '#tests/support/actors.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { good, refused } from '#tests/support/league-house.ts';
import { runEvents, runsHouse } from '#tests/support/runs-house.ts';
import { served } from '#tests/support/served.ts';

const START = '2026-05-14T18:00:00Z';
const MIN = 60_000;
const clock = fixedClock(START);
const at = (minutes: number): number => Date.parse(START) + minutes * MIN;
const { server, database } = await served({ clock });
beforeEach(() => void clock.set(START));

const house = () => runsHouse(server, at);
const { started, dressed, skipped } = runEvents(at);

describe('a run that a machine tells', () => {
  const NIGHT = [
    started('118', [1, 2, 3, 4, 5], -20), dressed('118', 1, -18, { conditionerMl: { a: 5.9 }, cleanerMl: 120, measured: true }), skipped('118', 2, -17.5),
    dressed('118', 3, -15), { type: 'run.aborted', data: { machine: 'm1', run: '118', lane: 4, reason: 'battery' }, time: at(-14) },
  ];

  it('lane by lane; a skipped, an aborted and an unreached lane aren’t dressed', async () => {
    const { send, runs, floor } = await house();
    await send(...NIGHT);
    const [run, ...others] = await runs();
    expect(others).toEqual([]);
    expect(run).toMatchObject({ run: '118', status: 'aborted', reason: 'battery', entered: 'gateway', pattern: 'house', revision: 1, verified: true, lanes: [1, 2, 3, 4, 5], done: 2, startAt: at(-20), endAt: at(-14), forecast: false, laneNow: null });
    expect(run?.outcomes).toEqual([
      { lane: 1, outcome: 'dressed', startedAt: at(-20), finishedAt: at(-18), aUl: 5_900, bUl: null, cleanerUl: 120_000, measured: true, reason: null },
      { lane: 2, outcome: 'skipped', startedAt: null, finishedAt: null, aUl: null, bUl: null, cleanerUl: null, measured: false, reason: 'occupied' },
      { lane: 3, outcome: 'dressed', startedAt: at(-17), finishedAt: at(-15), aUl: null, bUl: null, cleanerUl: null, measured: false, reason: null },
      { lane: 4, outcome: 'broken-off', startedAt: null, finishedAt: null, aUl: null, bUl: null, cleanerUl: null, measured: false, reason: 'battery' },
    ]);
    const lanes = (await floor()).lanes.slice(0, 5).map((lane) => [lane.film && [lane.film.at, lane.film.lengthFt, lane.film.pattern], lane.brokenOff]);
    expect(lanes).toEqual([[[at(-18), 40, 'house'], false], [null, false], [[at(-15), 40, 'house'], false], [null, true], [null, false]]);
  });

  it('is the same when it comes backwards, one event a batch, and twice', async () => {
    const [there, here] = [await house(), await house()];
    await there.send(...NIGHT);
    for (const event of NIGHT.toReversed().map((one, i) => ({ ...one, id: `late-${i}` }))) {
      await here.send(event);
      expect((await here.gateway.sendOne(event)).body).toMatchObject({ accepted: 0, duplicates: 1 });
    }
    expect(await here.runs()).toEqual(await there.runs());
    expect((await here.floor()).lanes).toEqual((await there.floor()).lanes);
  });

  it('under way, it says which lane is next and when it ends at two minutes a lane', async () => {
    const { send, runs, laneOf } = await house();
    await send(started('118', [1, 2, 3, 4], -5), dressed('118', 1, -3), dressed('118', 2, -1));
    expect((await runs())[0]).toMatchObject({ status: 'under-way', done: 2, laneNow: 3, forecast: true, endAt: at(-1 + 2 * 2) });
    expect((await laneOf(3))?.dressing).toMatchObject({ machine: 'm1', run: '118' });
    await send({ type: 'run.finished', data: { machine: 'm1', run: '118' } });
    expect((await runs())[0]).toMatchObject({ status: 'finished', laneNow: null, forecast: false, endAt: clock.now() });
  });

  it('of a pattern that nobody knows, or none at all, is taken and marked unverified', async () => {
    const { send, runs, laneOf } = await house();
    await send(started('7', [1], -9, { pattern: 'nobody-knows', revision: 4 }), dressed('7', 1, -7), dressed('8', 2, -3));
    expect((await runs()).map((run) => [run.run, run.pattern, run.verified, run.lanes])).toEqual([['7', 'nobody-knows', false, [1]], ['8', null, false, [2]]]);
    expect((await laneOf(1))?.film).toMatchObject({ pattern: 'nobody-knows', lengthFt: null, verified: false });
  });

  it('one that was never closed ends where the machine’s next begins', async () => {
    const { send, runs } = await house();
    await send(started('118', [1, 2], -20), dressed('118', 1, -18), started('119', [3], -5));
    expect((await runs()).map((run) => [run.run, run.status, run.endAt, run.reason])).toEqual([['118', 'finished', at(-18), 'not-closed'], ['119', 'under-way', at(-3), null]]);
  });
});

describe('a run that is written down afterwards', () => {
  it('stands at its own time, its volumes from the pattern and marked so', async () => {
    const { send, record, runs, laneOf, mechanic } = await house();
    await send({ type: 'lane.counted', data: { lane: 1, deliveries: 30 }, time: at(-50) }, { type: 'lane.counted', data: { lane: 1, deliveries: 12 }, time: at(-10) });
    const made = await record({ run: 'evening', lanes: [{ lane: 1, outcome: 'dressed' }, { lane: 2, outcome: 'skipped', reason: 'Party' }, { lane: 3, outcome: 'dressed' }, { lane: 4, outcome: 'broken-off', reason: 'Cord caught' }] });
    expect(made.status).toBe(201);
    // Twenty minutes in four equal parts. 4 loads × 37 boards × 40 µL = 5 920 µL.
    const end = (part: number): number => at(-40 + 5 * part) - 1;
    expect(made.body).toMatchObject({
      key: `m1/evening/${at(-40)}`, status: 'aborted', entered: 'hand', reason: 'Cord caught', startAt: at(-40), endAt: at(-20), done: 2, pattern: 'house', revision: 1,
      outcomes: [
        { lane: 1, outcome: 'dressed', startedAt: at(-40), finishedAt: end(1), aUl: 5_920, bUl: null, measured: false }, { lane: 2, outcome: 'skipped', reason: 'Party', aUl: null },
        { lane: 3, outcome: 'dressed', startedAt: at(-30), finishedAt: end(3), aUl: 5_920 }, { lane: 4, outcome: 'broken-off', reason: 'Cord caught', aUl: null },
      ],
    });
    expect(await runs()).toEqual([made.body]);
    // What was bowled before the dressing wore another film.
    expect((await laneOf(1))?.film).toMatchObject({ at: end(1), deliveries: 12 });
    expect([(await laneOf(2))?.film, (await laneOf(4))?.film, (await laneOf(4))?.brokenOff]).toEqual([null, null, true]);
    const facts = await database.db('journal').where('type', 'like', 'run.%').where('by_name', mechanic.name).orderBy('n').select('type', 'time_at', 'received_at');
    expect(facts[0]).toEqual({ type: 'run.started', time_at: new Date(at(-40)), received_at: new Date(clock.now()) });
  });

  it('an older one doesn’t take the place of a newer dressing', async () => {
    const { send, record, laneOf } = await house();
    await send(started('118', [1], -12), dressed('118', 1, -10));
    good(await record());
    expect((await laneOf(1))?.film?.at).toBe(at(-10));
    expect((await laneOf(2))?.film?.at).toBe(at(-20) - 1);
  });

  it('yesterday’s belongs to yesterday, and can be had there alone', async () => {
    const { record, runs, laneOf } = await house();
    const made = good(await record({ startedAt: at(-24 * 60), finishedAt: at(-24 * 60 + 20) })).body as RunDetail;
    expect(await runs('2026-05-13')).toEqual([made]);
    expect(await runs()).toEqual([]);
    expect((await laneOf(1))?.film?.at).toBe(made.outcomes[0]?.finishedAt);
  });

  it('without a pattern it is taken, its volumes unknown', async () => {
    const { record } = await house();
    expect(good(await record({ pattern: undefined })).body).toMatchObject({ pattern: null, revision: null, verified: false, status: 'finished', outcomes: [{ aUl: null }, { aUl: null }] });
  });

  it.each([
    ['an end before its start', { finishedAt: at(-41) }, 'run.end-before-start', '/finishedAt'],
    ['an end still to come', { finishedAt: at(1) }, 'run.end-in-future', '/finishedAt'],
    ['more than a week ago', { startedAt: at(-7 * 24 * 60 - 1) }, 'run.too-old', '/startedAt'],
    ['a lane that the house hasn’t', { lanes: [{ lane: 1, outcome: 'dressed' }, { lane: 13, outcome: 'dressed' }] }, 'run.lanes-unknown', '/lanes/1'],
    ['a lane twice', { lanes: [{ lane: 1, outcome: 'dressed' }, { lane: 1, outcome: 'skipped' }] }, 'run.lane-twice', '/lanes/1'],
    ['broken off twice', { lanes: [{ lane: 1, outcome: 'broken-off' }, { lane: 2, outcome: 'broken-off' }] }, 'run.broken-off-twice', '/lanes/1'],
    ['a machine that isn’t', { machine: 'm9' }, 'machine.unknown', '/machine'],
    ['a pattern that isn’t', { pattern: 'nowhere' }, 'pattern.unknown', '/pattern'],
    ['a revision that isn’t', { revision: 2 }, 'pattern.unknown', '/pattern'],
    ['an outcome that isn’t', { lanes: [{ lane: 1, outcome: 'half' }] }, 'input.invalid', '/lanes/0/outcome'],
    ['no lanes', { lanes: [] }, 'input.invalid', '/lanes'],
  ])('%s is refused, and nothing written', async (_, change, code, pointer) => {
    const { record, written } = await house();
    const before = await written();
    expect(refused(await record(change))).toMatchObject({ status: 422, code, at: pointer });
    expect(await written()).toEqual(before);
  });

  it('a code that the machine has used is refused, also after the cut and of a gateway’s run', async () => {
    const { record, plan, send, written } = await house();
    good(await record({ run: 'evening' }));
    await send(started('118', [5], -15), dressed('118', 5, -13), { type: 'run.finished', data: { machine: 'm1', run: '118' }, time: at(-12) });
    const taken = async () => {
      const before = await written();
      for (const run of ['evening', '118']) {
        for (const again of [record({ run, startedAt: clock.now() - 9 * MIN, finishedAt: clock.now() - MIN }), plan({ run, startAt: clock.now() + MIN })]) {
          expect(refused(await again)).toMatchObject({ status: 409, code: 'run.code-taken', at: '/run', params: { run } });
        }
      }
      expect(await written()).toEqual(before);
    };
    await taken();
    clock.set('2026-05-15T18:00:00Z');
    // Something happens on the next day: the ended runs leave memory at the cut.
    await send({ type: 'gateway.heartbeat' });
    await taken();
  });
});

describe('a planned run', () => {
  it('stands in the list and on the floor with its start, its forecast end, and nothing dressed', async () => {
    const { plan, runs, floor } = await house();
    const made = await plan();
    expect(made.status).toBe(201);
    expect(made.body).toMatchObject({ status: 'planned', entered: 'hand', plannedStart: at(30), startAt: at(30), endAt: at(38), forecast: true, lanes: [1, 2, 3, 4], done: 0, outcomes: [], pattern: 'house', revision: 1 });
    expect(await runs()).toEqual([made.body]);
    const snapshot = await floor();
    expect(snapshot.runs).toMatchObject([{ status: 'planned', startAt: at(30), endAt: at(38) }]);
    expect(snapshot.lanes.every((lane) => lane.film === null && lane.dressing === null)).toBe(true);
  });

  it('the machine’s own run of that code takes it over: its start, its pattern, its lanes', async () => {
    const { plan, send, runs, laneOf } = await house();
    good(await plan({ run: '118' }));
    clock.advance(34 * MIN);
    await send({ type: 'run.started', data: { machine: 'm1', run: '118' }, time: at(32) }, dressed('118', 1, 34));
    expect(await runs()).toMatchObject([{ run: '118', status: 'under-way', plannedStart: at(30), startAt: at(32), pattern: 'house', revision: 1, lanes: [1, 2, 3, 4], laneNow: 2, entered: 'hand' }]);
    expect((await laneOf(1))?.film).toMatchObject({ pattern: 'house', revision: 1, verified: true, lengthFt: 40 });
    await send(started('118', [4, 3, 2, 1], 32, { pattern: 'owls' }));
    expect(await runs()).toMatchObject([{ pattern: 'owls', lanes: [4, 3, 2, 1] }]);
  });

  it('can be taken back once; it is kept, and what it wanted isn’t dressed', async () => {
    const { plan, cancel, runs, floor, written } = await house();
    const { run } = good(await plan()).body as RunDetail;
    clock.advance(MIN);
    expect(good(await cancel(run)).body).toMatchObject({ status: 'cancelled', reason: 'League called off', endAt: clock.now() });
    const before = await written();
    expect(refused(await cancel(run))).toMatchObject({ status: 409, code: 'run.not-planned', params: { run } });
    expect(await written()).toEqual(before);
    expect(await runs()).toMatchObject([{ status: 'cancelled' }]);
    expect((await floor()).lanes.every((lane) => lane.film === null)).toBe(true);
  });

  it('one that was taken back and that the machine makes all the same is under way: what it lays is on the lanes', async () => {
    const { plan, cancel, send, runs, laneOf } = await house();
    good(await plan({ run: '118' }));
    good(await cancel('118'));
    clock.advance(34 * MIN);
    await send({ type: 'run.started', data: { machine: 'm1', run: '118' }, time: at(32) }, dressed('118', 1, 34));
    expect(await runs()).toMatchObject([{ run: '118', status: 'under-way', reason: null, startAt: at(32), done: 1, laneNow: 2, pattern: 'house' }]);
    expect((await laneOf(1))?.film).toMatchObject({ at: at(34), pattern: 'house' });
    await send({ type: 'run.finished', data: { machine: 'm1', run: '118' } });
    expect(await runs()).toMatchObject([{ status: 'finished', reason: null, endAt: at(34) }]);
  });

  it('of ten who take it back at once, one does', async () => {
    const { plan, cancel } = await house();
    const { run } = good(await plan()).body as RunDetail;
    const answers = await Promise.all(Array.from({ length: 10 }, () => cancel(run)));
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, ...Array.from({ length: 9 }, () => 409)]);
  });

  it('one that is under way, was made, or isn’t, can’t be taken back; not after the cut either', async () => {
    const { cancel, send, record, plan } = await house();
    await send(started('118', [1], -5));
    good(await record({ run: 'evening' }));
    const { run } = good(await plan()).body as RunDetail;
    good(await cancel(run));
    for (const code of ['118', 'evening', run]) expect(refused(await cancel(code))).toMatchObject({ status: 409, code: 'run.not-planned' });
    expect(refused(await cancel('nowhere'))).toMatchObject({ status: 404, code: 'run.unknown' });
    clock.set('2026-05-15T18:00:00Z');
    await send({ type: 'gateway.heartbeat' });
    for (const code of ['evening', run]) expect(refused(await cancel(code))).toMatchObject({ status: 409, code: 'run.not-planned' });
  });

  it.each([
    ['a start that has passed', { startAt: at(-2) }, 422, 'run.start-past', '/startAt'],
    ['a lane that the house hasn’t', { lanes: [1, 13] }, 422, 'run.lanes-unknown', '/lanes/1'],
    ['a lane twice', { lanes: [1, 2, 1] }, 422, 'run.lane-twice', '/lanes/2'],
    ['a machine that isn’t', { machine: 'm9' }, 422, 'machine.unknown', '/machine'],
    ['a pattern that isn’t', { pattern: 'nowhere' }, 422, 'pattern.unknown', '/pattern'],
  ])('%s is refused, and nothing written', async (_, change, status, code, pointer) => {
    const { plan, written } = await house();
    const before = await written();
    expect(refused(await plan(change))).toMatchObject({ status, code, at: pointer });
    expect(await written()).toEqual(before);
  });

  it('a pattern that the machine can’t lay is refused with every reason', async () => {
    const { plan, go, manager, written } = await house();
    const pass = { direction: 'outbound', fromBoard: { side: 'L', n: 1 }, toBoard: { side: 'R', n: 2 }, loads: 7, ul: 61, product: 'A', fromFt: 0, toFt: 30 };
    good(await go(manager, 'POST', '/patterns', { code: 'wide', name: 'Wide', revision: { lengthFt: 40, passes: [pass] } }));
    const before = await written();
    const answer = await plan({ pattern: 'wide' });
    expect(refused(answer)).toMatchObject({ status: 422, code: 'run.machine-cannot', at: '/machine', params: { machine: 'Machine 1', pattern: 'wide' } });
    expect((answer.body as { errors: { code: string }[] }).errors.map((one) => one.code)).toEqual(['machine.volume-out-of-range', 'machine.board-out-of-reach', 'machine.too-many-loads']);
    expect(await written()).toEqual(before);
  });
});

describe('whose runs', () => {
  it('another centre’s aren’t there', async () => {
    const [mine, other] = [await house(), await house()];
    const { run } = good(await mine.plan()).body as RunDetail;
    for (const [method, path, body] of [['GET', '/runs'], ['POST', '/runs/planned', { machine: 'm1', pattern: 'house', lanes: [1], startAt: at(30) }], ['POST', `/runs/m1/${run}/cancel`, { reason: 'Mine' }]] as const) {
      expect((await mine.go(other.mechanic, method, path, body)).status).toBe(404);
    }
    expect((await other.cancel(run)).status).toBe(404);
    expect(await mine.runs()).toMatchObject([{ status: 'planned' }]);
    expect(await other.runs()).toEqual([]);
  });

  it('the desk reads and records none; a secretary sees none; the manager may do both', async () => {
    const { centre, go, plan, cancel, desk, manager, written } = await house();
    const { run } = good(await plan()).body as RunDetail;
    const secretary = await signedIn(server.url, server.slices.accounts, { centre, role: 'secretary', leagues: [] });
    const before = await written();
    const body = { machine: 'm1', pattern: 'house', lanes: [1], startAt: at(30) };
    for (const path of ['/runs', '/runs/tonight', '/machines', '/patterns']) {
      expect([(await go(desk, 'GET', path)).status, (await go(secretary, 'GET', path)).status, (await go({ cookie: '' }, 'GET', path)).status]).toEqual([200, 403, 401]);
    }
    for (const who of [desk, secretary]) {
      expect([(await go(who, 'POST', '/runs/planned', body)).status, (await cancel(run, who)).status]).toEqual([403, 403]);
      expect((await go(who, 'POST', '/runs', { machine: 'm1', startedAt: at(-9), finishedAt: at(-1), lanes: [{ lane: 1, outcome: 'dressed' }] })).status).toBe(403);
    }
    expect(await written()).toEqual(before);
    expect([(await go(manager, 'POST', '/runs/planned', body)).status, (await cancel(run, manager)).status]).toEqual([201, 200]);
  });

  it('a date that isn’t one is refused', async () => {
    const { go, desk } = await house();
    expect(refused(await go(desk, 'GET', '/runs?date=2026-02-30'))).toMatchObject({ status: 422, code: 'run.date-invalid' });
  });
});
