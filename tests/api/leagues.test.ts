import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { aLeague, good, type LeagueHouse, leagueHouse, refused } from '#tests/support/league-house.ts';
import { countRows } from '#tests/support/builders.ts';

const clock = fixedClock('2026-05-14T12:00:00Z');
let database: TestDatabase;
let world: LeagueHouse;
beforeAll(async () => {
  database = await freshDatabase();
  world = await leagueHouse(database, clock);
});
beforeEach(() => void clock.set('2026-05-14T12:00:00Z'));
afterAll(async () => {
  await world.close();
  await database.close();
});

describe('a league makes its season', () => {
  it('at the same wall time every week, skip weeks left out', async () => {
    const { league } = await world.house();
    const { sessions } = await league({ skipDates: ['2026-05-28'] });
    expect(sessions.map((session) => session.date)).toEqual(['2026-05-14', '2026-05-21', '2026-06-04', '2026-06-11']);
    expect(sessions[0]?.lanes).toEqual([5, 6, 7, 8]);
  });

  it('over both changes of the clocks', async () => {
    const { league } = await world.house({ zone: 'America/Chicago' });
    const { sessions } = await league({ weekday: 4, startMinutes: 1110, firstDate: '2026-10-29', lastDate: '2027-03-18' });
    const utc = Object.fromEntries(sessions.map((session) => [session.date, new Date(session.startAt).toISOString()]));
    expect(utc['2026-10-29']).toBe('2026-10-29T23:30:00.000Z');
    expect(utc['2026-11-05']).toBe('2026-11-06T00:30:00.000Z');
    expect(utc['2027-03-11']).toBe('2027-03-12T00:30:00.000Z');
    expect(utc['2027-03-18']).toBe('2027-03-18T23:30:00.000Z');
  });

  it('a night after midnight belongs to the business day before', async () => {
    const { league } = await world.house();
    const { sessions } = await league({ weekday: 5, startMinutes: 30, firstDate: '2026-05-15', lastDate: '2026-05-15' });
    expect(sessions[0]?.date).toBe('2026-05-14');
  });

  it('only nights that are still to come', async () => {
    const { league } = await world.house();
    const { sessions } = await league({ firstDate: '2026-04-16' });
    expect(sessions[0]?.date).toBe('2026-05-14');
  });
});

describe('bad input is refused with a code beside its field, and writes nothing', () => {
  it.each([
    [{ fromLane: 5, toLane: 4 }, 'league.lanes-reversed', '/fromLane'],
    [{ fromLane: 5, toLane: 5 }, 'league.lanes-whole-pairs', '/fromLane'],
    [{ fromLane: 4, toLane: 7 }, 'league.lanes-whole-pairs', '/fromLane'],
    [{ fromLane: 11, toLane: 14 }, 'league.lanes-outside-house', '/toLane'],
    [{ teams: 5 }, 'league.teams-exceed-lanes', '/teams'],
    [{ absent: 8 }, 'league.absent-too-many', '/absent'],
    [{ lastDate: '2026-05-01' }, 'league.season-reversed', '/lastDate'],
    [{ lastDate: '2028-05-01' }, 'league.season-too-long', '/lastDate'],
    [{ firstDate: '2026-02-30' }, 'league.date-invalid', '/firstDate'],
    [{ pattern: 'nowhere' }, 'league.pattern-unknown', '/pattern'],
    [{ revision: 9 }, 'league.pattern-unknown', '/revision'],
  ])('%o: %s', async (change, code, at) => {
    const { desk, go, centre } = await world.house();
    expect(refused(await go(desk, 'POST', '/leagues', aLeague(change)))).toMatchObject({ status: 422, code, at });
    expect([await countRows(database.db, 'league', centre), await countRows(database.db, 'session', centre)]).toEqual([0, 0]);
  });

  it('a start inside the missing hour, with its date; skipped, the season stands', async () => {
    const { desk, go, league } = await world.house({ zone: 'America/Chicago' });
    const sunday = { weekday: 7, startMinutes: 150, firstDate: '2027-03-07', lastDate: '2027-03-21' };
    expect(refused(await go(desk, 'POST', '/leagues', aLeague(sunday)))).toMatchObject({ status: 422, code: 'league.start-in-missing-hour', at: '/startMinutes', params: { date: '2027-03-14' } });
    expect((await league({ ...sunday, skipDates: ['2027-03-14'] })).sessions).toHaveLength(2);
  });

  it('a name that is taken', async () => {
    const { desk, go, league } = await world.house();
    await league();
    expect(refused(await go(desk, 'POST', '/leagues', aLeague({ fromLane: 1, toLane: 4 })))).toMatchObject({ status: 422, code: 'league.name-taken', at: '/name' });
  });
});

