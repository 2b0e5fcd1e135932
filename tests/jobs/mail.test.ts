import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createNotices } from '#server/capabilities/notices/index.ts';
import { systemClock } from '#server/platform/clock.ts';
import { newId, toBinary } from '#server/platform/db/uuid.ts';
import { createLog } from '#server/platform/log.ts';
import { createPostman, type Postman } from '#server/platform/mail/postman.ts';
import { catchMail } from '#tests/support/mail.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';

let database: TestDatabase;
let catcher: Awaited<ReturnType<typeof catchMail>>;
let postman: Postman;

beforeAll(async () => {
  database = await ownDatabase();
  catcher = await catchMail();
  postman = createPostman(catcher.url);
});
afterAll(async () => {
  postman.close();
  await catcher.close();
  await database.close();
});

const log = createLog('silent');
const mail = (centreId: Buffer, key: string, to = 'desk@tarn.example') => ({ centreId, key, to, subject: 'Lanes 25–32', text: 'Held.', html: '<p>Held.</p>' });
const caughtFor = (to: string) => catcher.mails().filter((m) => m.to.includes(to));

describe('mail', () => {
  it('is one row and one letter for an occasion and recipient, however often asked for', async () => {
    const notices = createNotices({ db: database.db, clock: systemClock, log }, postman);
    const centre = toBinary(newId());
    const asked = await Promise.all([1, 2, 3, 4].map(() => database.db.transaction((trx) => notices.queueMail(trx, mail(centre, 'held-60/s1', 'one@tarn.example')))));
    expect(asked.filter(Boolean)).toHaveLength(1);
    await database.db.transaction((trx) => notices.queueMail(trx, mail(centre, 'held-60/s1', 'two@tarn.example')));
    expect(await notices.sendDue(systemClock.now() + 1)).toBe(2);
    expect(await notices.sendDue(systemClock.now() + 1)).toBe(0);
    expect([caughtFor('one@tarn.example'), caughtFor('two@tarn.example')].map((m) => m.length)).toEqual([1, 1]);
    expect(caughtFor('one@tarn.example')[0]).toMatchObject({ subject: 'Lanes 25–32', text: expect.stringContaining('Held.') as string });
  });

  it('is sent again under the same Message-ID when the process is killed between sending and marking', async () => {
    const centre = toBinary(newId());
    const notices = createNotices({ db: database.db, clock: systemClock, log }, postman);
    await database.db.transaction((trx) => notices.queueMail(trx, mail(centre, 'held-60/s2', 'killed@tarn.example')));
    const child = spawn(process.execPath, ['--import', 'tsx', fileURLToPath(new URL('../support/mail-then-die.ts', import.meta.url)), database.url, catcher.url]);
    const [, signal] = (await once(child, 'exit')) as [number | null, string | null];
    expect(signal).toBe('SIGKILL');
    expect(caughtFor('killed@tarn.example')).toHaveLength(1);
    expect(await notices.sendDue(systemClock.now() + 1)).toBe(1);
    const both = caughtFor('killed@tarn.example');
    expect(both).toHaveLength(2);
    expect(new Set(both.map((m) => m.messageId)).size).toBe(1);
    expect(await notices.sendDue(systemClock.now() + 1)).toBe(0);
  });

  it('waits and is tried again while no server takes it', async () => {
    const centre = toBinary(newId());
    const away = createPostman('smtp://127.0.0.1:9');
    const notices = createNotices({ db: database.db, clock: systemClock, log }, away);
    await database.db.transaction((trx) => notices.queueMail(trx, mail(centre, 'held-60/s3', 'late@tarn.example')));
    const now = systemClock.now() + 1;
    expect(await notices.sendDue(now)).toBe(0);
    const back = createNotices({ db: database.db, clock: systemClock, log }, postman);
    expect(await back.sendDue(now)).toBe(0);
    expect(await back.sendDue(now + 20_000)).toBe(1);
    expect(caughtFor('late@tarn.example')).toHaveLength(1);
    away.close();
  });
});
