import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { callsHouse, type CallsHouse } from '#tests/support/calls-house.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';
import { startServer, type TestServer } from '#tests/support/server.ts';
import { mailUnansweredCalls } from '../../jobs/calls-unanswered.ts';

const MINUTE = 60_000;
const clock = fixedClock('2026-05-14T17:39:00Z');
let database: TestDatabase;
let server: TestServer;
let h: CallsHouse;

beforeAll(async () => {
  database = await ownDatabase();
  server = await startServer({ db: database.db, clock });
  h = await callsHouse(server);
});
afterAll(async () => {
  await server.close();
  await database.close();
});

const letters = () => database.db('mail_outbox').where({ centre_id: h.centre.id }).orderBy('id').select('recipient', 'subject', 'text_body', 'html_body') as Promise<{ recipient: string; subject: string; text_body: string; html_body: string }[]>;
const tick = () => mailUnansweredCalls(server.slices.calls).run(clock.now());

describe('a call that nobody answers', () => {
  it('is one letter after three minutes, and no second one', async () => {
    await h.stop(9);
    const answered = await h.stop(3);
    await h.post(h.mechanic, `/${answered.id}/acknowledge`);
    clock.advance(3 * MINUTE - 1);
    await tick();
    expect(await letters()).toEqual([]);
    clock.advance(1);
    await tick();
    await tick();
    clock.advance(10 * MINUTE);
    await tick();
    const [letter, ...more] = await letters();
    expect(more).toEqual([]);
    expect(letter).toMatchObject({ recipient: h.manager.email, subject: 'Tarn Ferry Bowl: lane 9 unanswered, Pinsetter stopped' });
    expect(letter?.text_body).toContain('was raised at 19:39 and nobody had answered 3 minutes later');
  });

  it('is still one letter when the program was started anew in between', async () => {
    await h.stop(5);
    clock.advance(4 * MINUTE);
    await tick();
    const again = await startServer({ db: database.db, clock });
    await mailUnansweredCalls(again.slices.calls).run(clock.now());
    await again.close();
    expect((await letters()).filter((letter) => letter.subject.includes('lane 5'))).toHaveLength(1);
  });

  it('writes what was said of it as text, never as markup', async () => {
    await h.post(h.desk, '', { lane: 11, text: '<b>smells</b> burnt' });
    clock.advance(4 * MINUTE);
    await tick();
    expect((await letters()).at(-1)?.html_body).toContain('&lt;b&gt;smells&lt;/b&gt; burnt');
  });
});
