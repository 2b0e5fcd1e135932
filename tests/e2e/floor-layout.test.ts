import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { systemClock } from '#server/platform/clock.ts';
import { openDisplay } from '#tests/support/actors.ts';
import { DESK, openBrowser, PHONE, seriousFindings, type TestBrowser, WALL } from '#tests/support/browser.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { busyHouse, type BusyHouse } from '#tests/support/floor-house.ts';
import { layoutFaults } from '#tests/support/layout-faults.ts';
import { startServer, type TestServer } from '#tests/support/server.ts';

let database: TestDatabase;
let server: TestServer;
let browser: TestBrowser;
const houses = new Map<number, BusyHouse>();

beforeAll(async () => {
  database = await freshDatabase();
  server = await startServer({ db: database.db, clock: systemClock });
  browser = await openBrowser();
  for (const lanes of [8, 32, 64]) houses.set(lanes, await busyHouse(server, lanes));
});
afterEach(() => browser.closePages());
afterAll(async () => {
  await browser.close();
  await server.close();
  await database.close();
});

const VIEWPORTS = { '1440×900': DESK, '1920×1080': WALL, '390×844': PHONE } as const;
const SIZES = [8, 32, 64].flatMap((lanes) => (Object.keys(VIEWPORTS) as (keyof typeof VIEWPORTS)[]).map((viewport) => [lanes, viewport] as const));

/** The whole house is drawn, with its marks; the panel and figures have come. */
async function drawnFloor(page: Page, lanes: number): Promise<void> {
  await page.locator(`[data-lane="${lanes}"]`).waitFor();
  await page.locator('[data-live="live"]').waitFor();
  await page.getByText('Night Owls').first().waitFor({ state: 'attached' });
  expect(await page.locator('[data-lane]').count()).toBe(lanes);
}

describe('the floor: no two marks overlap, no text is cut', () => {
  it.each(SIZES)('%i lanes at %s, light and dark', async (lanes, viewport) => {
    const house = houses.get(lanes)!;
    const page = await browser.page(server.url, house.desk, { ...VIEWPORTS[viewport], colorScheme: 'light' });
    await page.goto(house.at('/floor'));
    await drawnFloor(page, lanes);
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme });
      expect(await layoutFaults(page), colorScheme).toEqual([]);
      expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)).toBeLessThanOrEqual(0);
      if (lanes === 32 && viewport !== '1920×1080') expect(await seriousFindings(page), colorScheme).toEqual([]);
    }
  });

  it.each([8, 32, 64])('the wall of %i lanes at 1920×1080', async (lanes) => {
    const house = houses.get(lanes)!;
    const { cookie } = await openDisplay(server.url, server.slices.accounts, house.centre);
    const page = await browser.page(server.url, { cookie }, WALL);
    await page.goto(house.at('/wall'));
    await page.locator(`[data-lane="${lanes}"]`).waitFor();
    expect(await layoutFaults(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollHeight - document.documentElement.clientHeight)).toBeLessThanOrEqual(0);
    if (lanes === 32) expect(await seriousFindings(page)).toEqual([]);
  });

  it('sees a text that is cut and marks that overlap', async () => {
    const house = houses.get(8)!;
    const page = await browser.page(server.url, house.desk, DESK);
    await page.goto(house.at('/floor'));
    await drawnFloor(page, 8);
    await page.evaluate(() => {
      document.querySelector<HTMLElement>('.strip[data-lane="2"]')!.style.left = document.querySelector<HTMLElement>('.strip[data-lane="1"]')!.style.left;
      const cell = document.querySelector<HTMLElement>('aside b')!;
      cell.style.cssText = 'display: block; width: 20px; overflow: hidden; white-space: nowrap';
    });
    const faults = (await layoutFaults(page)).join('\n');
    expect(faults).toMatch(/button\.strip 1 overlaps button\.strip 2/);
    expect(faults).toMatch(/is cut/);
  });
});
