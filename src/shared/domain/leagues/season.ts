import { addDays, instantOfWall, isDate, weekdayOf } from '../business-day.ts';

/** When a league bowls. Dates are local (`yyyy-mm-dd`), minutes count from local midnight. */
export interface SeasonRule {
  /** 1 = Monday … 7 = Sunday (ISO 8601). */
  weekday: number;
  startMinutes: number;
  firstDate: string;
  lastDate: string;
  /** Dates on which it doesn't bowl. */
  skipDates: readonly string[];
  warmUpMinutes: number;
  zone: string;
}

export interface SeasonNight {
  date: string;
  warmUpAt: number;
  startAt: number;
  /** Minutes by which a week since the night before is longer (+60, clocks back) or shorter (−60); 0 on most. */
  clockChange: number;
  /** The wall time comes twice on this date; the earlier one is meant. */
  repeated: boolean;
}

export type Season =
  | { ok: true; nights: SeasonNight[] }
  | { ok: false; code: SeasonFault; date: string };

export type SeasonFault = 'league.season-reversed' | 'league.season-too-long' | 'league.season-empty' | 'league.start-in-missing-hour' | 'league.date-invalid';

const WEEK_MS = 7 * 86_400_000;
/** A season and its summer; more is a slip of the hand. */
const WEEKS_AT_MOST = 60;

/**
 * Nights of a season: the same wall time every week, whatever the clocks do (RFC 5545 §3.8.5.3: a recurrence with a
 * zone keeps local time). A start inside the hour that the clocks skip has no instant: the whole season is refused with
 * that date, so that a person skips it or takes another time.
 */
export function seasonOf(rule: SeasonRule): Season {
  for (const date of [rule.firstDate, rule.lastDate, ...rule.skipDates]) if (!isDate(date)) return { ok: false, code: 'league.date-invalid', date };
  if (rule.lastDate < rule.firstDate) return { ok: false, code: 'league.season-reversed', date: rule.lastDate };
  const dates = datesOf(rule);
  if (dates.length > WEEKS_AT_MOST) return { ok: false, code: 'league.season-too-long', date: rule.lastDate };
  const nights: SeasonNight[] = [];
  for (const date of dates) {
    if (rule.skipDates.includes(date)) continue;
    const wall = instantOfWall(date, rule.startMinutes, rule.zone);
    if (!wall.ok) return { ok: false, code: 'league.start-in-missing-hour', date };
    nights.push({ date, startAt: wall.instant, warmUpAt: wall.instant - rule.warmUpMinutes * 60_000, clockChange: changeSince(nights.at(-1), wall.instant), repeated: wall.repeated });
  }
  return nights.length === 0 ? { ok: false, code: 'league.season-empty', date: rule.firstDate } : { ok: true, nights };
}

function datesOf(rule: SeasonRule): string[] {
  const dates: string[] = [];
  const first = addDays(rule.firstDate, (rule.weekday - weekdayOf(rule.firstDate) + 7) % 7);
  for (let date = first; date <= rule.lastDate && dates.length <= WEEKS_AT_MOST; date = addDays(date, 7)) dates.push(date);
  return dates;
}

/** What is left of the time between two nights after whole weeks: only a change of the clocks leaves something. */
function changeSince(before: SeasonNight | undefined, startAt: number): number {
  if (!before) return 0;
  const apart = startAt - before.startAt;
  return (apart - Math.round(apart / WEEK_MS) * WEEK_MS) / 60_000;
}
