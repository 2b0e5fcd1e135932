import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { aLeague, good, type LeagueHouse, leagueHouse } from '#tests/support/league-house.ts';
import { readinessWatch } from '../../jobs/readiness-watch.ts';

const clock = fixedClock('2026-05-14T19:00:00Z');
const MIN = 60_000;
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

async function evening() {
  const house = await world.house();
  const { id, sessions } = await house.league();
  const session = sessions[0]?.id ?? '';
  const mara = await house.secretary([id]);
  await house.dress([5, 6, 7, 8], { ago: 20 * MIN });
  const row = async () => database.db('session_verdict').where('centre_id', house.centre.id).first() as Promise<{ verdict: string; since: Date; frozen_at: Date | null; transitions: { verdict: string }[] }>;
  const confirm = async () => good(await house.go(mara, 'POST', `/sessions/${session}/confirm`));
  const see = () => house.view(mara, session);
  /** Looks every ten seconds until an instant, as the schedule does. */
  const watchUntil = async (iso: string): Promise<void> => {
    for (; clock.now() < Date.parse(iso); clock.advance(10_000)) await house.watch();
    await house.watch();
  };
  return { ...house, session, mara, league: id, row, confirm, see, watchUntil, newLeague: house.league };
}

describe('the verdict is kept', () => {
  it('with its transitions and since when; a look that finds nothing new writes nothing', async () => {
    const { watch, device, row } = await evening();
    expect(await watch()).toBe(1);
    expect(await watch()).toBe(0);
    await device('pinsetter.stopped', { lane: 7 });
    clock.advance(MIN);
    expect(await watch()).toBe(1);
    const kept = await row();
    expect([kept.verdict, kept.since.getTime(), kept.transitions.map((one) => one.verdict)]).toEqual(['held', clock.now(), ['ready', 'held']]);
  });

  it('is frozen at warm-up: what stops afterwards is a call, not readiness', async () => {
    const { watchUntil, device, row, see, centre } = await evening();
    await watchUntil('2026-05-14T20:05:05Z');
    expect(await row()).toMatchObject({ verdict: 'ready', frozen_at: new Date('2026-05-14T20:05:00Z') });
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T20:10:00Z');
    expect(await see()).toMatchObject({ frozen: true, verdict: 'ready', phase: 'warm-up', says: 'Was ready at warm-up.' });
    const from = Date.parse('2026-05-14T04:00:00Z');
    expect(await world.readiness.readyAtWarmUp(centre, from, from + 86_400_000)).toEqual({ sessions: 1, ready: 1, unknown: 0 });
  });

  it('a server that was away at warm-up freezes what it kept before', async () => {
    const { watch, device, row, centre } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    await watch();
    clock.set('2026-05-14T20:30:00Z');
    await watch();
    expect(await row()).toMatchObject({ verdict: 'held', frozen_at: new Date('2026-05-14T20:05:00Z') });
    const from = Date.parse('2026-05-14T04:00:00Z');
    expect(await world.readiness.readyAtWarmUp(centre, from, from + 86_400_000)).toEqual({ sessions: 1, ready: 0, unknown: 0 });
  });
});

