import type { BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, afterEach } from 'vitest';
import { systemClock } from '#server/platform/clock.ts';
import { openBrowser, type TestBrowser } from './browser.ts';
import { served } from './served.ts';
import type { TestServer } from './server.ts';

export interface Stage<H> {
  server: TestServer;
  browser: TestBrowser;
  house: H;
  /** A screen of its own at the server; null: nobody has signed in. */
  screen(who: { cookie: string } | null, options?: BrowserContextOptions): Promise<Page>;
}

/**
 * What a file of browser tests plays on: a server upon the worker's database, a browser, and a house as `furnish` makes it. Await it
 * at the top of the file; all of it ends with the file, and the screens with each test (with the last one where they are kept).
 */
export async function stage<H>(furnish: (server: TestServer) => Promise<H>, { keepScreens = false } = {}): Promise<Stage<H>> {
  const { server } = await served({ clock: systemClock });
  const browser = await openBrowser();
  if (!keepScreens) afterEach(() => browser.closePages());
  afterAll(() => browser.closePages().finally(() => browser.close()));
  return { server, browser, house: await furnish(server), screen: (who, options) => browser.page(server.url, who, options) };
}
