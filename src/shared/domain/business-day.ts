import { Temporal } from 'temporal-polyfill';

/** One business day of a centre: 23, 24 or 25 hours from cut to cut. `date` is the local date on which it begins. */
export interface BusinessDay {
  date: string;
  from: number;
  to: number;
}

const MINUTES_A_DAY = 1440;
export const DEFAULT_CUT_MINUTES = 4 * 60;

/** The day found last, by zone and cut: thousands of facts of one night fall into the same. */
const lately = new Map<string, Readonly<BusinessDay>>();

/** Business day in which an instant (epoch ms) falls; `cut` is minutes after local midnight. */
export function businessDayAt(instant: number, zone: string, cut: number = DEFAULT_CUT_MINUTES): Readonly<BusinessDay> {
  const key = `${zone} ${cut}`;
  const last = lately.get(key);
  if (last && instant >= last.from && instant < last.to) return last;
  const day = Object.freeze(dayOf(instant, zone, cut));
  lately.set(key, day);
  return day;
}

function dayOf(instant: number, zone: string, cut: number): BusinessDay {
  const local = Temporal.Instant.fromEpochMilliseconds(instant).toZonedDateTimeISO(zone);
  const sameDay = businessDay(local.toPlainDate().toString(), zone, cut);
  return instant >= sameDay.from ? sameDay : businessDay(local.toPlainDate().subtract({ days: 1 }).toString(), zone, cut);
}

/** The business day that begins on a local date (`yyyy-mm-dd`). Throws RangeError for a date that isn't one. */
export function businessDay(date: string, zone: string, cut: number = DEFAULT_CUT_MINUTES): BusinessDay {
  const day = Temporal.PlainDate.from(date, { overflow: 'reject' });
  return { date: day.toString(), from: cutOf(day, zone, cut), to: cutOf(day.add({ days: 1 }), zone, cut) };
}

function cutOf(day: Temporal.PlainDate, zone: string, cut: number): number {
  const time = Temporal.PlainTime.from({ hour: Math.floor(cut / 60), minute: cut % 60 });
  return day.toZonedDateTime({ timeZone: zone, plainTime: time }).epochMilliseconds;
}

export const addDays = (date: string, days: number): string => Temporal.PlainDate.from(date).add({ days }).toString();

/** 1 = Monday … 7 = Sunday (ISO 8601). */
export const weekdayOf = (date: string): number => Temporal.PlainDate.from(date).dayOfWeek;

export function isDate(text: string): boolean {
  try {
    return Temporal.PlainDate.from(text, { overflow: 'reject' }).toString() === text;
  } catch {
    return false;
  }
}

export type WallTime = { ok: true; instant: number; repeated: boolean } | { ok: false; code: 'time.missing-hour' | 'time.invalid' };

/**
 * Instant of a wall time (`yyyy-mm-dd`, minutes after midnight) in a zone. A time inside the hour that the clocks skip
 * has no instant and is refused; in the hour that comes twice the earlier one is taken and `repeated` says so.
 */
export function instantOfWall(date: string, minutes: number, zone: string): WallTime {
  if (!isDate(date) || !Number.isInteger(minutes) || minutes < 0 || minutes >= MINUTES_A_DAY) return { ok: false, code: 'time.invalid' };
  const wall = Temporal.PlainDate.from(date).toPlainDateTime({ hour: Math.floor(minutes / 60), minute: minutes % 60 });
  const earlier = wall.toZonedDateTime(zone, { disambiguation: 'earlier' });
  const later = wall.toZonedDateTime(zone, { disambiguation: 'later' });
  if (earlier.epochMilliseconds === later.epochMilliseconds) return { ok: true, instant: earlier.epochMilliseconds, repeated: false };
  if (!earlier.toPlainDateTime().equals(wall)) return { ok: false, code: 'time.missing-hour' };
  return { ok: true, instant: earlier.epochMilliseconds, repeated: true };
}

/** Instant of a wall time of a business day: times before its cut belong to its small hours, on the next date. */
export function instantOfNight(day: BusinessDay, minutes: number, zone: string): WallTime {
  const first = instantOfWall(day.date, minutes, zone);
  return first.ok && first.instant < day.from ? instantOfWall(addDays(day.date, 1), minutes, zone) : first;
}

/** Local date and minutes after midnight of an instant. */
export function wallOf(instant: number, zone: string): { date: string; minutes: number } {
  const local = Temporal.Instant.fromEpochMilliseconds(instant).toZonedDateTimeISO(zone);
  return { date: local.toPlainDate().toString(), minutes: local.hour * 60 + local.minute };
}

export function isZone(zone: string): boolean {
  try {
    Temporal.Instant.fromEpochMilliseconds(0).toZonedDateTimeISO(zone);
    return true;
  } catch {
    return false;
  }
}