describe('lanes are booked once', () => {
  it('another league on the same lanes at that time is refused, and told whose they are', async () => {
    const { desk, go, league } = await world.house();
    await league();
    const answer = refused(await go(desk, 'POST', '/leagues', aLeague({ name: 'Late Doubles', fromLane: 7, toLane: 10, startMinutes: 21 * 60 })));
    expect(answer).toMatchObject({ status: 409, code: 'league.lanes-taken', at: '/fromLane', params: { name: 'Night Owls', from: 7, to: 8, date: '2026-05-14' } });
  });

  it('neighbours and later leagues on the same lanes are fine', async () => {
    const { league } = await world.house();
    await league();
    await league({ name: 'Next door', fromLane: 1, toLane: 4 });
    await league({ name: 'Later', startMinutes: 23 * 60 });
    await league({ name: 'Other day', weekday: 2 });
  });

  it('of twenty who book one lane at once, one gets it', async () => {
    const { desk, go, centre } = await world.house();
    const party = (i: number) => ({ kind: 'party', name: `Party ${i}`, date: '2026-05-14', startMinutes: 18 * 60 + i, minutes: 120, fromLane: 3, toLane: 4 });
    const answers = await Promise.all(Array.from({ length: 20 }, (_, i) => go(desk, 'POST', '/bookings', party(i))));
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, ...Array.from({ length: 19 }, () => 409)]);
    expect(await countRows(database.db, 'session', centre)).toBe(1);
  });
});

describe('changing a league', () => {
  it('changes the nights to come under their ids, keeps those set by hand, cancels those it no longer has', async () => {
    const { desk, go, league } = await world.house();
    const { id, sessions } = await league();
    const [first, second, third] = sessions;
    good(await go(desk, 'PUT', `/bookings/${second?.id}`, { lanes: [1, 2, 3, 4], date: '2026-05-21', startMinutes: 20 * 60 + 15 }));
    const changed = good(await go(desk, 'PUT', `/leagues/${id}`, aLeague({ fromLane: 9, toLane: 12, skipDates: ['2026-05-28'] }))).body as { sessions: { id: string; lanes: number[]; status: string }[] };
    const now = Object.fromEntries(changed.sessions.map((session) => [session.id, session]));
    expect(now[first?.id ?? '']).toMatchObject({ lanes: [9, 10, 11, 12], status: 'booked' });
    expect(now[second?.id ?? '']).toMatchObject({ lanes: [1, 2, 3, 4], status: 'booked' });
    expect(now[third?.id ?? '']).toMatchObject({ status: 'cancelled' });
    const again = good(await go(desk, 'PUT', `/leagues/${id}`, aLeague())).body as { sessions: { id: string; status: string }[] };
    expect(again.sessions.find((session) => session.id === third?.id)?.status).toBe('booked');
  });

  it('a cancelled night frees its lanes and can\'t be cancelled twice', async () => {
    const { desk, go, league } = await world.house();
    const { sessions } = await league();
    const cancel = () => go(desk, 'POST', `/bookings/${sessions[0]?.id}/cancel`);
    expect((await cancel()).status).toBe(200);
    expect(refused(await cancel())).toMatchObject({ status: 409, code: 'booking.cancelled' });
    good(await go(desk, 'POST', '/bookings', { kind: 'party', name: 'Party', date: '2026-05-14', startMinutes: 1215, minutes: 60, fromLane: 5, toLane: 8 }));
  });

  it('a league ends: nothing is booked any more, and it can\'t be changed', async () => {
    const { desk, go, league } = await world.house();
    const { id } = await league();
    const ended = good(await go(desk, 'POST', `/leagues/${id}/end`)).body as { league: { ended: boolean; nights: number } };
    expect(ended.league).toMatchObject({ ended: true, nights: 0 });
    expect(refused(await go(desk, 'PUT', `/leagues/${id}`, aLeague()))).toMatchObject({ status: 409, code: 'league.ended' });
  });

  it('a league\'s night moves in whole pairs only', async () => {
    const { desk, go, league } = await world.house();
    const { sessions } = await league();
    const move = (lanes: number[]) => go(desk, 'PUT', `/bookings/${sessions[0]?.id}`, { lanes, date: '2026-05-14', startMinutes: 1215 });
    expect(refused(await move([1, 2, 3]))).toMatchObject({ status: 422, code: 'league.lanes-whole-pairs' });
    expect(refused(await move([11, 12, 13, 14]))).toMatchObject({ status: 422, code: 'league.lanes-outside-house' });
    expect((await move([1, 2, 9, 10])).status).toBe(200);
  });
});

