import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { SessionSummary, SessionView } from '#shared/contracts/readiness.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { good, type LeagueHouse, leagueHouse, refused } from '#tests/support/league-house.ts';

const clock = fixedClock('2026-05-14T19:00:00Z');
const MIN = 60_000;
/** Warm-up of the league: an hour and five minutes after the clock's start. */
const WARM_UP = Date.parse('2026-05-14T20:05:00Z');
let database: TestDatabase;
let world: LeagueHouse;
beforeAll(async () => {
  database = await freshDatabase();
  world = await leagueHouse(database, clock);
});
beforeEach(() => void clock.set('2026-05-14T19:00:00Z'));
afterAll(async () => {
  await world.close();
  await database.close();
});

/** A house with one league tonight on 5–8, its lanes dressed, and its secretary. */
async function evening(change: Parameters<Awaited<ReturnType<LeagueHouse['house']>>['league']>[0] = {}) {
  const house = await world.house({ certifiedUntil: '2026-12-31' });
  const { id, sessions } = await house.league(change);
  const session = sessions[0]?.id ?? '';
  const mara = await house.secretary([id]);
  await house.dress([5, 6, 7, 8], { ago: 20 * MIN });
  const see = (): Promise<SessionView> => house.view(mara, session);
  const post = (who: { cookie: string }, path: string, body?: unknown) => house.go(who, 'POST', `/sessions/${session}${path}`, body);
  return { ...house, league: id, session, mara, see, post, newLeague: house.league };
}
const checkOf = (view: SessionView, lane: number, name: string) => view.lanesSeen.find((one) => one.lane === lane)?.checks.find((check) => check.check === name);

describe('readiness is computed when read', () => {
  it('ready when every lane is as asked, with its checks', async () => {
    const { see } = await evening();
    const view = await see();
    expect(view).toMatchObject({ name: 'Night Owls', verdict: 'ready', phase: 'next', frozen: false, says: 'All four lanes are as asked.', lanes: [5, 6, 7, 8] });
    expect(checkOf(view, 5, 'pattern')).toMatchObject({ verdict: 'ok', code: 'pattern.dressed' });
  });

  it('a stop holds its lane at once, and running again frees it though the cause is missing', async () => {
    const { see, device } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    expect(await see()).toMatchObject({ verdict: 'held', marks: [{ lane: 5, mark: 'ok' }, { lane: 6, mark: 'ok' }, { lane: 7, mark: 'holds' }, { lane: 8, mark: 'ok' }] });
    expect((await see()).says).toBe('Lane 7 waits for a mechanic and must run by 20:05; nobody has answered.');
    clock.advance(MIN);
    await device('pinsetter.restarted', { lane: 7 });
    expect((await see()).verdict).toBe('ready');
  });

  it('a ball return holds both lanes of its pair', async () => {
    const { see, device } = await evening();
    await device('equipment.faulted', { equipment: 'ball-return', lane: 5 });
    expect((await see()).marks.map((one) => one.mark)).toEqual(['holds', 'holds', 'ok', 'ok']);
  });

  it('wrong revision holds; a planned run that ends in time makes it planned; a run that broke off holds again', async () => {
    const { see, dress, go, mechanic, device } = await evening();
    clock.advance(2 * MIN);
    await dress([5, 6, 7, 8], { revision: 2, run: 'wrong' });
    expect(await see()).toMatchObject({ verdict: 'held' });
    expect(checkOf(await see(), 5, 'pattern')).toMatchObject({ code: 'pattern.other', params: { pattern: 'owls', revision: 2 } });
    good(await go(mechanic, 'POST', '/runs/planned', { machine: 'm1', run: '118', pattern: 'owls', revision: 3, lanes: [5, 6, 7, 8], startAt: WARM_UP - 30 * MIN }));
    expect(await see()).toMatchObject({ verdict: 'planned', says: expect.stringMatching(/^Lanes 5–8 will be at 19:43\.$/) as string });
    clock.set('2026-05-14T19:36:00Z');
    await device('run.started', { machine: 'm1', run: '118', pattern: 'owls', revision: 3, lanes: [5, 6, 7, 8] });
    await device('run.aborted', { machine: 'm1', run: '118', lane: 5, reason: 'jam' });
    const broken = await see();
    expect(broken.verdict).toBe('held');
    expect(checkOf(broken, 5, 'run-complete')).toMatchObject({ verdict: 'holds', code: 'run.broken-off' });
  });

  it('sanctioned play wants a certificate on its date', async () => {
    const { see, go, manager } = await evening({ sanctioned: true });
    expect((await see()).verdict).toBe('ready');
    good(await go(manager, 'PUT', '/readiness-checks', { weights: { ...(good(await go(manager, 'GET', '/readiness-checks')).body as { weights: object }).weights, certificate: 'warns' } }));
    expect((await see()).verdict).toBe('ready');
  });

  it('the centre says what is ignored', async () => {
    const { see, device, go, manager } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    const { weights } = good(await go(manager, 'GET', '/readiness-checks')).body as { weights: Record<string, string> };
    good(await go(manager, 'PUT', '/readiness-checks', { weights: { ...weights, pinsetter: 'ignored' } }));
    expect((await see()).verdict).toBe('ready');
  });
});

