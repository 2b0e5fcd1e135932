import { describe, expect, it } from 'vitest';
import { laneOnScreen, SOON, WALL } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const { server, house, screen } = await stage((server) => floorHouse(server, 32));

describe('a screen on the wall', () => {
  it('is opened by the link that the manager makes, shows the house without anything to press, and loses it when the link is revoked', async () => {
    const settings = await screen(house.manager);
    await settings.goto(house.at('/settings'));
    await settings.getByLabel('Where the screen hangs').fill('Over the desk');
    await settings.getByRole('button', { name: 'Make a link' }).click();
    const link = (await settings.getByRole('dialog').locator('code').textContent()) ?? '';
    expect(link).toMatch(new RegExp(`^${server.url}/d/`));
    await settings.getByRole('button', { name: 'Done' }).click();

    const wall = await screen(null, WALL);
    await wall.goto(link);
    await wall.locator('[data-lane="32"]').waitFor();
    expect(new URL(wall.url()).pathname).toBe(house.at('/wall'));
    expect(await wall.locator('button, a, input, select, [tabindex="0"]').count()).toBe(0);
    expect(await wall.locator('[data-lane]').count()).toBe(32);
    expect((await wall.locator('[data-lane="9"] .figure').boundingBox())?.height).toBeGreaterThanOrEqual(79);
    await house.device('pinsetter.stopped', { lane: 9 });
    await expect.poll(() => laneOnScreen(wall, 9), SOON).toMatchObject({ mark: 'unanswered' });
    await wall.getByText('Pinsetter stopped').waitFor();

    for (const path of ['/floor', '/calls', '/numbers', '/settings']) {
      await wall.goto(house.at(path));
      await wall.locator('[data-lane="32"]').waitFor();
      expect(new URL(wall.url()).pathname, path).toBe(house.at('/wall'));
    }
    await wall.goto(house.at('/wall'));
    await wall.locator('[data-lane="32"]').waitFor();

    await settings.getByRole('button', { name: 'Revoke the link of Over the desk' }).click();
    await settings.getByText('No link opens the wall.').waitFor();
    await expect.poll(() => wall.locator('[data-lane]').count(), SOON).toBe(0);
    await wall.goto(link);
    await wall.getByText('This display link is unknown or was revoked.', { exact: false }).waitFor();
    await wall.goto(house.at('/wall'));
    await wall.getByRole('heading', { name: 'Sign in to your centre' }).waitFor();
  });
});