describe('time that has passed', () => {
  it.each([
    ['another year', '2025-05-14', 1215], ['yesterday', '2026-05-13', 1215], ['earlier today', '2026-05-14', 11 * 60 + 59],
  ])('%s: a session isn’t moved there, and stays as it was', async (_, date, startMinutes) => {
    const { desk, go, league, centre } = await world.house();
    const { sessions } = await league();
    const rows = () => Promise.all(['session', 'session_lane'].map(async (table) => (await database.db(table).where('centre_id', centre.id)) as unknown[]));
    const before = await rows();
    const answer = await go(desk, 'PUT', `/bookings/${sessions[0]?.id}`, { lanes: [1, 2, 3, 4], date, startMinutes });
    expect(refused(answer)).toMatchObject({ status: 409, code: 'booking.past', at: '/date', params: { date } });
    expect(await rows()).toEqual(before);
  });

  it('nothing is booked into it; a lane that is played on now is', async () => {
    const { desk, go, centre } = await world.house();
    clock.set('2026-05-14T19:00:00Z');
    const book = (date: string, startMinutes: number) => go(desk, 'POST', '/bookings', { kind: 'open', name: 'Odell', date, startMinutes, minutes: 60, fromLane: 1, toLane: 2 });
    for (const [date, startMinutes] of [['2026-05-13', 1215], ['2026-05-14', 18 * 60], ['2025-05-14', 1215]] as const) {
      expect(refused(await book(date, startMinutes))).toMatchObject({ status: 409, code: 'booking.past', at: '/date', params: { date } });
    }
    expect(await database.db('session').where('centre_id', centre.id)).toEqual([]);
    expect((await book('2026-05-14', 18 * 60 + 15)).status).toBe(201);
  });

  it('one that bowls already changes its lanes, and may only begin later', async () => {
    const { desk, go, league } = await world.house();
    const { sessions } = await league();
    clock.set('2026-05-14T20:40:00Z');
    const move = (startMinutes: number) => go(desk, 'PUT', `/bookings/${sessions[0]?.id}`, { lanes: [1, 2, 3, 4], date: '2026-05-14', startMinutes });
    expect(refused(await move(20 * 60 + 10))).toMatchObject({ status: 409, code: 'booking.past' });
    expect(good(await move(20 * 60 + 15)).body).toMatchObject({ lanes: [1, 2, 3, 4], startAt: Date.parse('2026-05-14T20:15:00Z') });
    expect((await move(20 * 60 + 45)).status).toBe(200);
  });

  it('a session that is over is neither moved nor cancelled', async () => {
    const { desk, go, league } = await world.house();
    const { sessions } = await league();
    clock.set('2026-05-14T23:30:00Z');
    expect(refused(await go(desk, 'PUT', `/bookings/${sessions[0]?.id}`, { lanes: [1, 2, 3, 4], date: '2026-05-16', startMinutes: 1215 }))).toMatchObject({ status: 409, code: 'booking.past' });
    expect(refused(await go(desk, 'POST', `/bookings/${sessions[0]?.id}/cancel`))).toMatchObject({ status: 409, code: 'booking.past' });
  });
});

describe('who sees what', () => {
  it('a secretary sees own leagues only, and edits none', async () => {
    const { league, secretary, go, desk } = await world.house();
    const own = await league();
    const other = await league({ name: 'Others', fromLane: 1, toLane: 4 });
    const mara = await secretary([own.id]);
    expect((good(await go(mara, 'GET', '/leagues')).body as { leagues: { id: string; secretaries: string[] }[] }).leagues.map((l) => [l.id, l.secretaries])).toEqual([[own.id, [mara.name]]]);
    expect((await go(mara, 'GET', `/leagues/${own.id}`)).status).toBe(200);
    expect(refused(await go(mara, 'GET', `/leagues/${other.id}`))).toMatchObject({ status: 404, code: 'league.unknown' });
    expect((await go(mara, 'PUT', `/leagues/${own.id}`, aLeague())).status).toBe(403);
    expect((await go(mara, 'GET', '/bookings')).status).toBe(403);
    expect((good(await go(desk, 'GET', '/leagues')).body as { leagues: unknown[] }).leagues).toHaveLength(2);
  });
});
