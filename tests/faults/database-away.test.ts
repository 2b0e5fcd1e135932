import { afterAll, beforeAll, expect, it } from 'vitest';
import { createDatabase } from '#server/platform/db/database.ts';
import { migrate } from '#server/platform/db/migrate.ts';
import { databaseAnswers } from '#server/platform/http/database-watch.ts';
import { makePerson, signIn } from '#tests/support/actors.ts';
import { ask, type Answer } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { ownDatabaseServer, type OwnDatabaseServer } from '#tests/support/database-server.ts';
import { startWeb, type Web } from '#tests/support/web.ts';

let mariadb: OwnDatabaseServer;
let db: ReturnType<typeof createDatabase>;
let web: Web;
let cookie: string;

beforeAll(async () => {
  mariadb = await ownDatabaseServer();
  db = createDatabase(mariadb.url);
  await migrate(db);
  web = await startWeb(db, { clock: fixedClock('2026-11-30T18:45:00Z') });
  cookie = await signIn(web.url, await makePerson(web.accounts));
}, 120_000);
afterAll(async () => {
  await web.close();
  await db.destroy();
  await mariadb.release();
});

const me = () => ask(web.url, 'GET', '/api/me', { cookie });
async function timed(): Promise<{ answer: Answer; ms: number }> {
  const from = performance.now();
  const answer = await me();
  return { answer, ms: performance.now() - from };
}
const isAway = ({ status, body, headers }: Answer): void => {
  expect([status, body, headers.get('retry-after')]).toMatchObject([503, { code: 'database.away' }, '2']);
};

it.each([
  ['is frozen', 'SIGSTOP'],
  ['was killed', 'SIGKILL'],
] as const)('a request while the database %s hears so within two seconds, and the next after it is back goes well', async (_name, signal) => {
  expect((await me()).status).toBe(200);
  mariadb.signal(signal);
  const { answer, ms } = await timed();
  // A killed one may be started again before the request comes to it.
  if (answer.status !== 200 || signal === 'SIGSTOP') isAway(answer);
  // Two seconds, and what a busy machine adds.
  expect(ms).toBeLessThan(2_500);
  if (signal === 'SIGSTOP') mariadb.signal('SIGCONT');
  await expect.poll(async () => (await me()).status, { timeout: 10_000, interval: 200 }).toBe(200);
});

it('takes a process that is busy for no sign of a database that is away', async () => {
  const asked = databaseAnswers(db);
  const until = performance.now() + 1_500;
  while (performance.now() < until);
  expect(await asked).toBe(true);
});
