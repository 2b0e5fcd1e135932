import { describe, expect, it } from 'vitest';
import { laneOnScreen, PHONE, SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { house, screen } = await stage((server) => floorHouse(server, 32));

const LOCKOUT = ['Desk and bowlers told', 'Machine stopped', 'No ball comes from the neighbour lane', 'Machine off at the isolator', 'Ball lift off, own supply', 'My lock and tag on', 'Deck and rake down, springs released', 'Tried the start: stays dead'];
const RELEASE = ['Tools out', 'Guards on', 'People clear', 'Told: it will run', 'My own lock and tag off'];

describe('the mechanic’s phone, from the floor', () => {
  it('hears of a stop, takes it, reaches in with a record, releases, sets it running, and finds it in the history', async () => {
    const page = await screen(house.mechanic, PHONE);
    await page.goto(house.at('/floor'));
    await page.locator('[data-live="live"]').waitFor();
    const strip = page.getByRole('alert').filter({ hasText: 'Deck jam' });
    expect(await strip.count()).toBe(0);
    await house.device('lane.opened', { lane: 9, use: 'league', label: 'Thursday Scratch' });
    await house.device('pinsetter.stopped', { lane: 9, text: 'Deck jam', pins: [4] });
    await strip.waitFor();
    expect(await strip.textContent()).toContain('Thursday Scratch');
    await strip.getByRole('button', { name: 'Mine' }).click();
    await strip.waitFor({ state: 'hidden' });
    await page.getByText('The call on lane 9 is yours.').waitFor();
    await expect.poll(() => laneOnScreen(page, 9), SOON).toMatchObject({ mark: 'answered' });

    await page.getByRole('link', { name: 'Deck jam' }).click();
    await page.getByRole('heading', { level: 1, name: 'Deck jam' }).waitFor();
    await page.getByRole('button', { name: 'On lane', exact: true }).click();
    await page.getByText('you are on lane').waitFor();
    await page.getByRole('button', { name: 'Begin the lockout record' }).click();
    const tick = async (step: string) => {
      const box = page.getByRole('checkbox', { name: step });
      await box.click();
      await page.getByRole('checkbox', { name: step, checked: true }).or(page.getByText('Before it runs again')).first().waitFor();
    };
    for (const step of LOCKOUT) await tick(step);
    await page.getByText(/in machine, recorded/).first().waitFor();
    expect(await page.getByRole('button', { name: 'Back running', exact: true }).isDisabled()).toBe(true);
    const second = await screen(house.desk);
    await second.goto(house.at('/floor'));
    await second.locator('[data-lane="9"][data-mark="mechanic-in"]').waitFor();
    expect((await laneOnScreen(second, 9)).says).toContain(`mechanic in machine: ${house.mechanic.name}`);
    for (const step of RELEASE) await tick(step);
    await page.getByRole('button', { name: 'End the lockout record' }).click();
    await page.getByRole('button', { name: 'Back running', exact: true }).click();
    await page.getByRole('button', { name: 'Deck', exact: true }).click();
    await page.getByRole('button', { name: 'Pin off spot', exact: true }).click();
    await page.getByLabel(/^Note/).fill('cup worn');
    await page.getByRole('button', { name: 'Back running: lane 9' }).click();
    await page.getByText(/^Closed .* by .*: Deck: pin off spot\./).waitFor();
    await second.locator('[data-lane="9"]:not([data-mark="mechanic-in"]):not([data-mark="answered"])').waitFor();
    expect((await laneOnScreen(second, 9)).says).toMatch(/league Thursday Scratch(?!.*call)/);

    await house.device('pinsetter.stopped', { lane: 9 });
    await page.getByRole('link', { name: 'All calls' }).click();
    await page.getByRole('link', { name: 'Pinsetter stopped' }).click();
    await page.getByRole('heading', { level: 1, name: 'Pinsetter stopped' }).waitFor();
    const history = page.getByRole('listitem').filter({ hasText: 'pin off spot' }).filter({ hasText: 'cup worn' });
    await history.first().waitFor();
    expect(await history.first().textContent()).toContain(house.mechanic.name);
  });

  it('opens a lane of the turned plan and closes it again', async () => {
    const page = await screen(house.mechanic, PHONE);
    await page.goto(house.at('/floor'));
    await page.locator('[data-lane="21"]').click();
    const sheet = page.getByRole('dialog');
    await sheet.getByRole('button', { name: 'Raise a call' }).waitFor();
    expect(await sheet.getByRole('button', { name: /^Open lane/ }).count()).toBe(0);
    await page.keyboard.press('Escape');
    await sheet.waitFor({ state: 'hidden' });
  });
});
