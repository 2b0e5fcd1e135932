import { expect, it } from 'vitest';
import { laneOnScreen, SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { house, screen } = await stage((server) => floorHouse(server, 8));

it('the manager sets the rules of the house: what contradicts stands beside its field, what is saved holds at once, and what is usual is a step back', async () => {
  const now = Date.now();
  await house.device('run.lane.dressed', { machine: 'm1', run: '1', lane: 1, startedAt: new Date(now - 180_000).toISOString(), finishedAt: new Date(now - 60_000).toISOString() });
  await house.device('lane.counted', { lane: 1, deliveries: 60 });
  const page = await screen(house.manager);
  await page.goto(house.at('/settings'));
  const [fresh, worn] = [page.getByLabel('Fresh up to, deliveries'), page.getByLabel('Worn above, deliveries')];
  await worn.fill('80');
  await page.getByRole('button', { name: 'Save the rules' }).click();
  await page.getByText('Worn begins above what still counts as fresh.').waitFor();
  await page.getByLabel('Battery is low below, %').fill('');
  await page.getByRole('button', { name: 'Save the rules' }).click();
  await page.getByText('This takes a whole number.').waitFor();
  await page.getByLabel('Battery is low below, %').fill('20');
  await fresh.fill('many');
  await page.getByRole('button', { name: 'Save the rules' }).click();
  await page.getByText('This takes a whole number.').waitFor();
  await fresh.fill('20');
  await worn.fill('59');
  await page.getByRole('button', { name: 'Save the rules' }).click();
  await page.getByText('The rules hold from now on.').waitFor();
  await page.reload();
  expect([await fresh.inputValue(), await worn.inputValue()]).toEqual(['20', '59']);

  const floor = await screen(house.desk);
  await floor.goto(house.at('/floor'));
  await expect.poll(() => laneOnScreen(floor, 1), SOON).toMatchObject({ says: expect.stringMatching(/worn/) as string });
  await page.getByRole('button', { name: 'Back to what is usual' }).click();
  expect([await fresh.inputValue(), await worn.inputValue()]).toEqual(['100', '500']);
  await page.getByRole('button', { name: 'Save the rules' }).click();
  await page.getByRole('button', { name: 'Back to what is usual' }).waitFor({ state: 'detached' });
  await expect.poll(async () => (await laneOnScreen(floor, 1)).says, SOON).not.toMatch(/worn/);
});
