import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import type { FunnelView, NightView } from '#shared/contracts/numbers.ts';
import { addDays, businessDay, businessDayAt } from '#shared/domain/business-day.ts';
import { systemClock } from '#server/platform/clock.ts';
import { SOON } from '#tests/support/browser.ts';
import { floorHouse } from '#tests/support/floor-house.ts';
import { stage } from '#tests/support/stage.ts';

const HOUR = 3_600_000;
const LANES = 8;

const { server, house, screen } = await stage((server) => floorHouse(server, LANES));
const date = addDays(businessDayAt(systemClock.now(), house.centre.zone, house.centre.cut).date, -1);
await lastNight();
await server.slices.numbers.issueQuietly(house.centre, date, systemClock.now());

/** Two hours of open play on every lane from 19:00 on: 30 frames and 55 deliveries each half hour; lanes 2 and 5 stop. */
async function lastNight(): Promise<void> {
  const seven = businessDay(date, house.centre.zone, 0).from + 19 * HOUR;
  const lanes = Array.from({ length: LANES }, (_, i) => i + 1);
  const at = (hours: number) => seven + hours * HOUR;
  await house.gateway.send([
    ...lanes.map((lane) => ({ type: 'lane.opened', data: { lane, use: 'open', bowlers: 4 }, time: at(0) })),
    ...lanes.flatMap((lane) => [0.5, 1, 1.5, 2].map((hours) => ({ type: 'lane.counted', data: { lane, deliveries: 55, frames: 30, basis: 'scored' }, time: at(hours) - 1000 }))),
    ...[2, 5].flatMap((lane) => [{ type: 'pinsetter.stopped', data: { lane }, time: at(0.6) }, { type: 'pinsetter.restarted', data: { lane }, time: at(0.7) }]),
    ...lanes.map((lane) => ({ type: 'lane.closed', data: { lane }, time: at(2) })),
  ]);
}

const night = async () => (await house.as(house.manager, 'GET', `/nights/${date}`)) as NightView;
/** A row of the night's table: its value without notes. */
const figure = (page: Page, name: string) => page.getByRole('row', { name: new RegExp(`^${name}`) }).first().getByRole('cell').first().locator('.type-number').textContent();

describe('the manager, the morning after', () => {
  it('sees the finding and the night’s figures as the API has them, and as they were bowled', async () => {
    const page = await screen(house.manager);
    await page.goto(house.at('/numbers'));
    const { finding } = (await house.as(house.manager, 'GET', '/lanes-compared')) as FunnelView;
    await page.getByRole('heading', { level: 1, name: finding }).waitFor();
    await page.getByText('The figures are as they were issued.').waitFor();
    const { figures } = await night();
    expect(figures.total).toMatchObject({ frames: LANES * 4 * 30, deliveries: LANES * 4 * 55, stops: 2 });
    expect(await figure(page, 'Frames')).toBe('960');
    expect(await figure(page, 'Calls per 1 000')).toBe(figures.total.rate?.perThousand.toFixed(2));
    expect(figures.total.rate?.perThousand).toBeCloseTo((1000 * 2) / 960, 6);
    expect(await figure(page, 'Occupancy')).toBe(`${Math.round(100 * (figures.total.occupancyOfAll ?? 0))}%`);
    const lanes = page.getByRole('table', { name: 'By lane' }).getByRole('row');
    expect(await lanes.count()).toBe(LANES + 1);
    const frames = await Promise.all(figures.byLane.map(async ({ lane }) => (await lanes.nth(lane).getByRole('cell').allTextContents()).includes('120')));
    expect(frames).toEqual(figures.byLane.map(({ frames: bowled }) => bowled === 120));
  });

  it('sees what came in late beside what was issued', async () => {
    const page = await screen(house.manager);
    await page.goto(house.at(`/numbers/${date}`));
    await page.getByText('The figures are as they were issued.').waitFor();
    const nine = businessDay(date, house.centre.zone, 0).from + 20 * HOUR;
    await house.gateway.sendOne({ type: 'lane.counted', data: { lane: 1, deliveries: 20, frames: 11, basis: 'scored' }, time: nine });
    await page.getByText('Frames: issued 960, now 971').first().waitFor(SOON);
    expect(await figure(page, 'Frames')).toBe('971');
    expect((await night()).report?.figures.total.frames).toBe(960);
  });

  it('sees people and gateways in the settings, makes a gateway whose key is shown once, and the key works', async () => {
    const page = await screen(house.manager);
    await page.goto(house.at('/settings'));
    for (const { email } of [house.desk, house.mechanic, house.manager]) await page.getByText(email, { exact: true }).waitFor();
    await page.getByText(/^Gateway \d+$/).first().waitFor();
    await page.getByLabel('Name of the gateway').fill('Second box');
    await page.getByRole('button', { name: 'Make a gateway' }).click();
    const key = (await page.getByRole('dialog').locator('code').textContent()) ?? '';
    await page.getByRole('button', { name: 'Done' }).click();
    await page.getByText('Second box').first().waitFor();
    expect(await page.content()).not.toContain(key);
    const send = () => fetch(`${server.url}/api/ingest/events`, {
      method: 'POST', headers: { 'authorization': `Bearer ${key}`, 'content-type': 'application/cloudevents+json' },
      body: JSON.stringify({ specversion: '1.0', source: 'second', id: 'one', type: 'lane.opened', time: new Date().toISOString(), data: { lane: 9 } }),
    });
    expect(await (await send()).json()).toMatchObject({ accepted: 0, setAside: [{ id: 'one', reason: 'lane.unknown' }] });
    await page.reload();
    await page.getByText('lane.opened', { exact: true }).waitFor();
    await page.getByRole('button', { name: /^Revoke the key of Second box/ }).click();
    await page.getByRole('button', { name: /^Revoke the key of Second box/ }).waitFor({ state: 'detached' });
    expect((await send()).status).toBe(403);
  });
});
