import { describe, expect, it } from 'vitest';
import type { PatternDetail } from '#shared/contracts/runs.ts';
import { wallOf } from '#shared/domain/business-day.ts';
import { wallTime } from '#shared/text/en/formats.ts';
import { systemClock } from '#server/platform/clock.ts';
import { PHONE, SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const MIN = 60_000;

const { house, screen } = await stage((server) => floorHouse(server, 12));

const clockIn = (minutes: number): string => wallTime(wallOf(systemClock.now() + minutes * MIN, house.centre.zone).minutes);

describe('who runs the lane machine', () => {
  it('hears which lanes wait for a run, plans it with one tap, and sees it go lane by lane', async () => {
    await house.league({ name: 'Night Owls', fromLane: 5, toLane: 8, inMinutes: 75 });
    const page = await screen(house.mechanic, PHONE);
    await page.goto(house.at('/runs'));
    await page.getByRole('heading', { level: 1, name: 'Lanes 5–8 wait for a run.' }).waitFor();
    await page.getByText(/^Start by \d\d:\d\d for Night Owls\.$/).waitFor();
    await page.getByText('Proven best with these blocks').waitFor();
    await page.getByRole('button', { name: 'Plan this run' }).click();
    await page.getByRole('heading', { level: 1, name: /^No lane is being dressed\. Run .* starts at \d\d:\d\d\.$/ }).waitFor();
    expect(await page.getByText(/^Start by \d\d:\d\d for Night Owls\.$/).count()).toBe(1);

    await house.device('run.started', { machine: 'm1', run: '7', pattern: 'owls', revision: 1, lanes: [9, 10] });
    await page.getByRole('heading', { level: 1, name: /^Machine 1 dresses lane 9, done about/ }).waitFor(SOON);
    const now = systemClock.now();
    await house.device('run.lane.dressed', { machine: 'm1', run: '7', lane: 9, startedAt: new Date(now - MIN).toISOString(), finishedAt: new Date(now).toISOString() });
    await page.getByRole('heading', { level: 1, name: /^Machine 1 dresses lane 10,/ }).waitFor(SOON);
    await page.locator('summary', { hasText: '1 of 2 lanes dressed' }).waitFor();
    await house.device('run.aborted', { machine: 'm1', run: '7', lane: 10, reason: 'squeegee' });
    await page.getByRole('listitem').filter({ hasText: /^broke off: 10$/ }).waitFor(SOON);
  });

  it('writes down what was made; lanes and times that can’t be are said beside their fields, and nothing is sent', async () => {
    const page = await screen(house.mechanic);
    await page.goto(house.at('/runs'));
    await page.getByRole('button', { name: 'Record a run that was made' }).click();
    const form = page.getByRole('dialog');
    await form.getByRole('button', { name: 'Record it' }).click();
    expect(await form.getByText('This is needed.').count()).toBe(4);
    await form.getByLabel('Machine', { exact: true }).selectOption('m1');
    await form.getByLabel('Pattern').selectOption('house');
    await form.getByLabel('Lanes', { exact: true }).fill('1–4');
    await form.getByLabel('Began').fill(clockIn(-20));
    await form.getByLabel('Ended').fill(clockIn(-12));
    await form.getByLabel('Skipped').fill('9');
    await form.getByRole('button', { name: 'Record it' }).click();
    await form.getByText('Not all of these are lanes of the run.').waitFor();
    await form.getByLabel('Skipped').fill('3');
    await form.getByRole('button', { name: 'Record it' }).click();
    await form.waitFor({ state: 'detached' });
    await page.locator('summary', { hasText: '3 of 4 lanes dressed' }).click();
    // Nobody measured it: computed from the pattern, and said so.
    await page.getByText(/^\d+\.\d mL, computed$/).first().waitFor();
  });

  it('makes a revision of a pattern: a range that crosses itself is refused beside its field, the right one lays more', async () => {
    const before = (await house.as(house.mechanic, 'GET', '/patterns/house')) as PatternDetail;
    const page = await screen(house.mechanic);
    await page.goto(house.at('/patterns'));
    await page.getByRole('link', { name: /House/ }).click();
    await page.getByRole('button', { name: 'New revision' }).click();
    const form = page.getByRole('dialog');
    const pass = form.getByRole('group', { name: 'Pass 1' });
    await pass.getByLabel('From board').fill('10R');
    await pass.getByLabel('To board').fill('10L');
    await form.getByRole('button', { name: 'Save' }).click();
    await pass.getByText(/crosses itself/).waitFor();
    expect(((await house.as(house.mechanic, 'GET', '/patterns/house')) as PatternDetail).revision).toBe(before.revision);
    await pass.getByLabel('From board').fill('2L');
    await pass.getByLabel('To board').fill('2R');
    await pass.getByLabel('Loads').fill('9');
    await form.getByRole('button', { name: 'Save' }).click();
    await form.waitFor({ state: 'detached' });
    const after = (await house.as(house.mechanic, 'GET', '/patterns/house')) as PatternDetail;
    expect(after.revision).toBe(before.revision + 1);
    expect(after.volume.totalUl).toBeGreaterThan(before.volume.totalUl);
    expect(after.revisions.at(-1)?.volume).toEqual(before.volume);
  });
});

it('the desk sees runs and plans none', async () => {
  const page = await screen(house.desk);
  await page.goto(house.at('/runs'));
  await page.getByText('Lane machines').waitFor();
  for (const name of ['Plan a run', 'Record a run that was made', 'Plan this run', 'Take back']) expect(await page.getByRole('button', { name }).count(), name).toBe(0);
});
