import { afterAll, beforeAll, expect, it } from 'vitest';
import { systemClock } from '#server/platform/clock.ts';
import { createDatabase, type Database } from '#server/platform/db/database.ts';
import { migrate } from '#server/platform/db/migrate.ts';
import { DESK, laneOnScreen, openBrowser, SOON, type TestBrowser } from '#tests/support/browser.ts';
import { ownDatabaseServer, type OwnDatabaseServer } from '#tests/support/database-server.ts';
import { floorHouse, type FloorHouse } from '#tests/support/floor-house.ts';
import { startServer, type TestServer } from '#tests/support/server.ts';
import { aWire, type Wire } from '#tests/support/wire.ts';

let mariadb: OwnDatabaseServer;
let db: Database;
let server: TestServer;
let browser: TestBrowser;
let house: FloorHouse;
let wire: Wire;

beforeAll(async () => {
  mariadb = await ownDatabaseServer();
  db = createDatabase(mariadb.url);
  await migrate(db);
  server = await startServer({ db, clock: systemClock });
  browser = await openBrowser();
  house = await floorHouse(server, 8);
  wire = await aWire(server.url);
});
afterAll(async () => {
  await wire.cut();
  await browser.close();
  await server.close();
  await db.destroy();
  await mariadb.release();
});

it('a frozen database is said within ten seconds; screens that lost their connection meanwhile recover as well', async () => {
  const [steady, cut] = [await browser.page(server.url, house.desk, DESK), await browser.page(wire.url, house.desk, DESK)];
  for (const page of [steady, cut]) {
    await page.goto(house.at('/floor'));
    await page.locator('[data-live="live"]').waitFor();
  }
  const from = Date.now();
  mariadb.signal('SIGSTOP');
  try {
    await steady.getByText('The database is away.').waitFor();
    expect(Date.now() - from).toBeLessThanOrEqual(10_000);
    expect(await steady.locator('.plan').getAttribute('data-stale')).toBe('true');
    await wire.cut();
    await wire.mend();
    await cut.locator('[data-live="stale"]').waitFor();
    await cut.waitForTimeout(3_000);
  } finally {
    mariadb.signal('SIGCONT');
  }
  for (const page of [steady, cut]) await page.locator('[data-live="live"]').waitFor(SOON);
  await house.device('pinsetter.stopped', { lane: 7 });
  for (const page of [steady, cut]) await expect.poll(() => laneOnScreen(page, 7), SOON).toMatchObject({ mark: 'unanswered' });
  await steady.getByText('The database is away.').waitFor({ state: 'hidden' });
  await browser.closePages();
});