describe('the secretary\'s word', () => {
  it('confirms when nothing holds: who, when, and what was shown', async () => {
    const { post, mara, see, session, centre } = await evening();
    expect(good(await post(mara, '/confirm')).body).toMatchObject({ confirmation: { by: mara.name, at: clock.now(), reopened: null } });
    const row = await database.db('confirmation').where('centre_id', centre.id).first() as { shown: { lanes: number[]; checks: unknown[] }; shown_sha256: string };
    expect(row.shown_sha256).toMatch(/^[0-9a-f]{64}$/);
    const facts = await world.ledger.facts(centre, 0, clock.now() + 1000);
    expect(facts.filter((fact) => fact.type === 'session.confirmed').map((fact) => fact.data)).toEqual([{ session, lanes: [5, 6, 7, 8] }]);
    expect(refused(await post(mara, '/confirm'))).toMatchObject({ status: 409, code: 'readiness.already-confirmed', params: { by: mara.name } });
    expect((await see()).confirmations).toHaveLength(1);
  });

  it('is refused while something holds, naming the lanes', async () => {
    const { post, mara, device } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    expect(refused(await post(mara, '/confirm'))).toMatchObject({ status: 409, code: 'readiness.holds', params: { lanes: '7' } });
  });

  it('is refused from warm-up on', async () => {
    const { post, mara } = await evening();
    clock.set('2026-05-14T20:04:59Z');
    expect((await post(mara, '/confirm')).status).toBe(200);
    const late = await evening();
    clock.set('2026-05-14T20:05:00Z');
    expect(refused(await late.post(late.mara, '/confirm'))).toMatchObject({ status: 409, code: 'readiness.frozen' });
  });

  it('of two delegates at once one is heard', async () => {
    const { post, mara, league, secretary } = await evening();
    const other = await secretary([league]);
    const answers = await Promise.all([post(mara, '/confirm'), post(other, '/confirm')]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
  });

  it('raises a concern that the desk settles, once', async () => {
    const { post, mara, desk, see, go } = await evening();
    const raised = good(await post(mara, '/concerns', { text: 'Lane 6 looked dry on the left.', lane: 6 })).body as SessionView;
    expect(raised).toMatchObject({ concerns: 1, raised: [{ by: mara.name, text: 'Lane 6 looked dry on the left.', lane: 6, settled: null }] });
    expect(refused(await post(mara, '/concerns', { text: 'x', lane: 3 }))).toMatchObject({ status: 422, code: 'readiness.lane-not-of-session', at: '/lane' });
    const concern = raised.raised[0]?.id ?? '';
    expect(refused(await post(mara, `/concerns/${concern}/settle`, { note: 'no' })).status).toBe(403);
    expect(good(await post(desk, `/concerns/${concern}/settle`, { note: 'Looked at it: as asked.' })).body).toMatchObject({ concerns: 0, raised: [{ settled: { by: desk.name } }] });
    expect(refused(await post(desk, `/concerns/${concern}/settle`, { note: 'again' }))).toMatchObject({ status: 409, code: 'concern.settled' });
    expect((await see()).concerns).toBe(0);
    expect((await go(desk, 'GET', '/sessions')).status).toBe(200);
  });
});

describe('own leagues only', () => {
  it('another league\'s session, and a party, look as if they weren\'t there', async () => {
    const { newLeague, mara, go, session, desk, mechanic } = await evening();
    const other = await newLeague({ name: 'Others', fromLane: 1, toLane: 4 });
    const party = good(await go(desk, 'POST', '/bookings', { kind: 'party', name: 'Party', date: '2026-05-14', startMinutes: 1200, minutes: 60, fromLane: 9, toLane: 9 })).body as { id: string };
    const list = good(await go(mara, 'GET', '/sessions')).body as { sessions: SessionSummary[] };
    expect(list.sessions.map((one) => one.id)).toEqual([session]);
    for (const hidden of [other.sessions[0]?.id, party.id]) {
      expect(refused(await go(mara, 'GET', `/sessions/${hidden}`))).toMatchObject({ status: 404, code: 'booking.unknown' });
      expect(refused(await go(mara, 'POST', `/sessions/${hidden}/confirm`))).toMatchObject({ status: 404, code: 'booking.unknown' });
      expect(refused(await go(mara, 'POST', `/sessions/${hidden}/concerns`, { text: 'x' }))).toMatchObject({ status: 404, code: 'booking.unknown' });
    }
    expect((good(await go(desk, 'GET', '/sessions')).body as { sessions: unknown[] }).sessions).toHaveLength(3);
    expect((await go(mechanic, 'POST', `/sessions/${session}/confirm`)).status).toBe(403);
    expect((await go(mara, 'POST', `/sessions/${session}/move`, { fromPair: 5, toPair: 1 })).status).toBe(403);
  });
});

describe('offers and moves', () => {
  it('offers the nearest pair that is as asked and booked by nobody; the desk takes it', async () => {
    const { see, device, dress, post, desk, mara } = await evening();
    clock.advance(10 * MIN);
    await dress([1, 2, 3, 4, 9, 10], { run: 'more' });
    await device('pinsetter.stopped', { lane: 7 });
    expect((await see()).offers.offers[0]).toEqual({ kind: 'move', fromPair: 7, toPair: 9, deliveries: 0 });
    good(await post(mara, '/concerns', { text: 'Please.' }));
    const moved = good(await post(desk, '/move', { fromPair: 7, toPair: 9 })).body as SessionView;
    expect(moved).toMatchObject({ lanes: [5, 6, 9, 10], verdict: 'ready' });
  });

  it('never one that is booked, and a move there is refused', async () => {
    const { see, device, dress, post, desk, go } = await evening();
    clock.advance(10 * MIN);
    await dress([3, 4, 9, 10], { run: 'more' });
    await device('pinsetter.stopped', { lane: 7 });
    good(await go(desk, 'POST', '/bookings', { kind: 'party', name: 'Late party', date: '2026-05-14', startMinutes: 22 * 60, minutes: 60, fromLane: 9, toLane: 9 }));
    expect((await see()).offers.offers[0]).toMatchObject({ kind: 'move', toPair: 3 });
    expect(refused(await post(desk, '/move', { fromPair: 7, toPair: 9 }))).toMatchObject({ status: 409, code: 'league.lanes-taken', params: { name: 'Late party' } });
    expect(refused(await post(desk, '/move', { fromPair: 1, toPair: 3 }))).toMatchObject({ status: 422, code: 'readiness.pair-not-of-session' });
    await device('pinsetter.stopped', { lane: 3 });
    expect(refused(await post(desk, '/move', { fromPair: 7, toPair: 3 }))).toMatchObject({ status: 409, code: 'readiness.pair-not-free' });
  });

  it('of two leagues that are moved to one pair at once, one gets it', async () => {
    const { go, desk, newLeague, session } = await evening();
    const other = await newLeague({ name: 'Others', fromLane: 1, toLane: 4 });
    const move = (id: string | undefined, fromPair: number) => go(desk, 'POST', `/sessions/${id}/move`, { fromPair, toPair: 11 });
    const answers = await Promise.all([move(session, 5), move(other.sessions[0]?.id, 1)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
  });
});

describe('bars of the floor', () => {
  it('say phase, verdict, lanes and who confirmed', async () => {
    const { centre, device, post, mara, session, go, desk } = await evening();
    good(await go(desk, 'POST', '/bookings', { kind: 'party', name: 'Party', date: '2026-05-14', startMinutes: 18 * 60 + 30, minutes: 60, fromLane: 9, toLane: 10 }));
    good(await post(mara, '/confirm'));
    await device('pinsetter.stopped', { lane: 7 });
    const { state } = await world.ledger.read(centre);
    const bars = await world.readiness.upcoming(centre, state, clock.now());
    expect(bars.map((bar) => [bar.name, bar.phase, bar.verdict, bar.confirmed?.by ?? null])).toEqual([['Party', 'now', null, null], ['Night Owls', 'next', 'held', mara.name]]);
    expect(bars[1]).toMatchObject({ id: session, fromLane: 5, toLane: 8, lanes: [{ lane: 5, state: 'ok' }, { lane: 6, state: 'ok' }, { lane: 7, state: 'holds' }, { lane: 8, state: 'ok' }] });
  });
});
