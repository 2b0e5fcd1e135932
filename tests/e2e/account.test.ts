import { expect, it } from 'vitest';
import { signIn } from '#tests/support/actors.ts';
import { ask } from '#tests/support/ask.ts';
import { mainFindings, PHONE } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { server, house, screen } = await stage((server) => floorHouse(server, 4));

const isIn = async (cookie: string): Promise<boolean> => (await ask(server.url, 'GET', '/api/me', { cookie })).status === 200;

it('sees where one is signed in, ends it there, and changes the password: the other sign-ins end, the old one opens nothing', async () => {
  const others = [house.mechanic.cookie, await signIn(server.url, house.mechanic)];
  const stillIn = async () => (await Promise.all(others.map(isIn))).filter(Boolean).length;
  const page = await screen(null, PHONE);
  await page.goto('/sign-in');
  await page.getByLabel('Email address').fill(house.mechanic.email);
  await page.getByLabel('Password').fill(house.mechanic.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.locator('[data-live]').waitFor();
  await page.goto(house.at('/floor'));
  await page.getByRole('button', { name: /^Account/i }).click();
  await page.getByRole('link', { name: 'Password and sign-ins' }).click();
  const ends = page.getByRole('button', { name: 'Sign out there' });
  await ends.nth(1).waitFor();
  await page.getByText('Chrome on Linux').waitFor();
  expect(await mainFindings(page)).toEqual([]);
  await ends.first().click();
  await ends.nth(1).waitFor({ state: 'detached' });
  expect(await stillIn()).toBe(1);

  await page.getByLabel('Present password').fill('not the password');
  await page.getByLabel('New password').fill('heron wades at dusk');
  await page.getByRole('button', { name: 'Change password' }).click();
  await page.getByText('This isn’t your present password.').waitFor();
  await page.getByLabel('Present password').fill(house.mechanic.password);
  await page.getByLabel('New password').fill('short');
  await page.getByRole('button', { name: 'Change password' }).click();
  await page.getByText(/^At least \d+ characters\.$/).waitFor();
  expect(await stillIn()).toBe(1);
  await page.getByLabel('New password').fill('heron wades at dusk');
  await page.getByRole('button', { name: 'Change password' }).click();
  await page.getByText('The password is changed; all other sign-ins have ended.').waitFor();
  expect(await stillIn()).toBe(0);
  await expect(signIn(server.url, house.mechanic)).rejects.toThrow('401');
  expect(await isIn(await signIn(server.url, { ...house.mechanic, password: 'heron wades at dusk' }))).toBe(true);
  await page.reload();
  await page.getByText('this browser').waitFor();
});
