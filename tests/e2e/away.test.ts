import type { Page } from 'playwright-core';
import { afterAll, afterEach, describe, expect, it } from 'vitest';
import { DESK, laneOnScreen, PHONE, seriousFindings, SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';
import { aWire } from '#tests/support/wire.ts';

const { server, browser, house } = await stage((server) => floorHouse(server, 12));
const wire = await aWire(server.url);
afterEach(() => wire.mend());
afterAll(() => wire.cut());

/** Nobody may take what is on the screen for now longer than this. */
const SAID_WITHIN_MS = 10_000;
const hatch = (page: Page): Promise<string> => page.locator('.plan').evaluate((plan) => getComputedStyle(plan, '::after').backgroundImage);

async function goesStale(page: Page, from: number): Promise<void> {
  await page.getByText('The server does not answer.').waitFor({ timeout: SAID_WITHIN_MS });
  expect(Date.now() - from).toBeLessThanOrEqual(SAID_WITHIN_MS);
  expect(await page.locator('[data-live]').getAttribute('data-live')).toBe('stale');
  await page.getByText(/^as of \d\d:\d\d:\d\d$/).waitFor();
  await page.getByText(/Shown as of \d\d:\d\d:\d\d\./).waitFor();
  expect(await hatch(page)).toContain('repeating-linear-gradient');
}

describe('the server is away', () => {
  it('says so within ten seconds, hatches what is old, recovers by itself and shows what was missed: killed, or unheard', async () => {
    const unheard = await aWire(server.url);
    const desks = [await browser.page(wire.url, house.desk, DESK), await browser.page(unheard.url, house.desk, DESK)];
    const phone = await browser.page(wire.url, house.mechanic, PHONE);
    const calls = await browser.page(wire.url, house.mechanic, PHONE);
    const floors = [...desks, phone];
    for (const page of floors) await page.goto(house.at('/floor'));
    await calls.goto(house.at('/calls'));
    for (const page of [...floors, calls]) await page.locator('[data-live="live"]').waitFor({ state: 'attached' });
    for (const page of floors) expect(await hatch(page)).toBe('none');
    const from = Date.now();
    await wire.cut();
    unheard.hold();
    await Promise.all([...floors.map((page) => goesStale(page, from)), calls.getByText('The server does not answer.').waitFor({ timeout: SAID_WITHIN_MS })]);
    expect(await seriousFindings(desks[0]!)).toEqual([]);
    await house.device('pinsetter.stopped', { lane: 3 });
    for (const page of floors) expect((await laneOnScreen(page, 3)).mark).not.toBe('unanswered');
    await wire.mend();
    await unheard.mend();
    for (const page of floors) {
      await expect.poll(() => laneOnScreen(page, 3), SOON).toMatchObject({ mark: 'unanswered' });
      await page.locator('[data-live="live"]').waitFor({ state: 'attached', ...SOON });
      await page.getByText('The server does not answer.').waitFor({ state: 'hidden' });
      expect(await hatch(page)).toBe('none');
    }
    await calls.getByRole('link', { name: 'Pinsetter stopped' }).waitFor(SOON);
    await house.device('pinsetter.restarted', { lane: 3 });
    for (const page of floors) await expect.poll(() => laneOnScreen(page, 3), SOON).toMatchObject({ mark: 'cause-missing' });
    await unheard.cut();
  });

  it('what is fetched only when it is gone to waits for the server, and comes by itself', async () => {
    const page = await browser.page(wire.url, house.desk, DESK);
    await page.goto(house.at('/floor'));
    await page.locator('[data-lane="12"]').waitFor();
    await wire.cut();
    await page.locator('[data-lane="5"]').click();
    await page.getByRole('link', { name: 'Leagues' }).click();
    await page.waitForTimeout(1000);
    expect(await page.getByText('This part of the page broke.').count()).toBe(0);
    await wire.mend();
    await page.getByRole('heading', { level: 1, name: /league/i }).waitFor(SOON);
  });

  it('while nobody answers, an opened lane is refused in words and nothing is pretended', async () => {
    const page = await browser.page(wire.url, house.desk, DESK);
    await page.goto(house.at('/floor'));
    await page.locator('[data-lane="11"]').click();
    await page.getByRole('button', { name: 'Open lane 11' }).click();
    await page.getByLabel('Name').waitFor();
    await wire.cut();
    await page.getByRole('button', { name: 'Open lane 11' }).last().click();
    await page.getByRole('alert').filter({ hasText: /server/i }).first().waitFor();
    expect((await laneOnScreen(page, 11)).says).toContain('Lane 11, free');
    await wire.mend();
    await page.getByRole('button', { name: 'Open lane 11' }).last().click();
    await expect.poll(async () => (await laneOnScreen(page, 11)).says, SOON).toContain('open play');
  });
});
