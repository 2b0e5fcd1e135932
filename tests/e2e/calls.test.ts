import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { mainFindings, PHONE, SOON } from '#tests/support/browser.ts';
import { callsHouse, seen } from '#tests/support/calls-house.ts';
import { stage } from '#tests/support/stage.ts';

const { house: h, screen } = await stage((server) => callsHouse(server, { lanes: 12 }));

const calls = `/calls`;
const path = (rest = '') => `/${h.centre.slug}${calls}${rest}`;
const button = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: typeof name === 'string' });

/** Nothing that a reader, a thumb or an eye would miss: axe, targets under 48 px, text wider than the screen. */
async function sound(page: Page): Promise<void> {
  expect(await mainFindings(page)).toEqual([]);
  const small = await page.locator('main button:visible').evaluateAll((all) => all.map((one) => ({ text: one.textContent, height: one.getBoundingClientRect().height })).filter((one) => one.height < 48));
  expect(small).toEqual([]);
}

describe('the mechanic’s phone', () => {
  it('takes a call from "mine" to back running, with its cause', async () => {
    const page = await screen(h.mechanic, PHONE);
    await page.goto(path());
    await page.getByRole('heading', { name: 'No call is open.' }).waitFor();
    await h.device('lane.opened', { lane: 9, use: 'league', label: 'Thursday Scratch' });
    await h.device('pinsetter.stopped', { lane: 9 });
    await page.getByRole('heading', { name: 'Lane 9 waits for a mechanic.' }).waitFor(SOON);
    await sound(page);
    await button(page, 'Mine: lane 9').click();
    await page.getByText('you are on the way').waitFor();
    await page.getByRole('link', { name: 'Pinsetter stopped' }).click();
    await page.getByRole('heading', { level: 1, name: 'Pinsetter stopped' }).waitFor();
    await page.getByText('Thursday Scratch').first().waitFor();
    await sound(page);
    await button(page, 'On lane').click();
    await page.getByText('you are on lane').waitFor();
    await button(page, 'Back running').click();
    await button(page, 'Deck').click();
    await button(page, 'Pin off spot').click();
    await page.getByLabel(/^Note/).fill('cup worn');
    await button(page, 'Back running: lane 9').click();
    await page.getByText(/^Closed .* by .*: Deck: pin off spot\./).waitFor();
    await page.getByRole('link', { name: 'All calls' }).click();
    await page.getByRole('listitem').filter({ hasText: `Deck: pin off spot · ${h.mechanic.name}` }).filter({ hasText: 'cup worn' }).waitFor(SOON);
    await sound(page);
  });

  it('keeps the lockout record, holds the lane until its release, and alarms when the machine counts', async () => {
    const call = await h.stop(5);
    const page = await screen(h.mechanic, { ...PHONE, colorScheme: 'dark' });
    await page.goto(path(`/${call.id}`));
    await button(page, 'Mine').click();
    await button(page, 'On lane').click();
    await button(page, 'Begin the lockout record').click();
    await page.getByText('This list is a record. It isolates nothing.').waitFor();
    const tick = async (name: string) => {
      await page.getByRole('checkbox', { name }).click();
      await page.getByRole('checkbox', { name, checked: true }).or(page.getByText('Before it runs again')).first().waitFor();
    };
    expect(await page.getByRole('checkbox', { name: 'My lock and tag on' }).getAttribute('aria-disabled')).toBe('true');
    for (const step of ['Desk and bowlers told', 'Machine stopped', 'No ball comes from the neighbour lane', 'Machine off at the isolator', 'Ball lift off, own supply', 'My lock and tag on', 'Deck and rake down, springs released', 'Tried the start: stays dead']) await tick(step);
    await page.getByText(/in machine, recorded/).first().waitFor();
    expect(await button(page, 'Back running').isDisabled()).toBe(true);
    await sound(page);
    await h.device('lane.counted', { lane: 5, cycles: 1 });
    const alarm = page.getByRole('alertdialog', { name: 'Lane 5 moved' });
    await alarm.waitFor(SOON);
    await button(page, 'I am clear of the machine').click();
    await alarm.waitFor({ state: 'hidden' });
    for (const step of ['Tools out', 'Guards on', 'People clear', 'Told: it will run', 'My own lock and tag off']) {
      await page.getByRole('checkbox', { name: step }).click();
      await page.getByRole('checkbox', { name: step, checked: true }).waitFor();
    }
    await button(page, 'End the lockout record').click();
    await button(page, 'Back running').click();
    await button(page, 'Deck: pin off spot').click();
    await button(page, 'Back running: lane 5').click();
    await expect.poll(() => h.openOn(5), SOON).toEqual([]);
  });

  it('keeps what is pressed without a connection, says that it is queued, and sends it once when it is back', async () => {
    const call = await h.stop(3);
    const page = await screen(h.mechanic, PHONE);
    await page.goto(path(`/${call.id}`));
    await button(page, 'Mine').waitFor();
    await page.context().setOffline(true);
    await button(page, 'Mine').click();
    await page.getByText(/^Queued: Mine/).waitFor(SOON);
    await button(page, 'On lane').click();
    await page.getByText('Queued: Mine, On lane').waitFor();
    expect((await h.openOn(3))[0]).toMatchObject({ status: 'unanswered' });
    await page.context().setOffline(false);
    await page.getByText(/^Queued/).waitFor({ state: 'hidden', ...SOON });
    await page.getByText('you are on lane').waitFor();
    await expect.poll(async () => (await h.openOn(3))[0], SOON).toMatchObject({ status: 'on-lane', mechanic: { id: h.mechanic.id } });
    expect(seen(await h.get(h.desk, `/${call.id}`)).steps.map((step) => step.kind)).toEqual(['raised', 'acknowledged', 'on-lane']);
  });

  it('says who was faster, and takes nothing from them', async () => {
    const call = await h.stop(1);
    const page = await screen(h.mechanic, PHONE);
    await page.goto(path(`/${call.id}`));
    await button(page, 'Mine').waitFor();
    await page.context().setOffline(true);
    await button(page, 'Mine').click();
    await h.post(h.other, `/${call.id}/acknowledge`);
    await page.context().setOffline(false);
    await page.getByText(`Not done: Mine. ${h.other.name} has this call already.`).waitFor(SOON);
    await button(page, `Take over from ${h.other.name}`).waitFor(SOON);
    await button(page, 'Understood').click();
    await page.getByText(/^Not done/).waitFor({ state: 'hidden' });
  });
});

describe('the desk', () => {
  it('raises a call in two taps, and a danger that stops the pair', async () => {
    const page = await screen(h.desk);
    await page.goto(path());
    await button(page, 'Lane 7').click();
    await button(page, 'ball return').click();
    await page.getByRole('link', { name: 'Ball not returned' }).waitFor();
    await button(page, 'Lane 12').click();
    await button(page, 'Wet or oily approach').click();
    await page.getByRole('heading', { level: 1, name: 'Wet or oily approach' }).waitFor();
    await page.getByText('lanes 11–12 stopped').waitFor();
    await page.getByText('A trace of oil there can injure.', { exact: false }).waitFor();
    await button(page, 'Mine').click();
    await button(page, 'Danger removed').click();
    await button(page, 'Approach cleaned and dried').click();
    await button(page, 'Danger removed').last().click();
    await page.getByText(/^Closed .*: Danger: approach cleaned and dried\./).waitFor();
  });
});
