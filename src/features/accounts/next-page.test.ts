import { expect, it } from 'vitest';
import { nextPage } from './next-page.ts';

const at = 'http://lanes.house.test:4310';
const next = (path: string) => nextPage(`?next=${encodeURIComponent(path)}`, at);

it('goes on where somebody wanted to be', () => {
  expect(next('/north/calls/17?from=mail#steps')).toBe('/north/calls/17?from=mail#steps');
});

it('starts at the beginning without such a wish', () => {
  expect(nextPage('', at)).toBe('/');
});

it.each(['https://elsewhere.test/', '//elsewhere.test/', '/\\elsewhere.test/', 'javascript:alert(1)', 'north/floor', '/\t/elsewhere.test'])('never leads to another site: %s', (path) => {
  expect(next(path)).toBe('/');
});
