import { describe, expect, it } from 'vitest';
import { fitText, fitWord, type Measure } from './fit-text.ts';

/** Six px a letter at full width, less by the font's width. */
const measure: Measure = (text, { stretch }) => text.length * 6 * (stretch / 100);
const room = (width: number) => ({ width, size: 12, titleWeight: 680, secondWeight: 450, gap: 8 });

describe('a text that is never cut', () => {
  const fit = (width: number) => fitText('Night Owls', ['game 2', 'about 22:40'], room(width), measure);
  it('takes the full width where there is room', () => expect(fit(220)).toEqual({ title: 'Night Owls', second: 'game 2 · about 22:40', stretch: 100 }));
  it('narrows before it drops', () => expect(fit(150)).toEqual({ title: 'Night Owls', second: 'game 2 · about 22:40', stretch: 75 }));
  it('drops the last second part, then the next, and widens again', () => {
    expect(fit(110)).toEqual({ title: 'Night Owls', second: 'game 2', stretch: 100 });
    expect(fit(60)).toEqual({ title: 'Night Owls', second: '', stretch: 100 });
  });
  it('narrows the title alone, then shows nothing', () => {
    expect(fit(40)?.stretch).toBe(62.5);
    expect(fit(30)).toBeNull();
  });
  it('what it returns always fits', () => {
    for (let width = 0; width < 300; width += 3) {
      const fitted = fit(width);
      if (!fitted) continue;
      const used = measure(fitted.title, { size: 12, weight: 680, stretch: fitted.stretch }) + (fitted.second ? 8 + measure(fitted.second, { size: 12, weight: 450, stretch: fitted.stretch }) : 0);
      expect(used).toBeLessThanOrEqual(width);
    }
  });
});

it('takes the longest wording that fits', () => {
  expect(fitWord(['out of service', 'out'], { width: 60, size: 12, weight: 700 }, measure)).toEqual({ word: 'out of service', stretch: 62.5 });
  expect(fitWord(['out of service', 'out'], { width: 24, size: 12, weight: 700 }, measure)).toEqual({ word: 'out', stretch: 100 });
  expect(fitWord(['mechanic in', 'mech.\nin'], { width: 22, size: 12, weight: 700 }, measure)).toEqual({ word: 'mech.\nin', stretch: 62.5 });
  expect(fitWord(['out'], { width: 5, size: 12, weight: 700 }, measure)).toBeNull();
});
