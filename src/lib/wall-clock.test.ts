import { expect, it } from 'vitest';
import { wallTime } from '#shared/text/en/formats.ts';
import { minutesOf } from './wall-clock.ts';

it('minutes and clock say the same', () => {
  for (const minutes of [0, 1, 59, 60, 240, 1439]) expect(minutesOf(wallTime(minutes))).toBe(minutes);
  expect(wallTime(1440)).toBe('00:00');
});
it('what is no time is none', () => expect(['', '24:00', '12:60', '1:0', 'noon'].map(minutesOf)).toEqual([null, null, null, null, null]));
it('a leading zero may be left out', () => expect(minutesOf(' 9:30 ')).toBe(570));
