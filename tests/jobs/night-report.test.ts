import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { NightView } from '#shared/contracts/numbers.ts';
import { createDatabase } from '#server/platform/db/database.ts';
import { makePerson, signIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { aCentre, type CentreGiven } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';
import { aDevice, type EventGiven } from '#tests/support/device.ts';
import { good } from '#tests/support/league-house.ts';
import { startServer, type TestServer } from '#tests/support/server.ts';
import { nightReport } from '../../jobs/night-report.ts';

const MIN = 60_000;
const clock = fixedClock('2026-05-14T22:00:00Z');
let database: TestDatabase;
let server: TestServer;
beforeAll(async () => {
  database = await ownDatabase();
  server = await startServer({ db: database.db, clock });
});
afterAll(async () => {
  await server.close();
  await database.close();
});

const tick = (node: TestServer = server): Promise<void> => nightReport(node.slices.numbers).run(clock.now());

/** A house with two managers, a desk and a mechanic, in a zone of UTC unless it says another: its day ends at four in the morning. */
async function house(given: CentreGiven = {}) {
  const { slices } = server;
  const centre = await aCentre(slices.centre, { name: 'Tarn Ferry Bowl', lanes: 4, ...given });
  const [first, second] = [await makePerson(slices.accounts, { centre, role: 'manager' }), await makePerson(slices.accounts, { centre, role: 'manager' })];
  const mechanic = await makePerson(slices.accounts, { centre, role: 'mechanic' });
  await makePerson(slices.accounts, { centre, role: 'desk' });
  const gateway = await aDevice(server, centre);
  const send = async (...events: EventGiven[]): Promise<void> => {
    const { body } = await gateway.send(events);
    expect(body).toMatchObject({ accepted: events.length, setAside: [] });
  };
  await send({ type: 'gateway.started' });
  const night = async (date: string) => good(await ask(server.url, 'GET', `/api/centres/${centre.slug}/nights/${date}`, { cookie: await signIn(server.url, first) })).body as NightView;
  const issued = async (): Promise<string[]> => database.db('night_report').where('centre_id', centre.id).orderBy('business_date').pluck<string[]>('business_date');
  const mails = () => database.db('mail_outbox').where('centre_id', centre.id).orderBy('id').select('mail_key', 'recipient', 'subject', 'text_body', 'html_body', 'message_id') as
    Promise<{ mail_key: string; recipient: string; subject: string; text_body: string; html_body: string; message_id: string }[]>;
  return { centre, managers: [first.email, second.email].sort(), mechanic, send, night, issued, mails };
}

const counted = (frames: number, time: string): EventGiven => ({ type: 'lane.counted', data: { lane: 1, deliveries: 2 * frames, frames, basis: 'scored' }, time: Date.parse(time) });

describe('the report of a night', () => {
  it('is issued fifteen minutes after the cut, and mailed to each manager once', async () => {
    clock.set('2026-05-14T22:00:00Z');
    const { managers, send, night, issued, mails } = await house();
    await send(counted(640, '2026-05-14T21:00:00Z'));
    clock.set('2026-05-15T04:14:59.999Z');
    await tick();
    expect([await issued(), await mails(), (await night('2026-05-14')).report]).toEqual([[], [], null]);
    clock.set('2026-05-15T04:15:00Z');
    await tick();
    expect(await issued()).toEqual(['2026-05-14']);
    const view = await night('2026-05-14');
    expect(view).toMatchObject({ running: false, nights: ['2026-05-14'], differs: [], report: { issuedAt: clock.now(), figures: { total: { frames: 640, deliveries: 1_280 } } } });
    expect(view.report?.figures).toEqual(view.figures);
    const sent = await mails();
    expect(sent.map((mail) => mail.recipient).sort()).toEqual(managers);
    expect(sent.map((mail) => [mail.mail_key, mail.subject])).toEqual(managers.map(() => ['night-report/2026-05-14', 'Tarn Ferry Bowl: night of Thu 14 May']));
    expect(new Set(sent.map((mail) => mail.message_id)).size).toBe(2);
    for (const text of [sent[0]?.text_body, sent[0]?.html_body]) expect(text).toContain('640');
    for (let minute = 0; minute < 3; minute += 1) {
      clock.advance(MIN);
      await tick();
    }
    expect([await issued(), (await mails()).length]).toEqual([['2026-05-14'], 2]);
  });

  it('by the centre’s own clock and cut, also on the morning when the clocks change', async () => {
    clock.set('2026-10-24T20:00:00Z');
    const [berlin, chicago] = [await house({ zone: 'Europe/Berlin' }), await house({ zone: 'America/Chicago', cut: 5 * 60 })];
    // Four in the morning of 25 October is 03:00 UTC in Berlin, an hour later than the day before.
    clock.set('2026-10-25T03:14:59Z');
    await tick();
    expect([await berlin.issued(), await chicago.issued()]).toEqual([[], []]);
    clock.set('2026-10-25T03:15:00Z');
    await tick();
    expect([await berlin.issued(), await chicago.issued()]).toEqual([['2026-10-24'], []]);
    // Five in the morning in Chicago is 10:00 UTC until November.
    clock.set('2026-10-25T10:15:00Z');
    await tick();
    expect(await chicago.issued()).toEqual(['2026-10-24']);
  });

  it('is one a date, and one letter a manager, when two nodes issue it at the same time', async () => {
    clock.set('2026-06-01T22:00:00Z');
    const { centre, issued, mails } = await house();
    const db = createDatabase(database.url);
    const other = await startServer({ db, clock });
    try {
      for (const day of ['02', '03', '04', '05', '06']) {
        clock.set(`2026-06-${day}T04:15:00Z`);
        await Promise.all([tick(), tick(other), tick(), tick(other)]);
      }
    } finally {
      await other.close();
      await db.destroy();
    }
    const dates = ['2026-06-01', '2026-06-02', '2026-06-03', '2026-06-04', '2026-06-05'];
    expect(await issued()).toEqual(dates);
    expect((await mails()).map((mail) => mail.mail_key).sort()).toEqual(dates.flatMap((date) => [`night-report/${date}`, `night-report/${date}`]));
    expect(await database.db('job_run').where({ centre_id: centre.id, job: 'night-report' }).pluck('business_date')).toHaveLength(dates.length);
  });

  it('after days away every night gets its own, and only the latest is mailed', async () => {
    clock.set('2026-06-30T22:00:00Z');
    const { send, night, issued, mails } = await house();
    clock.set('2026-07-01T04:20:00Z');
    await tick();
    expect(await issued()).toEqual(['2026-06-30']);
    clock.set('2026-07-03T20:00:00Z');
    await send(counted(22, '2026-07-01T23:00:00Z'), counted(33, '2026-07-03T19:00:00Z'));
    clock.set('2026-07-06T11:00:00Z');
    await tick();
    expect(await issued()).toEqual(['2026-06-30', '2026-07-01', '2026-07-02', '2026-07-03', '2026-07-04', '2026-07-05']);
    expect((await mails()).map((mail) => mail.mail_key)).toEqual(['night-report/2026-06-30', 'night-report/2026-06-30', 'night-report/2026-07-05', 'night-report/2026-07-05']);
    const reports = await Promise.all(['2026-07-01', '2026-07-02', '2026-07-03'].map(async (date) => (await night(date)).report));
    expect(reports.map((report) => [report?.issuedAt, report?.figures.total.frames])).toEqual([[clock.now(), 22], [clock.now(), 0], [clock.now(), 33]]);
  });

  it('a house that is new begins with its first night: none of the time before', async () => {
    clock.set('2026-07-10T11:00:00Z');
    const { centre, issued, mails } = await house();
    const silent = await aCentre(server.slices.centre);
    for (const [now, dates] of [['2026-07-10T11:01:00Z', []], ['2026-07-11T04:15:00Z', ['2026-07-10']], ['2026-07-12T04:15:00Z', ['2026-07-10', '2026-07-11']]] as const) {
      clock.set(now);
      await tick();
      expect(await issued()).toEqual(dates);
    }
    expect(await mails()).toHaveLength(4);
    expect(await database.db('night_report').whereIn('centre_id', [silent.id, centre.id]).pluck('centre_id')).toEqual([centre.id, centre.id]);
  });

  it('of one house that can’t be made keeps no other house from its own, and is made when it can', async () => {
    clock.set('2026-07-20T22:00:00Z');
    const [before, broken, sound] = [await house(), await house(), await house()];
    const [opening] = await database.db('centre').where('id', broken.centre.id).pluck<unknown[]>('opening');
    await database.db('centre').where('id', broken.centre.id).update({ opening: 'null' });
    clock.set('2026-07-21T04:15:00Z');
    await expect(tick()).rejects.toThrow();
    expect([await broken.issued(), await broken.mails(), await before.issued(), await sound.issued(), (await sound.mails()).length]).toEqual([[], [], ['2026-07-20'], ['2026-07-20'], 2]);
    await database.db('centre').where('id', broken.centre.id).update({ opening: JSON.stringify(opening) });
    clock.advance(MIN);
    await tick();
    expect([await broken.issued(), (await broken.mails()).length, (await sound.mails()).length]).toEqual([['2026-07-20'], 2, 2]);
  });
});

describe('figures that come out otherwise after the report', () => {
  it('a late event: the report stays as it was issued, and the figures that differ are named with both values', async () => {
    clock.set('2026-08-10T22:00:00Z');
    const { send, night, mails } = await house();
    await send({ type: 'lane.opened', data: { lane: 1, use: 'open' }, time: Date.parse('2026-08-10T18:00:00Z') }, counted(100, '2026-08-10T19:00:00Z'), { type: 'lane.closed', data: { lane: 1 }, time: Date.parse('2026-08-10T19:05:00Z') });
    clock.set('2026-08-11T04:15:00Z');
    await tick();
    const before = await night('2026-08-10');
    const letters = await mails();
    clock.set('2026-08-11T09:00:00Z');
    await send(counted(7, '2026-08-10T18:30:00Z'), { type: 'pinsetter.stopped', data: { lane: 1 }, time: Date.parse('2026-08-10T18:40:00Z') }, { type: 'pinsetter.restarted', data: { lane: 1 }, time: Date.parse('2026-08-10T18:50:00Z') });
    await tick();
    const after = await night('2026-08-10');
    expect(after.report).toEqual(before.report);
    expect(after.figures.total).toMatchObject({ frames: 107, deliveries: 214, stops: 1, downMs: 10 * MIN });
    const of = (lane: number | null, kind: string | null) => Object.fromEntries(after.differs.filter((one) => one.lane === lane && one.kind === kind).map((one) => [one.figure, [one.issued, one.now]]));
    expect(of(null, null)).toEqual({
      frames: [100, 107], deliveries: [200, 214], stops: [0, 1], calls: [0, 1], downMs: [0, 10 * MIN], wantedDownMs: [0, 10 * MIN], restoredMs: [null, 10 * MIN],
    });
    expect(of(1, null)).toEqual({ frames: [100, 107], deliveries: [200, 214], stops: [0, 1], calls: [0, 1], downMs: [0, 10 * MIN], wantedDownMs: [0, 10 * MIN] });
    expect(of(null, 'open')).toEqual({ frames: [100, 107], deliveries: [200, 214], stops: [0, 1], calls: [0, 1] });
    expect(new Set(after.differs.map((one) => one.lane ?? one.kind))).toEqual(new Set([null, 1, 'open']));
    expect(await mails()).toEqual(letters);
  });

  it('a mechanic who reaches a call of the night after the report was issued', async () => {
    clock.set('2026-08-20T22:00:00Z');
    const { centre, send, night, mechanic } = await house();
    await send({ type: 'pinsetter.stopped', data: { lane: 2 }, time: Date.parse('2026-08-20T21:55:00Z') });
    clock.set('2026-08-21T04:15:00Z');
    await tick();
    expect((await night('2026-08-20')).differs).toEqual([]);
    clock.set('2026-08-21T09:55:00Z');
    const cookie = await signIn(server.url, mechanic);
    const { open } = good(await ask(server.url, 'GET', `/api/centres/${centre.slug}/calls`, { cookie })).body as { open: { id: string }[] };
    for (const step of ['acknowledge', 'on-lane']) {
      good(await ask(server.url, 'POST', `/api/centres/${centre.slug}/calls/${open[0]?.id}/${step}`, { cookie }));
      clock.advance(5 * MIN);
    }
    expect((await night('2026-08-20')).differs).toEqual([{ lane: null, kind: null, figure: 'acknowledgedMs', issued: null, now: 12 * 60 * MIN }, { lane: null, kind: null, figure: 'onLaneMs', issued: null, now: 12 * 60 * MIN + 5 * MIN }]);
  });

  it('an event that was told twice, or belongs to another night, changes nothing', async () => {
    clock.set('2026-09-01T22:00:00Z');
    const { send, night } = await house();
    const event = { ...counted(50, '2026-09-01T21:00:00Z'), id: 'once' };
    await send(event);
    clock.set('2026-09-02T04:15:00Z');
    await tick();
    clock.set('2026-09-02T05:00:00Z');
    await expect(send(event)).rejects.toThrow();
    await send(counted(9, '2026-09-02T04:30:00Z'));
    const view = await night('2026-09-01');
    expect([view.differs, view.figures.total.frames]).toEqual([[], 50]);
  });
});

describe('beside the same weekday', () => {
  it('stand the median, least and greatest of the reports of the last eight weeks', async () => {
    clock.set('2026-10-01T05:00:00Z');
    const { centre, night, send } = await house();
    // Nine Wednesdays with 100, 200 … 900 frames: the oldest is nine weeks back and left out; the Tuesdays between don't count.
    for (let week = 9; week >= 1; week -= 1) {
      const date = new Date(Date.parse('2026-12-02T00:00:00Z') - week * 7 * 24 * 60 * MIN).toISOString().slice(0, 10);
      clock.set(`${date}T22:00:00Z`);
      await send(counted((10 - week) * 100, `${date}T20:00:00Z`));
      clock.advance(7 * 60 * MIN);
      await server.slices.numbers.issueQuietly(centre, date, clock.now());
    }
    clock.set('2026-12-02T22:00:00Z');
    expect((await night('2026-12-02')).past['frames']).toEqual({ median: 550, low: 200, high: 900, n: 8 });
  });
});
