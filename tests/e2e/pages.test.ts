import { describe, expect, it } from 'vitest';
import { DESK, PHONE, seriousFindings, WALL } from '#tests/support/browser.ts';
import { busyHouse } from '#tests/support/floor-house.ts';
import { layoutFaults } from '#tests/support/layout-faults.ts';
import { stage } from '#tests/support/stage.ts';

const { house, screen } = await stage((server) => busyHouse(server, 32));

/** Where each page is, and a heading that stands when its data has come. */
const PAGES: [name: string, path: () => string, stands: RegExp][] = [
  ['sign-in', () => '/sign-in', /^Sign in to your centre$/],
  ['calls', () => house.at('/calls'), /waits? for a mechanic|open|danger/i],
  ['call', () => house.at(`/calls/${house.call}`), /^Deck jam$/],
  ['runs', () => house.at('/runs'), /run|lane/i],
  ['patterns', () => house.at('/patterns'), /pattern/i],
  ['pattern', () => house.at('/patterns/house'), /House/],
  ['readiness', () => house.at('/readiness'), /ready|risk/],
  ['session', () => house.at(`/readiness/${house.late.session}`), /^Night Owls$/],
  ['leagues', () => house.at('/leagues'), /league/i],
  ['league', () => house.at(`/leagues/${house.late.league}`), /^Night Owls$/],
  ['a new league', () => house.at('/leagues/new'), /^A new league$/],
  ['numbers', () => house.at('/numbers'), /lane/i],
  ['account', () => house.at('/account'), /./],
  ['settings', () => house.at('/settings'), /^How Tarn Ferry Bowl is set up$/],
];

/** What is read on a phone in the dark of the house: there axe looks again. */
const AT_THE_LANES = ['calls', 'call', 'runs', 'readiness', 'session'];

describe('no text is cut, nothing overlaps, and axe finds nothing serious', () => {
  it.each(PAGES)('%s', async (name, path, stands) => {
    const page = await screen(name === 'sign-in' ? null : house.manager);
    await page.goto(path());
    await page.getByRole('heading', { level: 1, name: stands }).waitFor();
    await page.getByRole('status').filter({ hasText: /loading|working out/i }).first().waitFor({ state: 'detached' });
    for (const { viewport } of [DESK, WALL, PHONE]) {
      // Colours move nothing: what is read in the dark of the house is looked at in both.
      for (const colorScheme of viewport === PHONE.viewport ? (['light', 'dark'] as const) : (['light'] as const)) {
        await page.setViewportSize(viewport);
        await page.emulateMedia({ colorScheme });
        const where = `${viewport.width}×${viewport.height} ${colorScheme}`;
        expect(await layoutFaults(page), where).toEqual([]);
        expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth), where).toBeLessThanOrEqual(0);
        const audited = viewport === DESK.viewport || (viewport === PHONE.viewport && colorScheme === 'dark' && AT_THE_LANES.includes(name));
        if (audited) expect(await seriousFindings(page), where).toEqual([]);
      }
    }
  });
});
