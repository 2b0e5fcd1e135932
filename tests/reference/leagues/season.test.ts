import { describe, expect, it } from 'vitest';
import { addDays, instantOfWall } from '#shared/domain/business-day.ts';
import { seasonOf, type SeasonRule } from '#shared/domain/leagues/season.ts';

/**
 * Sources: RFC 5545 §3.8.5.3 (recurrences; the weekly examples from memory, recomputed with two open libraries);
 * tz database 2026f by zdump, and ICU 2025c (transitions).
 */
const NINE = 9 * 60;
const newYork = { zone: 'America/New_York', startMinutes: NINE, warmUpMinutes: 0, skipDates: [] as string[] };

function dates(rule: SeasonRule): string[] {
  const season = seasonOf(rule);
  if (!season.ok) throw new Error(season.code);
  return season.nights.map((night) => night.date);
}

/** Every second week: the other ones are skipped. */
const everySecond = (first: string, weeks: number) => Array.from({ length: weeks }, (_, i) => addDays(first, 7 + 14 * i));

describe('RFC 5545 §3.8.5.3, weekly rules from 1997-09-02 09:00 America/New_York', () => {
  it('FREQ=WEEKLY;UNTIL=19971224T000000Z: 17 Tuesdays, EDT until Oct 21, EST from Oct 28', () => {
    const season = seasonOf({ ...newYork, weekday: 2, firstDate: '1997-09-02', lastDate: '1997-12-23' });
    if (!season.ok) throw new Error(season.code);
    expect(season.nights).toHaveLength(17);
    expect(season.nights[0]?.startAt).toBe(Date.UTC(1997, 8, 2, 13));
    expect(season.nights.at(-1)?.startAt).toBe(Date.UTC(1997, 11, 23, 14));
    expect(season.nights.find((night) => night.clockChange !== 0)).toMatchObject({ date: '1997-10-28', clockChange: 60, startAt: Date.UTC(1997, 9, 28, 14) });
  });

  it('FREQ=WEEKLY;UNTIL=19971007T000000Z;WKST=SU;BYDAY=TU,TH is two leagues', () => {
    const rule = { ...newYork, firstDate: '1997-09-02', lastDate: '1997-10-06' };
    const both = [...dates({ ...rule, weekday: 2 }), ...dates({ ...rule, weekday: 4 })].sort();
    expect(both).toEqual(['02', '04', '09', '11', '16', '18', '23', '25', '30'].map((d) => `1997-09-${d}`).concat('1997-10-02'));
  });

  it('FREQ=WEEKLY;INTERVAL=2;COUNT=8;WKST=SU;BYDAY=TU,TH: every second week skipped', () => {
    const rule = { ...newYork, firstDate: '1997-09-02', lastDate: '1997-10-16' };
    const both = [
      ...dates({ ...rule, weekday: 2, skipDates: everySecond('1997-09-02', 4) }),
      ...dates({ ...rule, weekday: 4, skipDates: everySecond('1997-09-04', 4) }),
    ].sort();
    expect(both).toEqual(['1997-09-02', '1997-09-04', '1997-09-16', '1997-09-18', '1997-09-30', '1997-10-02', '1997-10-14', '1997-10-16']);
  });

  it('FREQ=WEEKLY;INTERVAL=2;UNTIL=19971224T000000Z;WKST=SU;BYDAY=MO,WE,FR: 25, last Dec 22', () => {
    const rule = { ...newYork, firstDate: '1997-09-01', lastDate: '1997-12-23' };
    const all = ([['1997-09-01', 1], ['1997-09-03', 3], ['1997-09-05', 5]] as const)
      .flatMap(([first, weekday]) => dates({ ...rule, weekday, skipDates: everySecond(first, 9) })).sort();
    expect(all).toHaveLength(25);
    expect(all.slice(0, 7)).toEqual(['01', '03', '05', '15', '17', '19', '29'].map((d) => `1997-09-${d}`));
    expect(all.at(-1)).toBe('1997-12-22');
  });
});

describe('tz database: the same wall time on both sides of a transition', () => {
  it.each([
    ['America/Chicago', 4, '2026-10-29', '2026-11-05', 1110, '2026-10-29T23:30:00Z', '2026-11-06T00:30:00Z', 60],
    ['America/Chicago', 4, '2027-03-11', '2027-03-18', 1110, '2027-03-12T00:30:00Z', '2027-03-18T23:30:00Z', -60],
    ['Europe/London', 3, '2026-10-21', '2026-10-28', 1140, '2026-10-21T18:00:00Z', '2026-10-28T19:00:00Z', 60],
    ['Europe/Berlin', 3, '2027-03-24', '2027-03-31', 1140, '2027-03-24T18:00:00Z', '2027-03-31T17:00:00Z', -60],
    ['Australia/Sydney', 4, '2026-10-01', '2026-10-08', 1140, '2026-10-01T09:00:00Z', '2026-10-08T08:00:00Z', -60],
    ['Australia/Lord_Howe', 4, '2026-10-01', '2026-10-08', 1140, '2026-10-01T08:30:00Z', '2026-10-08T08:00:00Z', -30],
    ['Pacific/Auckland', 4, '2027-04-01', '2027-04-08', 1140, '2027-04-01T06:00:00Z', '2027-04-08T07:00:00Z', 60],
    ['Asia/Kolkata', 4, '2026-10-29', '2026-11-05', 1110, '2026-10-29T13:00:00Z', '2026-11-05T13:00:00Z', 0],
  ])('%s, weekday %i, %s and %s', (zone, weekday, first, second, startMinutes, before, after, change) => {
    const season = seasonOf({ zone, weekday, firstDate: first, lastDate: second, startMinutes, skipDates: [], warmUpMinutes: 10 });
    if (!season.ok) throw new Error(season.code);
    expect(season.nights.map((night) => new Date(night.startAt).toISOString().replace('.000', ''))).toEqual([before, after]);
    expect(season.nights[1]?.clockChange).toBe(change);
  });

  it('takes the earlier of a wall time that comes twice, and says so: 2026-11-01 01:30 Chicago is 06:30Z', () => {
    const season = seasonOf({ zone: 'America/Chicago', weekday: 7, firstDate: '2026-11-01', lastDate: '2026-11-01', startMinutes: 90, skipDates: [], warmUpMinutes: 10 });
    expect(season).toMatchObject({ ok: true, nights: [{ startAt: Date.UTC(2026, 10, 1, 6, 30), repeated: true }] });
  });

  it.each([['America/Chicago', '2027-03-14', 150], ['Europe/London', '2027-03-28', 90], ['Europe/Berlin', '2027-03-28', 150], ['Australia/Lord_Howe', '2026-10-04', 135]])(
    '%s %s, minute %i never comes: refused', (zone, date, startMinutes) => {
      expect(instantOfWall(date, startMinutes, zone).ok).toBe(false);
      expect(seasonOf({ zone, weekday: 7, firstDate: date, lastDate: date, startMinutes, skipDates: [], warmUpMinutes: 0 })).toEqual({ ok: false, code: 'league.start-in-missing-hour', date });
    });
});
