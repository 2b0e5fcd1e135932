import AxeBuilder from '@axe-core/playwright';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { ensureClient } from '../../server/boot/client.mjs';

export const DESK = { viewport: { width: 1440, height: 900 } };
export const WALL = { viewport: { width: 1920, height: 1080 } };
export const PHONE = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
/** A change must be on screen within a second; where a test only waits for it to be there, a slow machine gets more. */
export const SOON = { timeout: 12_000 };

/** Debian's Chromium, without a sandbox (containers have none) and without what it would fetch by itself. */
const CHROMIUM = {
  executablePath: '/usr/bin/chromium',
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
      const context = await browser.newContext({ baseURL: url, ...options });
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

/** What axe calls serious or critical, anywhere on the page: rule, and the elements it names. */
export async function seriousFindings(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']).analyze();
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) => nodes.map(({ html, failureSummary }) => `${id}: ${html} ${failureSummary ?? ''}`));
}

/** Accessible name and mark of a lane as the plan shows it. */
export async function laneOnScreen(page: Page, lane: number): Promise<{ says: string; mark: string }> {
  const strip = page.locator(`[data-lane="${lane}"]`).first();
  return { says: (await strip.getAttribute('aria-label')) ?? '', mark: (await strip.getAttribute('data-mark')) ?? '' };
}
