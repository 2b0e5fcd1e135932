import { describe, expect, it } from 'vitest';
import { signedIn } from '#tests/support/actors.ts';
import { systemClock } from '#server/platform/clock.ts';
import { PHONE, SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const MIN = 60_000;

const { server, house, screen } = await stage((server) => floorHouse(server, 12));

/** The lane machine reports lanes as dressed with the pattern that is asked for. */
async function dress(lanes: readonly number[]): Promise<void> {
  const now = systemClock.now();
  await house.device('run.started', { machine: 'm1', run: '118', pattern: 'owls', revision: 1, lanes });
  for (const [i, lane] of lanes.entries()) {
    const [startedAt, finishedAt] = [now - (lanes.length - i + 1) * MIN, now - (lanes.length - i) * MIN].map((at) => new Date(at).toISOString());
    await house.device('run.lane.dressed', { machine: 'm1', run: '118', lane, startedAt, finishedAt });
  }
  await house.device('run.finished', { machine: 'm1', run: '118' });
}

describe('a secretary', () => {
  it('sees the own league alone and why it isn’t ready, sees it become ready as lanes are dressed, and confirms', async () => {
    const own = await house.league({ name: 'Night Owls', fromLane: 5, toLane: 8, inMinutes: 65 });
    const other = await house.league({ name: 'Early Birds', fromLane: 9, toLane: 12, inMinutes: 65 });
    const secretary = await signedIn(server.url, server.slices.accounts, { centre: house.centre, role: 'secretary', leagues: [own.league] });
    const page = await screen(secretary, PHONE);
    await page.goto('/');
    await page.getByRole('heading', { level: 1, name: 'Night Owls', exact: true }).waitFor();
    expect(new URL(page.url()).pathname).toBe(house.at('/readiness'));
    expect(await page.getByText('Early Birds').count()).toBe(0);
    const confirm = page.getByRole('button', { name: 'Confirm lanes 5–8' });
    await page.getByText(/not dressed|never dressed|film unknown|no film/i).first().waitFor();
    expect(await confirm.isDisabled()).toBe(true);

    await dress([5, 6, 7]);
    await page.getByText(/three lanes are ready/i).waitFor(SOON);
    expect(await confirm.isDisabled()).toBe(true);
    await dress([8]);
    await page.getByText('All four lanes are as asked.').waitFor(SOON);
    await confirm.click();
    await page.getByText(/confirmed at \d\d:\d\d/).first().waitFor();
    const desk = await screen(house.desk);
    await desk.goto(house.at(`/readiness/${own.session}`));
    await desk.getByText(/confirmed at \d\d:\d\d/).first().waitFor();
    expect(await desk.getByRole('button', { name: /^Confirm lanes/ }).count()).toBe(0);

    for (const path of [`/readiness/${other.session}`, `/leagues/${other.league}`]) {
      await page.goto(house.at(path));
      await page.getByRole('heading', { level: 1, name: 'Nothing is at this address.' }).waitFor();
      expect(await page.getByText('Early Birds').count(), path).toBe(0);
    }
    for (const path of ['/calls', '/numbers', '/settings']) {
      await page.goto(house.at(path));
      await page.getByText('Your role doesn’t include this. Ask the manager.').first().waitFor();
    }
  });
});
