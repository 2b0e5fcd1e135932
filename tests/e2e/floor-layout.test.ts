import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { openDisplay } from '#tests/support/actors.ts';
import { DESK, PHONE, seriousFindings, WALL } from '#tests/support/browser.ts';
import { busyHouse } from '#tests/support/floor-house.ts';
import { layoutFaults } from '#tests/support/layout-faults.ts';
import { stage } from '#tests/support/stage.ts';

const { server, house: houses, screen } = await stage(async (server) => ({ 8: await busyHouse(server, 8), 32: await busyHouse(server, 32), 64: await busyHouse(server, 64) }));

const HOUSES = [8, 32, 64] as const;
const VIEWPORTS = { '1440×900': DESK, '1920×1080': WALL, '390×844': PHONE } as const;
const SIZES = HOUSES.flatMap((lanes) => (Object.keys(VIEWPORTS) as (keyof typeof VIEWPORTS)[]).map((viewport) => [lanes, viewport] as const));

/** The whole house is drawn, with its marks; the panel and figures have come. */
async function drawnFloor(page: Page, lanes: number): Promise<void> {
  await page.locator(`[data-lane="${lanes}"]`).waitFor();
  await page.locator('[data-live="live"]').waitFor();
  await page.getByText('Night Owls').first().waitFor({ state: 'attached' });
  expect(await page.locator('[data-lane]').count()).toBe(lanes);
}

describe('the floor: no two marks overlap, no text is cut', () => {
  it.each(SIZES)('%i lanes at %s, light and dark', async (lanes, viewport) => {
    const house = houses[lanes];
    const page = await screen(house.desk, { ...VIEWPORTS[viewport], colorScheme: 'light' });
    await page.goto(house.at('/floor'));
    await drawnFloor(page, lanes);
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme });
      expect(await layoutFaults(page), colorScheme).toEqual([]);
      expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)).toBeLessThanOrEqual(0);
      if (lanes === 32 && viewport !== '1920×1080') expect(await seriousFindings(page), colorScheme).toEqual([]);
    }
  });

  it.each(HOUSES)('the wall of %i lanes at 1920×1080', async (lanes) => {
    const house = houses[lanes];
    const { cookie } = await openDisplay(server.url, server.slices.accounts, house.centre);
    const page = await screen({ cookie }, WALL);
    await page.goto(house.at('/wall'));
    await page.locator(`[data-lane="${lanes}"]`).waitFor();
    expect(await layoutFaults(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollHeight - document.documentElement.clientHeight)).toBeLessThanOrEqual(0);
    if (lanes === 32) expect(await seriousFindings(page)).toEqual([]);
  });

  it('sees a text that is cut and marks that overlap', async () => {
    const house = houses[8];
    const page = await screen(house.desk, DESK);
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
