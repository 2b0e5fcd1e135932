import { expect, it } from 'vitest';
import { browserOf } from './browser.ts';

it.each([
  ['Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 (KHTML, like Gecko) HeadlessChrome/156.0.8078.114 Safari/537.36', 'Chrome', 'Linux'],
  ['Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/18.0 Mobile/15E148 Safari/604.1', 'Safari', 'iOS'],
  ['node', null, null], ['', null, null],
])('%s', (agent, browser, system) => {
  expect(browserOf(agent)).toEqual({ browser, system });
});
