import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync(new URL('./index.css', import.meta.url), 'utf8');

function tokensOf(selector: string): Record<string, string> {
  const start = css.indexOf(selector);
  const block = css.slice(start, css.indexOf('}', start));
  return Object.fromEntries([...block.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g)].map((m) => [m[1], m[2]]));
}

/** Relative luminance and contrast ratio as WCAG 2.2 defines them. */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((i) => parseInt(hex.slice(i, i + 2), 16) / 255).map((v) => (v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4));
  return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
}
function contrast(a: string, b: string): number {
  const [x, y] = [luminance(a), luminance(b)];
  return (Math.max(x, y) + 0.05) / (Math.min(x, y) + 0.05);
}

/** Every pair in which a text stands on a ground: SC 1.4.3, 4.5 : 1. */
const TEXT = [
  'ink/paper', 'ink/card', 'ink/approach', 'dim/paper', 'dim/card', 'dim/approach', 'red/paper', 'red/card', 'amber/paper', 'amber/card', 'green/paper',
  'green/card', 'film/paper', 'film/card', 'film/approach', 'league/paper', 'league/card', 'open/card', 'on-red/red', 'on-amber/amber-fill', 'on-green/green',
  'on-league/league', 'on-wood/pine', 'on-wood/maple', 'pin/cap', 'pin/deck', 'paper/ink', 'paper/film', 'card/ink',
];
/** Marks and borders that carry meaning: SC 1.4.11, 3 : 1. */
const MARKS = ['pin/deck', 'cap-line/cap', 'amber-fill/deck', 'line/paper', 'line/card', 'open/paper', 'film-edge/pine', 'red/approach', 'red/paper', 'green/paper'];

describe.each([['light', "[data-theme='light'] {"], ['dark', "[data-theme='dark'] {"]])('contrast of the %s theme', (_name, selector) => {
  const tokens = tokensOf(selector);
  it('reads the tokens', () => expect(Object.keys(tokens).length).toBeGreaterThan(24));
  it.each(TEXT)('text %s is at least 4.5 : 1', (pair) => {
    const [a, b] = pair.split('/') as [string, string];
    expect(contrast(tokens[a]!, tokens[b]!)).toBeGreaterThanOrEqual(4.5);
  });
  it.each(MARKS)('mark %s is at least 3 : 1', (pair) => {
    const [a, b] = pair.split('/') as [string, string];
    expect(contrast(tokens[a]!, tokens[b]!)).toBeGreaterThanOrEqual(3);
  });
});

it('both themes say the same tokens', () => {
  expect(Object.keys(tokensOf("[data-theme='dark'] {")).sort()).toEqual(Object.keys(tokensOf("[data-theme='light'] {")).sort());
});
it('computes what WCAG says of black on white and of #777 on white', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  expect(contrast('#777777', '#ffffff')).toBeCloseTo(4.48, 2);
});
