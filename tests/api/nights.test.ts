import { beforeAll, describe, expect, it } from 'vitest';
import type { NightFiguresView, NightView } from '#shared/contracts/numbers.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { garwoodRows } from '#tests/reference/numbers/rate-tables.ts';
import { signedIn, signIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { freshSlug } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { aDevice, type EventGiven } from '#tests/support/device.ts';
import { aLeague, good, refused } from '#tests/support/league-house.ts';
import { aRevision, CAN } from '#tests/support/sample-house.ts';
import { served } from '#tests/support/served.ts';

const MIN = 60_000;
const HOUR = 60 * MIN;
const clock = fixedClock('2026-05-14T17:30:00Z');
const { server } = await served({ clock });

/** A house of four lanes that is open from six to ten in the evening, every day: sixteen lane hours. */
async function house(given: { zone?: string; opening?: { from: number; to: number } } = {}) {
  const { zone = 'UTC', opening = { from: 18 * 60, to: 22 * 60 } } = given;
  const { slices } = server;
  const centre: CentreRef = await slices.centre.add({ slug: freshSlug(), name: 'Tarn Ferry Bowl', zone, lanes: 4, certifiedUntil: '2027-12-31', opening: Array.from({ length: 7 }, () => opening) });
  const come = (role: 'manager' | 'desk' | 'mechanic') => signedIn(server.url, slices.accounts, { centre, role });
  const [manager, desk, mechanic] = [await come('manager'), await come('desk'), await come('mechanic')];
  const gateway = await aDevice(server, centre);
  const go = (who: { cookie: string }, method: string, path: string, body?: unknown) => ask(server.url, method, `/api/centres/${centre.slug}${path}`, { cookie: who.cookie, body });
  const send = async (...events: EventGiven[]): Promise<void> => {
    const { body } = await gateway.send(events);
    expect(body).toMatchObject({ accepted: events.length, setAside: [] });
  };
  /** As the manager, who may have been away for hours. */
  const night = async (date: string) => good(await go({ cookie: await signIn(server.url, manager) }, 'GET', `/nights/${date}`)).body as NightView;
  return { centre, manager, desk, mechanic, go, send, night, slices };
}

/** Rate and exact 95 % limits a thousand frames, by the table: Garwood (1936), digits from R's poisson.test. */
function byTable(count: number, frames: number): { perThousand: number; low: number; high: number } {
  const row = garwoodRows.find(([k]) => k === count);
  if (!row) throw new Error(`the table has no ${count}`);
  const [, , , low = NaN, high = NaN] = row;
  return { perThousand: (1000 * count) / frames, low: (1000 * low) / frames, high: (1000 * high) / frames };
}

describe('a night whose figures are known', () => {
  const DATE = '2026-05-14';
  const at = (time: string): number => Date.parse(`${DATE}T${time.length === 5 ? `${time}:00` : time}Z`);
  const opened = (lane: number, use: string, time: string): EventGiven => ({ type: 'lane.opened', data: { lane, use }, time: at(time) });
  const closed = (lane: number, time: string): EventGiven => ({ type: 'lane.closed', data: { lane }, time: at(time) });
  const counted = (lane: number, deliveries: number, frames: number, time: string, basis = 'scored'): EventGiven => ({ type: 'lane.counted', data: { lane, deliveries, frames, basis }, time: at(time) });
  const dressed = (lane: number, from: string, to: string, more: object = {}): EventGiven => (
    { type: 'run.lane.dressed', data: { machine: 'm1', run: '118', lane, startedAt: new Date(at(from)).toISOString(), finishedAt: new Date(at(to)).toISOString(), ...more }, time: at(to) });

  let h: Awaited<ReturnType<typeof house>>;
  let view: NightView;
  let figures: NightFiguresView;

  const openCall = async (lane: number, equipment: string): Promise<string> => {
    const { open } = good(await h.go(h.desk, 'GET', '/calls')).body as { open: { id: string; lane: number; equipment: string }[] };
    return open.find((call) => call.lane === lane && call.equipment === equipment)?.id ?? '';
  };
  /** Somebody acts on the call of a lane at a time. */
  const act = async (time: string, lane: number, what: 'acknowledge' | 'on-lane' | 'clear', cause?: string): Promise<void> => {
    clock.set(new Date(at(time)).toISOString());
    good(await h.go(h.mechanic, 'POST', `/calls/${await openCall(lane, 'pinsetter')}/${what}`, cause === undefined ? undefined : { cause }));
  };
  const tell = async (time: string, ...events: EventGiven[]): Promise<void> => {
    clock.set(new Date(at(time)).toISOString());
    await h.send(...events);
  };
  const look = async (time: string): Promise<void> => {
    clock.set(new Date(at(time)).toISOString());
    await h.slices.readiness.watch(h.centre, clock.now());
  };

  beforeAll(async () => {
    clock.set(`${DATE}T17:30:00Z`);
    h = await house();
    await h.slices.runs.addPattern(h.centre, { code: 'owls', name: 'Night Owls', revision: aRevision(40), by: 'test' });
    await h.slices.runs.addMachine(h.centre, { code: 'm1', name: 'Machine 1', capabilities: CAN });
    const league = { lastDate: DATE, teams: 2, revision: 1, pattern: 'owls' };
    good(await h.go(h.desk, 'POST', '/leagues', aLeague({ ...league, name: 'Early', fromLane: 1, toLane: 2, startMinutes: 19 * 60 })));
    good(await h.go(h.desk, 'POST', '/leagues', aLeague({ ...league, name: 'Late', fromLane: 3, toLane: 4, startMinutes: 21 * 60 + 30 })));
    // Dressed before the house opens: 5.9 mL on lanes 1 and 2, a volume that nobody told on lane 3.
    await tell('18:00', { type: 'run.started', data: { machine: 'm1', run: '118', pattern: 'owls', revision: 1, lanes: [1, 2, 3] }, time: at('17:50') },
      dressed(1, '17:50', '17:52', { conditionerMl: { a: 5.9 }, measured: true }), dressed(2, '17:52', '17:54', { conditionerMl: { a: 5.9 }, measured: true }), dressed(3, '17:54', '17:56'),
      { type: 'run.finished', data: { machine: 'm1', run: '118' }, time: at('17:57') }, ...[1, 2, 3, 4].map((lane) => ({ type: 'pinsetter.on', data: { lane }, time: at('17:58') })));
    await tell('18:40', opened(3, 'open', '18:00'), counted(3, 90, 60, '18:30'));
    await look('18:49:50');
    await look('18:50:05');
    await tell('19:05', opened(1, 'league', '18:50'), opened(2, 'league', '18:50'), counted(1, 20, 0, '18:58'), counted(2, 20, 0, '18:58'));
    await tell('19:10', { type: 'pinsetter.stopped', data: { lane: 1 } });
    await act('19:11:30', 1, 'acknowledge');
    await tell('19:12', counted(2, 8, 5, '19:12'));
    await act('19:13', 1, 'on-lane');
    await tell('19:16', { type: 'pinsetter.restarted', data: { lane: 1 } });
    await act('19:16:30', 1, 'clear', 'lift.belt-slips');
    await tell('19:32', { type: 'pinsetter.stopped', data: { lane: 3 }, time: at('19:30') }, { type: 'pinsetter.restarted', data: { lane: 3 }, time: at('19:32') });
    await tell('19:40', { type: 'pinsetter.stopped', data: { lane: 2 } });
    await act('19:40:30', 2, 'acknowledge');
    await act('19:42', 2, 'on-lane');
    await act('19:45', 2, 'clear', 'sensor.dirty');
    await tell('20:00', counted(3, 70, 40, '19:55'), closed(3, '20:00'), counted(4, 60, 40, '19:20', 'estimated'));
    good(await h.go(h.mechanic, 'POST', '/lanes/4/out-of-service', { reason: 'Belt of the ball lift is torn' }));
    await tell('20:30', { type: 'call.requested', data: { lane: 1 } });
    await act('20:31', 1, 'acknowledge');
    await act('20:32', 1, 'on-lane');
    await act('20:35', 1, 'clear', 'bowler.ball-on-rake');
    await tell('20:55', { type: 'equipment.faulted', data: { equipment: 'ball-return', lane: 1 }, time: at('20:50') }, { type: 'equipment.restored', data: { equipment: 'ball-return', lane: 1 }, time: at('20:55') });
    await look('21:19:50');
    await look('21:20:05');
    await tell('21:20:06', counted(1, 500, 320, '21:19'), counted(2, 452, 275, '21:19'), closed(1, '21:20'), closed(2, '21:20'));
    clock.set(`${DATE}T21:30:00Z`);
    good(await h.go(h.mechanic, 'POST', '/lanes/4/back-in-service'));
    clock.set(`${DATE}T22:30:00Z`);
    view = await h.night(DATE);
    figures = view.figures;
  });

  it('is the business day from cut to cut, still running, without a report', () => {
    expect(view).toMatchObject({ date: DATE, from: at('04:00'), to: at('04:00') + 24 * HOUR, at: at('22:30'), running: true, report: null, differs: [], nights: [] });
  });

  it('occupancy: 300 league and 120 paid minutes of 960; of 870 in service', () => {
    // League on lanes 1 and 2 from 18:50 to 21:20, open play on lane 3 from 18:00 to 20:00; lane 4 is out from 20:00 to 21:30.
    expect(figures.total.use).toEqual({ league: 300 * MIN, paid: 120 * MIN, unpaid: 0, blocked: 90 * MIN, outOfService: 90 * MIN, idle: 450 * MIN, open: 960 * MIN });
    expect(figures.total.occupancyOfAll).toBeCloseTo(0.4375, 12);
    expect(figures.total.occupancyInService).toBeCloseTo(420 / 870, 12);
    expect(figures.byLane.map((lane) => lane.occupancy)).toEqual([0.625, 0.625, 0.5, 0]);
  });

  it('frames and deliveries: warm-up balls are deliveries alone, estimated frames stand apart', () => {
    // Lane 1: 20 + 500; lane 2: 20 + 8 + 452; lane 3: 90 + 70; lane 4: 60.
    expect(figures.byLane.map((lane) => [lane.deliveries, lane.frames, lane.framesEstimated])).toEqual([[520, 320, 0], [480, 280, 0], [160, 100, 0], [60, 0, 40]]);
    expect(figures.total).toMatchObject({ deliveries: 1_220, frames: 700, framesEstimated: 40, lineage: 70 });
    expect(figures.byKind.map((kind) => [kind.kind, kind.frames, kind.framesEstimated, kind.playedMs / MIN, kind.stops, kind.calls])).toEqual([['league', 600, 0, 300, 1, 4], ['open', 100, 0, 120, 1, 1], ['unassigned', 0, 40, 0, 0, 0]]);
  });

  it('calls per thousand frames with their exact interval, frames per stop, and the gross rate', () => {
    // Lane 1's stop was the ball lift's belt, which counts apart; lanes 2 and 3 stopped by themselves; a bowler's; the pair's return.
    expect(figures.total).toMatchObject({ stops: 2, calls: 5, bowlerCalls: 1, foreignCalls: 0 });
    for (const [rate, expected] of [[figures.total.rate, byTable(2, 700)], [figures.total.grossRate, byTable(5, 700)]] as const) {
      expect(rate?.perThousand).toBeCloseTo(expected.perThousand, 10);
      expect(rate?.low).toBeCloseTo(expected.low, 4);
      expect(rate?.high).toBeCloseTo(expected.high, 4);
    }
    expect(figures.total.framesPerStop).toMatchObject({ value: 350 });
    // 700 ÷ 7.22469 and 700 ÷ 0.24221.
    expect(figures.total.framesPerStop?.low).toBeCloseTo(96.89, 2);
    expect(figures.total.framesPerStop?.high).toBeCloseTo(2_890.05, 0);
    expect(figures.byLane.map((lane) => lane.rate?.perThousand ?? null)).toEqual([0, 1000 / 280, 10, null]);
  });

  it('downtime of each lane, and the part of it in which somebody wanted the lane', () => {
    // Lane 1: 6 + 5 of the return; lane 2: 5 + 5; lane 3: 2; lane 4: 90, wanted from the late league's warm-up at 21:20 to 21:30.
    expect(figures.byLane.map((lane) => [lane.downMs / MIN, lane.wantedDownMs / MIN])).toEqual([[11, 11], [10, 10], [2, 2], [90, 10]]);
    expect([figures.total.downMs / MIN, figures.total.wantedDownMs / MIN]).toEqual([113, 33]);
  });

  it('league minutes lost: once for the pair, less what they bowled on its other lane', () => {
    // 6 + 5 + 5 minutes; a reading of lane 2 at 19:12 says that it was bowled on for the minute and a half before.
    expect(figures.leagueLostMs / MIN).toBe(14.5);
  });

  it('times to acknowledge, to reach and to restore: median and 90th percentile, missing taps left out', () => {
    const s = 1_000;
    // 30, 60, 90 s; 120, 120, 180 s; 120, 300, 300, 300, 360 s. Type 7: 60 + 0.8·30, 120 + 0.8·60, 300 + 0.6·60.
    expect(figures.acknowledged).toEqual({ median: 60 * s, p90: 84 * s, n: 3 });
    expect(figures.onLane).toEqual({ median: 120 * s, p90: 168 * s, n: 3 });
    expect(figures.restored).toEqual({ median: 300 * s, p90: 336 * s, n: 5 });
  });

  it('sessions ready at warm-up, and lanes dressed', () => {
    expect(figures.ready).toEqual({ ready: 1, of: 2 });
    expect(figures.dressed).toEqual({ lanes: 3, ul: 11_800, told: 2 });
  });
});

describe('nights at the edge', () => {
  it('one on which nothing happened: no rate, not a rate of 0', async () => {
    clock.set('2026-05-14T22:30:00Z');
    const { night } = await house();
    const { figures, running, report, differs, past } = await night('2026-05-10');
    expect([running, report, differs]).toEqual([false, null, []]);
    expect(figures).toMatchObject({
      total: { deliveries: 0, frames: 0, framesEstimated: 0, stops: 0, calls: 0, rate: null, grossRate: null, framesPerStop: null, occupancyOfAll: 0, occupancyInService: 0, downMs: 0, wantedDownMs: 0 },
      byKind: [], leagueLostMs: 0, ready: { ready: 0, of: 0 }, dressed: { lanes: 0, ul: 0, told: 0 },
    });
    expect(figures.total.use).toMatchObject({ idle: 16 * HOUR, open: 16 * HOUR });
    for (const spread of [figures.acknowledged, figures.onLane, figures.restored]) expect(spread).toEqual({ median: null, p90: null, n: 0 });
    expect(past['occupancy']).toEqual({ median: null, low: null, high: null, n: 0 });
  });

  it('a lane forgotten open ends ten minutes after its last ball; a stop over the cut is one stop, and down on both days', async () => {
    clock.set('2026-05-15T18:45:00Z');
    const { night, send } = await house();
    const on = (time: string): number => Date.parse(`2026-05-${time}:00Z`);
    await send({ type: 'lane.opened', data: { lane: 1, use: 'open' }, time: on('14T18:00') }, { type: 'lane.counted', data: { lane: 1, deliveries: 40, frames: 20 }, time: on('14T19:00') },
      { type: 'pinsetter.stopped', data: { lane: 2 }, time: on('14T21:30') }, { type: 'pinsetter.restarted', data: { lane: 2 }, time: on('15T18:30') });
    const [first, second] = [(await night('2026-05-14')).figures, (await night('2026-05-15')).figures];
    expect(first).toMatchObject({ total: { use: { paid: 70 * MIN }, stops: 1, downMs: 30 * MIN, wantedDownMs: 0 }, restored: { median: 21 * HOUR, n: 1 } });
    expect(second).toMatchObject({ total: { use: { paid: 0, open: 4 * 45 * MIN }, stops: 0, calls: 0, downMs: 30 * MIN }, restored: { n: 0 } });
  });

  it('one that hasn’t begun isn’t there; tonight’s begins at the cut, not at midnight', async () => {
    clock.set('2026-05-15T03:59:00Z');
    const { go, manager, night } = await house();
    for (const date of ['2026-05-15', '2026-05-16', '2999-12-31']) expect(refused(await go(manager, 'GET', `/nights/${date}`))).toMatchObject({ status: 404, code: 'night.not-begun', params: { date } });
    expect((await night('2026-05-14')).running).toBe(true);
    clock.set('2026-05-15T04:00:00Z');
    expect((await night('2026-05-15')).running).toBe(true);
    expect((await night('2026-05-14')).running).toBe(false);
  });

  it.each([
    ['2026-02-30', 'night.date-invalid'], ['2026-13-01', 'night.date-invalid'], ['2025-02-29', 'night.date-invalid'], ['yesterday', 'input.invalid'], ['1999-12-31', 'input.invalid'], ['14.5.2026', 'input.invalid'],
  ])('%s is no date: %s', async (date, code) => {
    clock.set('2026-05-14T22:30:00Z');
    const { go, manager } = await house();
    const answer = await go(manager, 'GET', `/nights/${date}`);
    expect(refused(answer)).toMatchObject({ status: 422, code, at: '/date' });
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
  });

  it('only the manager sees one, and only of the own centre', async () => {
    clock.set('2026-05-14T22:30:00Z');
    const [mine, other] = [await house(), await house()];
    const statuses = await Promise.all([mine.manager, mine.desk, mine.mechanic, other.manager, { cookie: '' }].map(async (who) => (await mine.go(who, 'GET', '/nights/2026-05-14')).status));
    expect(statuses).toEqual([200, 403, 403, 404, 401]);
  });
});

describe('business days of other lengths', () => {
  it.each([
    ['23 hours, when the clocks go forward', '2026-03-28', '2026-03-28T03:00:00Z', '2026-03-29T02:00:00Z', 23],
    ['25 hours, when they go back', '2026-10-24', '2026-10-24T02:00:00Z', '2026-10-25T03:00:00Z', 25],
    ['24 hours', '2026-05-13', '2026-05-13T02:00:00Z', '2026-05-14T02:00:00Z', 24],
  ])('%s', async (_, date, from, to, hours) => {
    const [begin, end] = [Date.parse(from), Date.parse(to)];
    clock.set(new Date(end + 3 * HOUR).toISOString());
    // Open day and night: from one cut to the next.
    const { night, send } = await house({ zone: 'Europe/Berlin', opening: { from: 240, to: 1_680 } });
    const counted = (frames: number, time: number): EventGiven => ({ type: 'lane.counted', data: { lane: 1, deliveries: 2 * frames, frames, basis: 'scored' }, time });
    await send({ type: 'lane.opened', data: { lane: 1, use: 'open' }, time: begin }, counted(1, begin - 1), counted(10, begin), ...Array.from({ length: hours - 1 }, (_, i) => counted(3, begin + (i + 1) * HOUR)), counted(100, end - 1), counted(1_000, end),
      { type: 'lane.closed', data: { lane: 1 }, time: end + 1 });
    const view = await night(date);
    expect([view.from, view.to, view.running]).toEqual([begin, end, false]);
    expect(view.figures.total).toMatchObject({ frames: 10 + 3 * (hours - 1) + 100, use: { open: 4 * hours * HOUR, paid: hours * HOUR }, occupancyOfAll: 0.25 });
    expect(view.figures.total.rate).toMatchObject({ perThousand: 0, low: 0 });
  });

  it('closing time inside the hour that the clocks skip: open until they are put forward', async () => {
    clock.set('2026-03-29T09:00:00Z');
    const { night } = await house({ zone: 'Europe/Berlin', opening: { from: 18 * 60, to: 26 * 60 + 30 } });
    // From 18:00 (17:00 UTC) until 02:00 becomes 03:00 (01:00 UTC): eight hours on four lanes.
    expect((await night('2026-03-28')).figures.total.use.open).toBe(4 * 8 * HOUR);
    // A night like any other: eight and a half.
    expect((await night('2026-03-27')).figures.total.use.open).toBe(4 * 8.5 * HOUR);
  });
});
