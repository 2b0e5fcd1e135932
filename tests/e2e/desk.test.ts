import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import { laneOnScreen, SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { house, screen } = await stage((server) => floorHouse(server, 32), { keepScreens: true });

const lanesNow = async () => ((await house.as(house.desk, 'GET', '/floor')) as FloorSnapshot).lanes;
const laneNow = async (lane: number) => (await lanesNow())[lane - 1]!;
const says = (page: Page, lane: number) => laneOnScreen(page, lane).then((one) => one.says);
const panel = (page: Page) => page.getByRole('complementary', { name: 'The selected lane' });
const press = (page: Page, name: string | RegExp) => panel(page).getByRole('button', { name, exact: typeof name === 'string' }).click();

let atDesk: Page | null = null;
/** One screen through the tests, as at a desk; each begins with the floor anew. */
async function deskAtFloor(): Promise<Page> {
  const page = (atDesk ??= await screen(house.desk));
  await page.goto(house.at('/floor'));
  await page.locator('[data-live="live"]').waitFor();
  return page;
}

describe('signing in', () => {
  it('says beside the field what is wrong, lets in who is known, and leads where one wanted to go', async () => {
    const page = await screen(null);
    await page.goto(house.at('/floor'));
    await page.getByRole('heading', { name: 'Sign in to your centre' }).waitFor();
    await page.getByLabel('Email address').fill(house.desk.email);
    await page.getByLabel('Password').fill('not this one at all');
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByText('Email address and password don’t fit together.').waitFor();
    expect(await page.getByLabel('Password').getAttribute('aria-invalid')).toBe('true');
    expect(await page.getByLabel('Email address').inputValue()).toBe(house.desk.email);
    await page.getByLabel('Password').fill(house.desk.password);
    await page.keyboard.press('Enter');
    await page.locator('[data-lane="32"]').waitFor();
    expect(new URL(page.url()).pathname).toBe(house.at('/floor'));
    expect(await page.getByRole('button', { name: /^Lane \d+, / }).count()).toBe(32);
    await page.getByRole('button', { name: `Account: ${house.desk.name}` }).click();
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.getByRole('heading', { name: 'Sign in to your centre' }).waitFor();
    await page.goto(house.at('/floor'));
    await page.getByRole('heading', { name: 'Sign in to your centre' }).waitFor();
  });
});

describe('the desk at the floor', () => {
  it('opens a lane by its number, moves the people, and closes it, without a pointer', async () => {
    const page = await deskAtFloor();
    await page.keyboard.type('14');
    await page.getByRole('heading', { name: 'Lane 14: Free' }).waitFor();
    await page.keyboard.press('o');
    await panel(page).getByLabel('For').selectOption('party');
    await panel(page).getByLabel('Name').fill('Marchbank');
    await panel(page).getByLabel('Bowlers').fill('6');
    await page.keyboard.press('Enter');
    await page.getByText('Lane 14 is open.').waitFor();
    await expect.poll(() => says(page, 14), SOON).toContain('party Marchbank');
    expect((await laneNow(14)).use).toMatchObject({ kind: 'party', label: 'Marchbank', bowlers: 6 });
    await page.getByRole('heading', { name: 'Lane 14: Marchbank' }).waitFor();
    await page.keyboard.press('m');
    await page.keyboard.type('15');
    await page.keyboard.press('Enter');
    await page.getByText('Moved from lane 14 to lane 15.').waitFor();
    await expect.poll(() => says(page, 15), SOON).toContain('party Marchbank');
    await expect.poll(() => says(page, 14), SOON).toContain('Lane 14, free');
    await page.keyboard.press('Escape');
    await page.keyboard.type('15');
    await page.getByRole('heading', { name: 'Lane 15: Marchbank' }).waitFor();
    await page.keyboard.press('o');
    await page.getByText('Lane 15 is free.').waitFor();
    await expect.poll(() => says(page, 15), SOON).toContain('Lane 15, free');
    expect((await lanesNow()).filter((lane) => lane.use !== null)).toEqual([]);
  });

  it('is refused beside what it pressed: a move to a lane that is taken, to itself, to one that isn’t there', async () => {
    await house.as(house.desk, 'POST', '/lanes/1/open', { use: 'open' });
    await house.as(house.desk, 'POST', '/lanes/2/open', { use: 'party', label: 'Odell' });
    const page = await deskAtFloor();
    await page.locator('[data-lane="1"]').click();
    await press(page, 'Move');
    const tryLane = async (to: string, sentence: string) => {
      await panel(page).getByLabel('To lane').fill(to);
      await press(page, `Move to lane ${to}`);
      await panel(page).getByText(sentence).waitFor();
    };
    await tryLane('2', 'Lane 2 is open already.');
    await tryLane('1', 'They are on this lane already. Choose another one.');
    await tryLane('33', 'There is no lane 33 here.');
    expect((await laneNow(1)).use?.kind).toBe('open');
    expect((await laneNow(2)).use?.label).toBe('Odell');
  });

  it('raises a call twice: the second joins the first, and both lanes of the pair say so', async () => {
    const page = await deskAtFloor();
    await page.keyboard.type('9');
    await page.getByRole('heading', { name: 'Lane 9: Free' }).waitFor();
    await page.keyboard.press('c');
    await press(page, 'ball return');
    await page.getByText('Call raised on lane 9: ball return.').waitFor();
    await expect.poll(() => laneOnScreen(page, 9), SOON).toMatchObject({ mark: 'unanswered' });
    expect(await says(page, 9)).toMatch(/call unanswered \d+ s, ball not returned/);
    await expect.poll(() => says(page, 10), SOON).toMatch(/ball not returned/);
    await page.keyboard.press('c');
    await press(page, 'ball return');
    await page.getByText('Call raised on lane 9: ball return.').first().waitFor();
    const { open } = (await house.as(house.desk, 'GET', '/calls')) as { open: { equipment: string; joined: number }[] };
    expect(open.filter((call) => call.equipment === 'ball-return')).toHaveLength(1);
  });

  it('selects no lane that the house doesn’t have, and leaves digits in fields alone', async () => {
    const page = await deskAtFloor();
    await page.getByLabel('Lane number').fill('77');
    await page.getByText('No lane 77: the house has 32').waitFor();
    await page.getByLabel('Lane number').press('Enter');
    expect(await panel(page).count()).toBe(0);
    await page.getByLabel('Lane number').fill('12');
    await page.getByLabel('Lane number').press('Enter');
    await page.getByRole('heading', { name: 'Lane 12: Free' }).waitFor();
  });
});
