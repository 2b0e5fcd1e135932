import { describe, expect, it } from 'vitest';
import { dayOf, dayOfDate, duration, elapsed, feet, laneRanges, lanesText, listed, millilitres, number, plural, sinceText, spokenElapsed, timeOfDay } from './formats.ts';

describe('times as people say them', () => {
  it.each([
    [0, '0:00'], [9_999, '0:09'], [192_000, '3:12'], [599_999, '9:59'], [600_000, '10 m'], [47 * 60_000, '47 m'], [3_599_999, '59 m'],
    [3_600_000, '1 h 00'], [7_500_000, '2 h 05'], [-5, '0:00'],
  ])('elapsed %i ms is %s', (ms, text) => expect(elapsed(ms)).toBe(text));

  it.each([[12_000, '12 s'], [60_000, '1 min'], [192_000, '3 min 12 s'], [601_000, '10 min'], [7_500_000, '2 h 5 min'], [7_200_000, '2 h']])(
    'spoken %i ms is %s', (ms, text) => expect(spokenElapsed(ms)).toBe(text),
  );

  it('an ended duration is rounded to its unit', () => {
    expect([duration(48_400), duration(89_000), duration(90_000), duration(3_570_000), duration(4_800_000)]).toEqual(['48 s', '1 min', '2 min', '1 h', '1 h 20 min']);
  });

  it('turns from a running clock to the time of day after an hour', () => {
    const at = Date.parse('2026-05-14T18:00:00Z');
    expect(sinceText(at, at + 47 * 60_000, 'Europe/London')).toBe('47 m');
    expect(sinceText(at, at + 61 * 60_000, 'Europe/London')).toBe('19:00');
  });

  it('says wall time of the centre, on both sides of a clock change', () => {
    expect(timeOfDay(Date.parse('2026-10-25T00:30:00Z'), 'Europe/London')).toBe('01:30');
    expect(timeOfDay(Date.parse('2026-10-25T01:30:00Z'), 'Europe/London')).toBe('01:30');
    expect(timeOfDay(Date.parse('2026-05-14T23:00:00Z'), 'Europe/London')).toBe('00:00');
    expect(dayOf(Date.parse('2026-05-14T23:00:00Z'), 'Europe/London')).toBe('Fri 15 May');
    expect(dayOfDate('2026-09-03')).toBe('Thu 3 Sep');
  });
});

describe('numbers and lanes', () => {
  it('groups thousands with a narrow space and uses a real minus', () => expect([number(4812), number(1.875, 2), number(-3)]).toEqual(['4\u202f812', '1.88', '−3']));
  it('says units', () => expect([feet(41), feet(41.5), millilitres(24_650), plural(1, 'lane'), plural(2, 'lane')]).toEqual(['41 ft', '41.5 ft', '24.65 mL', '1 lane', '2 lanes']));
  it('joins adjacent lanes, whatever their order', () => {
    expect([laneRanges([3, 1, 2, 7]), lanesText([9]), lanesText([10, 9, 9]), laneRanges([])]).toEqual(['1–3, 7', 'lane 9', 'lanes 9–10', '']);
  });
  it('lists with and', () => expect([listed([]), listed(['9']), listed(['9', '10', '12'])]).toEqual(['', '9', '9, 10 and 12']));
});