describe('mails', () => {
  it('one held session an hour before is one mail each to manager, mechanic and secretary, and no second one', async () => {
    const { device, watchUntil, mails, manager, mechanic, mara } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T19:04:50Z');
    expect(await mails()).toEqual([]);
    await watchUntil('2026-05-14T19:20:00Z');
    const sent = await mails();
    expect(sent.map((mail) => mail.recipient).sort()).toEqual([manager.email, mechanic.email, mara.email].sort());
    expect(new Set(sent.map((mail) => mail.message_id)).size).toBe(3);
    expect(sent[0]).toMatchObject({ subject: 'Night Owls isn’t ready, 60 minutes to warm-up – Tarn Ferry Bowl' });
    expect(sent[0]?.text_body).toContain('Lane 7 waits for a mechanic');
    expect(sent[0]?.text_body).toContain('https://lanes.example/');
  });

  it('again at thirty minutes, and one when it is ready after that', async () => {
    const { device, watchUntil, mails } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T19:36:00Z');
    await device('pinsetter.restarted', { lane: 7 });
    await watchUntil('2026-05-14T20:06:00Z');
    const kinds = (await mails()).map((mail) => mail.mail_key.split('/').at(-1));
    expect(kinds).toEqual(['held-30', 'held-30', 'held-30', 'held-60', 'held-60', 'held-60', 'ready', 'ready', 'ready']);
  });

  it('planned, at risk and ready are not mailed; nor is a secretary of another league told', async () => {
    const { watchUntil, mails, newLeague, secretary, device } = await evening();
    const other = await newLeague({ name: 'Others', fromLane: 1, toLane: 4, startMinutes: 23 * 60 });
    const stranger = await secretary([other.id]);
    await watchUntil('2026-05-14T19:10:00Z');
    expect(await mails()).toEqual([]);
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T19:11:00Z');
    expect((await mails()).map((mail) => mail.recipient)).not.toContain(stranger.email);
    expect(await mails()).toHaveLength(3);
  });

  it('two nodes that look at once write one mail each', async () => {
    const { device, watch, mails } = await evening();
    await device('pinsetter.stopped', { lane: 7 });
    clock.set('2026-05-14T19:06:00Z');
    await Promise.all([watch(), watch(), watch()]);
    expect(await mails()).toHaveLength(3);
  });
});

describe('a confirmation opens again', () => {
  it('when a check is worse for more than a minute, and tells the secretary why', async () => {
    const { confirm, device, watchUntil, see, mails, mara, centre, session } = await evening();
    await confirm();
    await watchUntil('2026-05-14T19:01:00Z');
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T19:02:00Z');
    expect((await see()).confirmation?.reopened).toBeNull();
    await watchUntil('2026-05-14T19:02:30Z');
    expect((await see()).confirmation?.reopened?.because).toEqual({ code: 'reopened.worse', params: { lane: 7, check: 'pinsetter', why: 'pinsetter.unanswered' } });
    expect((await mails()).filter((mail) => mail.mail_key.includes('reopened')).map((mail) => mail.recipient)).toEqual([mara.email]);
    const facts = await world.ledger.facts(centre, 0, clock.now() + MIN);
    expect(facts.filter((fact) => fact.type === 'session.reopened').map((fact) => fact.data)).toEqual([{ session, because: 'reopened.worse' }]);
  });

  it('not for a stop that is over within the minute', async () => {
    const { confirm, device, watchUntil, see } = await evening();
    await confirm();
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T19:00:50Z');
    await device('pinsetter.restarted', { lane: 7 });
    await watchUntil('2026-05-14T19:03:00Z');
    expect((await see()).confirmation?.reopened).toBeNull();
  });

  it.each([
    ['lanes', { fromLane: 1, toLane: 4 }, 'reopened.lanes'], ['pattern', { pattern: 'house', revision: 1 }, 'reopened.pattern'], ['time', { startMinutes: 20 * 60 + 30 }, 'reopened.time'],
  ])('at the next look when its %s change', async (_, change, code) => {
    const { confirm, go, desk, league, watch, see, confirm: again } = await evening();
    await confirm();
    good(await go(desk, 'PUT', `/leagues/${league}`, aLeague(change)));
    await watch();
    expect((await see()).confirmation?.reopened?.because.code).toBe(code);
    if (code === 'reopened.time') expect((await again()).status).toBe(200);
  });

  it('not from warm-up on', async () => {
    const { confirm, device, watchUntil, see } = await evening();
    await confirm();
    await watchUntil('2026-05-14T20:04:30Z');
    await device('pinsetter.stopped', { lane: 7 });
    await watchUntil('2026-05-14T20:10:00Z');
    expect((await see()).confirmation?.reopened).toBeNull();
  });
});

it('the job looks at every centre', async () => {
  const one = await evening();
  const two = await evening();
  await readinessWatch(world.readiness).run(clock.now());
  expect([(await one.row()).verdict, (await two.row()).verdict]).toEqual(['ready', 'ready']);
});
