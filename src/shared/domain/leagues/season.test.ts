import { describe, expect, it } from 'vitest';
import { wallOf } from '../business-day.ts';
import { seasonOf, type SeasonRule } from './season.ts';

const rule: SeasonRule = { weekday: 4, startMinutes: 18 * 60 + 30, firstDate: '2026-10-01', lastDate: '2026-12-31', skipDates: ['2026-11-26'], warmUpMinutes: 10, zone: 'America/Chicago' };

function nights(change: Partial<SeasonRule>) {
  const season = seasonOf({ ...rule, ...change });
  if (!season.ok) throw new Error(season.code);
  return season.nights;
}

describe('season of a league', () => {
  it('bowls once a week on its weekday, skip weeks left out', () => {
    const dates = nights({}).map((night) => night.date);
    expect(dates[0]).toBe('2026-10-01');
    expect(dates).not.toContain('2026-11-26');
    expect(dates).toHaveLength(13);
  });

  it('begins on the first weekday at or after the first date', () => {
    expect(nights({ weekday: 1 })[0]?.date).toBe('2026-10-05');
    expect(nights({ weekday: 7 })[0]?.date).toBe('2026-10-04');
  });

  it('keeps the wall time over the change and says by how much the week was longer', () => {
    const changed = nights({}).filter((night) => night.clockChange !== 0);
    expect(changed.map((night) => [night.date, night.clockChange])).toEqual([['2026-11-05', 60]]);
    for (const night of nights({})) expect(wallOf(night.startAt, rule.zone)).toEqual({ date: night.date, minutes: 1110 });
  });

  it('counts a change that falls into a skipped week on the next night', () => {
    const changed = nights({ skipDates: ['2026-11-05'] }).filter((night) => night.clockChange !== 0);
    expect(changed.map((night) => [night.date, night.clockChange])).toEqual([['2026-11-12', 60]]);
  });

  it('warms up before the start', () => {
    for (const night of nights({})) expect(night.startAt - night.warmUpAt).toBe(600_000);
  });

  it('refuses a start inside the missing hour with its date, unless that week is skipped', () => {
    const sunday = { weekday: 7, startMinutes: 150, firstDate: '2027-03-01', lastDate: '2027-03-31', skipDates: [] };
    expect(seasonOf({ ...rule, ...sunday })).toEqual({ ok: false, code: 'league.start-in-missing-hour', date: '2027-03-14' });
    expect(nights({ ...sunday, skipDates: ['2027-03-14'] }).map((night) => night.date)).toEqual(['2027-03-07', '2027-03-21', '2027-03-28']);
  });

  it.each([
    [{ lastDate: '2026-09-30' }, 'league.season-reversed'],
    [{ lastDate: '2028-12-31' }, 'league.season-too-long'],
    [{ lastDate: '2026-10-01', skipDates: ['2026-10-01'] }, 'league.season-empty'],
    [{ firstDate: '2026-02-30' }, 'league.date-invalid'],
  ] as const)('refuses %o as %s', (change, code) => {
    expect(seasonOf({ ...rule, ...change })).toMatchObject({ ok: false, code });
  });
});
