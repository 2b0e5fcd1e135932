import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { signedIn } from '#tests/support/actors.ts';
import { PHONE, seriousFindings } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { server, house, screen } = await stage((server) => floorHouse(server, 32));

async function floorOf(who: { cookie: string }, options?: object): Promise<Page> {
  const page = await screen(who, options);
  await page.goto(house.at('/floor'));
  await page.locator('[data-live=live]').waitFor();
  await page.locator('[data-lane="32"]').waitFor();
  return page;
}
const says = (page: Page, lane: number, words: string) => page.locator(`[data-lane="${lane}"][aria-label*="${words}"]`).waitFor();
const press = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: typeof name === 'string' }).click();
async function keys(page: Page, ...all: string[]): Promise<void> {
  for (const key of all) await page.keyboard.press(key);
}

describe('the desk, by keyboard', () => {
  it('types a lane, opens it, and takes it back', async () => {
    const page = await floorOf(house.desk);
    await keys(page, '2', '3');
    await page.locator('[data-panel="23"]').waitFor();
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('lane-heading');
    await keys(page, 'o');
    await page.getByLabel('Name').fill('Marchbank');
    await page.getByLabel('Bowlers').fill('5');
    await page.getByLabel('For', { exact: true }).selectOption('open');
    await keys(page, 'Enter');
    await page.getByText('Lane 23 is open.').waitFor();
    await says(page, 23, 'open play Marchbank');
    await press(page, 'Undo');
    await says(page, 23, 'Lane 23, free');
    expect(await seriousFindings(page)).toEqual([]);
  });

  it('closes with one key; undo opens with the same people', async () => {
    await house.device('lane.opened', { lane: 5, use: 'party', label: 'Odell', bowlers: 6 });
    const page = await floorOf(house.desk);
    await says(page, 5, 'party Odell');
    await keys(page, '5', 'o');
    await page.getByText('Lane 5 is free.').waitFor();
    await says(page, 5, 'Lane 5, free');
    await press(page, 'Undo');
    await says(page, 5, 'party Odell');
    await page.getByText('6 bowlers').waitFor();
  });

  it('moves people; a lane that is taken is refused beside the field', async () => {
    await house.device('lane.opened', { lane: 7, use: 'open', label: 'Ferry' });
    await house.device('lane.opened', { lane: 8, use: 'open', label: 'Tarn' });
    const page = await floorOf(house.desk);
    await keys(page, '7', 'm');
    await page.getByLabel('To lane').fill('8');
    await press(page, 'Move to lane 8');
    await page.getByText('Lane 8 is open already.').waitFor();
    await page.getByLabel('To lane').fill('9');
    await press(page, 'Move to lane 9');
    await says(page, 9, 'open play Ferry');
    await says(page, 7, 'Lane 7, free');
  });

  it('Escape goes back one step at a time, and to the lane', async () => {
    const page = await floorOf(house.desk);
    await keys(page, '4', 'c');
    await page.getByRole('group', { name: 'What is it?' }).waitFor();
    await keys(page, 'Escape');
    await page.getByRole('group', { name: 'What is it?' }).waitFor({ state: 'detached' });
    await keys(page, 'Escape');
    await page.locator('[data-panel]').waitFor({ state: 'detached' });
    expect(await page.evaluate(() => (document.activeElement as HTMLElement).dataset['lane'])).toBe('4');
  });

  it('shows its keys, and letters can be switched off', async () => {
    const page = await floorOf(house.desk);
    await keys(page, '?');
    await page.getByRole('dialog', { name: 'Keys on the floor' }).waitFor();
    await page.getByLabel('One-letter keys work').uncheck();
    await keys(page, 'Escape');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await keys(page, '4');
    await page.waitForTimeout(900);
    expect(await page.locator('[data-panel]').count()).toBe(0);
    await page.getByLabel('Lane number').fill('4');
    await keys(page, 'Enter');
    await page.locator('[data-panel="4"]').waitFor();
  });
});

describe('calls from the floor', () => {
  it('two taps raise one', async () => {
    const page = await floorOf(house.desk);
    await page.locator('[data-lane="11"]').click();
    await press(page, 'Raise a call');
    await press(page, 'ball return');
    await page.getByText('Call raised on lane 11: ball return.').waitFor();
    await says(page, 11, 'call unanswered');
    await says(page, 12, 'ball not returned');
    await page.locator('.return[data-down=true]').waitFor();
  });

  it('a safety stop stands apart, and stops both lanes', async () => {
    const page = await floorOf(house.desk);
    await keys(page, '1', '3');
    await press(page, 'Safety stop');
    await press(page, 'Wet or oily approach');
    await says(page, 13, 'danger: wet or oily approach');
    await says(page, 14, 'danger: wet or oily approach');
  });

  it('out of service needs a reason, and is taken back', async () => {
    const page = await floorOf(house.mechanic);
    await keys(page, '1', '5');
    await press(page, 'Out of service');
    await press(page, 'Take lane 15 out of service');
    await page.getByText(/At least 1|This is needed/).waitFor();
    await page.getByLabel('Why?').fill('belt torn');
    await press(page, 'Take lane 15 out of service');
    await says(page, 15, 'out of service: belt torn');
    await press(page, 'Put lane 15 back in service');
    await says(page, 15, 'Lane 15, free, film');
  });

  it('on a phone the mechanic takes a call from the red strip', async () => {
    await house.device('pinsetter.stopped', { lane: 17 });
    const page = await floorOf(house.mechanic, PHONE);
    const alert = page.locator('[role=alert] > div', { hasText: 'Pinsetter stopped' });
    await alert.waitFor();
    await alert.getByRole('button', { name: 'Mine' }).click();
    await says(page, 17, 'mechanic on the way');
    await alert.waitFor({ state: 'detached' });
    await page.locator('[data-lane="18"]').click();
    await page.getByRole('dialog').locator('[data-panel="18"]').waitFor();
    expect(await seriousFindings(page)).toEqual([]);
  });
});

it('a secretary sees the floor and can do nothing to it', async () => {
  const secretary = await signedIn(server.url, server.slices.accounts, { centre: house.centre, role: 'secretary' });
  const page = await floorOf(secretary);
  await keys(page, '2');
  await page.locator('[data-panel="2"]').waitFor();
  expect(await page.locator('[data-panel] button').allTextContents()).toEqual(['×']);
});
