import AxeBuilder from '@axe-core/playwright';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { ensureClient } from '../../server/boot/client.mjs';

export const DESK = { viewport: { width: 1440, height: 900 } };
export const WALL = { viewport: { width: 1920, height: 1080 } };
export const PHONE = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
/** A change must be on screen within a second; where a test only waits for it to be there, a slow machine gets more. */
export const SOON = { timeout: 12_000 };

/** Debian's Chromium as built without windows: a context takes a tenth of the time. No sandbox (containers have none), and nothing that it would fetch by itself. */
export const CHROMIUM = {
  executablePath: '/usr/bin/chromium-headless-shell',
  args: ['--no-sandbox', '--disable-dev-shm-usage', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'],
};

export interface TestBrowser {
  /** A page of a browser of its own at this server; `who` has signed in there already. */
  page(url: string, who: { cookie: string } | null, options?: BrowserContextOptions): Promise<Page>;
  /** Closes the pages that were opened, and fails if one of them threw. */
  closePages(): Promise<void>;
  close(): Promise<void>;
}

/** The browser, upon a client built from the present sources. */
export async function openBrowser(): Promise<TestBrowser> {
  await ensureClient();
  const browser: Browser = await chromium.launch(CHROMIUM);
  let thrown: string[] = [];
  return {
    async page(url, who, options = DESK) {
      // Nothing moves by itself unless a test looks at it: drawing 60 pictures a second takes half a core.
      const context = await browser.newContext({ baseURL: url, reducedMotion: 'reduce', ...options });
      if (who) await context.addCookies(cookiesOf(who.cookie, url));
      const page = await context.newPage();
      page.setDefaultTimeout(20_000);
      page.on('pageerror', (error) => thrown.push(`${page.url()}: ${error.name} ${error.message} ${error.stack ?? ''}`));
      return page;
    },
    async closePages() {
      await Promise.all(browser.contexts().map((context) => context.close()));
      const said = thrown;
      thrown = [];
      if (said.length > 0) throw new Error(`A page threw:\n${said.join('\n')}`);
    },
    close: () => browser.close(),
  };
}

const cookiesOf = (header: string, url: string) => header.split('; ').map((pair) => ({ name: pair.slice(0, pair.indexOf('=')), value: pair.slice(pair.indexOf('=') + 1), url }));

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** No frames here: legacy mode saves a page of its own for the report; and what passed needs no addresses. */
async function audited(page: Page, runOnly: string[], within?: string) {
  const axe = new AxeBuilder({ page }).options({ runOnly, resultTypes: ['violations'] }).setLegacyMode();
  const { violations } = await (within === undefined ? axe : axe.include(within)).analyze();
  return violations;
}

/** What axe calls serious or critical, anywhere on the page: rule, and the elements it names. */
export async function seriousFindings(page: Page): Promise<string[]> {
  return (await audited(page, [...WCAG, 'best-practice']))
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) => nodes.map(({ html, failureSummary }) => `${id}: ${html} ${failureSummary ?? ''}`));
}

/** All that axe finds in the page's main part, how slight it may be, and how many px it is wider than its room. */
export async function mainFindings(page: Page): Promise<string[]> {
  const found = (await audited(page, WCAG, 'main')).map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`);
  const wider = await page.locator('main').evaluate((main) => main.scrollWidth - main.clientWidth);
  return wider > 0 ? [...found, `${wider} px wider than its room`] : found;
}

/** Accessible name and mark of a lane as the plan shows it. */
export async function laneOnScreen(page: Page, lane: number): Promise<{ says: string; mark: string }> {
  const strip = page.locator(`[data-lane="${lane}"]`).first();
  return { says: (await strip.getAttribute('aria-label')) ?? '', mark: (await strip.getAttribute('data-mark')) ?? '' };
}
