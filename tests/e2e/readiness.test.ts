import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { systemClock } from '#server/platform/clock.ts';
import { DESK, mainFindings, PHONE, SOON } from '#tests/support/browser.ts';
import { leagueEvening, type LeagueEvening } from '#tests/support/league-evening.ts';
import { stage } from '#tests/support/stage.ts';

const { server, screen } = await stage(() => Promise.resolve(null));
let h: LeagueEvening;

const at = (path: string) => `/${h.centre.slug}${path}`;

const sound = async (page: Page): Promise<void> => expect(await mainFindings(page)).toEqual([]);

describe('a secretary before the league', () => {
  it('sees on the phone that the lanes are ready, confirms, hears live what gets worse, and raises a concern', async () => {
    h = await leagueEvening(server);
    const page = await screen(h.secretary, PHONE);
    await page.goto(at('/readiness'));
    await page.getByRole('heading', { level: 1, name: 'Night Owls' }).waitFor();
    await page.getByText('All four lanes are as asked.').waitFor();
    await sound(page);
    const confirm = page.getByRole('button', { name: 'Confirm lanes 5–8' });
    expect((await confirm.boundingBox())?.height).toBeGreaterThanOrEqual(48);
    await h.device('pinsetter.stopped', { lane: 7 });
    await page.getByText(/Three lanes are ready; lane 7 waits for a mechanic/).waitFor(SOON);
    await page.getByText('Something holds: it can’t be confirmed yet.').waitFor();
    expect(await confirm.isDisabled()).toBe(true);
    await sound(page);
    await page.getByRole('button', { name: 'Raise a concern' }).click();
    await page.getByLabel('What is wrong').fill('Lane 7 again.');
    await page.getByLabel('Lane', { exact: true }).selectOption('7');
    await page.getByRole('button', { name: 'Tell the desk' }).click();
    await page.getByRole('paragraph').filter({ hasText: 'Lane 7 again.' }).waitFor();
    await h.device('pinsetter.restarted', { lane: 7 });
    await page.getByText('All four lanes are as asked.').waitFor(SOON);
    await confirm.click();
    await page.getByText(/confirmed at \d\d:\d\d/).first().waitFor();
  });
});

describe('the desk', () => {
  it('takes an offered pair and settles the concern', async () => {
    h = await leagueEvening(server);
    await server.slices.readiness.watch(h.centre, systemClock.now(), { mail: false });
    await h.device('pinsetter.stopped', { lane: 7 });
    const secretary = await screen(h.secretary, PHONE);
    await secretary.goto(at(`/readiness/${h.session.id}`));
    await secretary.getByRole('button', { name: 'Ask the desk for this' }).first().click();
    await secretary.getByText('Please: move 7–8 to 9–10.').waitFor();
    const page = await screen(h.desk, DESK);
    await page.goto(at(`/readiness/${h.session.id}`));
    await page.getByRole('heading', { name: 'Night Owls', exact: true }).waitFor();
    await page.getByRole('cell', { name: 'Call unanswered', exact: true }).first().waitFor();
    await sound(page);
    await page.getByRole('button', { name: 'Move to 9–10' }).click();
    await page.getByText(/Lanes 5–6, 9–10 · warm-up/).waitFor();
    await page.getByRole('button', { name: 'Settle', exact: true }).click();
    await page.getByLabel('How it was settled').fill('Moved.');
    await page.getByRole('dialog').getByRole('button', { name: 'Settle' }).click();
    await page.getByText(/settled it at/).waitFor();
    await secretary.getByText(/Lanes 5–6, 9–10/).first().waitFor(SOON);
  });

  it('makes a league; lanes backwards are refused beside their field, a skip week is a tick away', async () => {
    h = await leagueEvening(server);
    const page = await screen(h.desk, DESK);
    await page.goto(at('/leagues'));
    await page.getByRole('link', { name: 'New league' }).click();
    await page.getByRole('heading', { name: 'A new league' }).waitFor();
    await page.getByLabel('Name', { exact: true }).fill('Early Birds');
    await page.getByLabel('From lane').fill('5');
    await page.getByLabel('To lane').fill('4');
    await page.getByRole('button', { name: 'Make the league' }).click();
    await page.getByText('Lanes 5–4 run backwards. Put the lower lane first.').waitFor();
    expect(await page.getByLabel('From lane').getAttribute('aria-invalid')).toBe('true');
    await sound(page);
    await page.getByLabel('From lane').fill('1');
    await page.getByLabel('Teams', { exact: true }).fill('4');
    await page.getByRole('checkbox', { name: /^Bowls on/ }).nth(1).uncheck();
    await page.getByRole('button', { name: 'Make the league' }).click();
    await page.getByRole('heading', { name: 'Early Birds' }).waitFor();
    await page.getByRole('heading', { name: 'Sessions' }).waitFor();
    expect(await page.getByText('lanes 1–4').count()).toBe(28);
    await sound(page);
    await page.setViewportSize(PHONE.viewport);
    await sound(page);
  });
});

it('a manager says what holds', async () => {
  h = await leagueEvening(server);
  await h.device('pinsetter.stopped', { lane: 7 });
  const page = await screen(h.manager, DESK);
  await page.goto(at('/readiness'));
  await page.getByRole('heading', { name: 'Night Owls isn’t ready yet.' }).waitFor();
  await page.getByRole('button', { name: 'What holds' }).click();
  await page.getByLabel('Pinsetter and its calls').selectOption('warns');
  await page.getByRole('button', { name: 'Save' }).click();
  await page.getByRole('heading', { name: 'Night Owls is at risk.' }).waitFor();
});
