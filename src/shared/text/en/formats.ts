/**
 * Times as people say them and numbers with their unit. Instants are epoch ms, zones IANA names. `Intl` formatters are
 * kept per zone: making one costs more than using it a thousand times.
 */
const formatters = new Map<string, Intl.DateTimeFormat>();
function formatter(zone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${zone}|${JSON.stringify(options)}`;
  const known = formatters.get(key) ?? new Intl.DateTimeFormat('en-GB', { timeZone: zone, ...options });
  formatters.set(key, known);
  return known;
}

/** `19:42` */
export const timeOfDay = (at: number, zone: string): string => formatter(zone, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(at);
/** `19:41:07` */
/** `19:05` of minutes after midnight; 1440, the end of the day, is 00:00. */
export const wallTime = (minutes: number): string => `${String(Math.floor((minutes % 1440) / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
export const timeWithSeconds = (at: number, zone: string): string =>
  formatter(zone, { hour: '2-digit', minute: '2-digit', second: '2-digit', hourCycle: 'h23' }).format(at);
/** `Thu 14 May` of an instant. */
export const dayOf = (at: number, zone: string): string => said(formatter(zone, { weekday: 'short', day: 'numeric', month: 'short' }).format(at));
/** `Thu 14 May, 19:42` */
export const dayAndTime = (at: number, zone: string): string => `${dayOf(at, zone)}, ${timeOfDay(at, zone)}`;
/** `Thu 14 May` of a local date, `yyyy-mm-dd`. */
export const dayOfDate = (date: string): string => dayOf(Date.parse(`${date}T12:00:00Z`), 'UTC');
/** `Thursday 14 May 2026` of a local date. */
export const longDate = (date: string): string =>
  said(formatter('UTC', { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric' }).format(Date.parse(`${date}T12:00:00Z`)));
const said = (text: string): string => text.replace(/,/g, '').replace('Sept', 'Sep');

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

/** A running clock: `3:12` under ten minutes, then `47 m`, then `2 h 05`. */
export function elapsed(ms: number): string {
  const whole = Math.max(0, Math.floor(ms / 1000));
  if (whole < 600) return `${Math.floor(whole / 60)}:${String(whole % 60).padStart(2, '0')}`;
  const minutes = Math.floor(whole / 60);
  if (minutes < 60) return `${minutes} m`;
  return `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')}`;
}

/** Since when, as people say it: a running clock in the first hour, then the time of day it began. */
export const sinceText = (at: number, now: number, zone: string): string => (now - at < HOUR ? elapsed(now - at) : timeOfDay(at, zone));

/** For a screen reader: `3 min 12 s`, `47 min`, `2 h 5 min`. */
export function spokenElapsed(ms: number): string {
  const whole = Math.max(0, Math.floor(ms / 1000));
  if (whole < 60) return `${whole} s`;
  const minutes = Math.floor(whole / 60);
  if (whole < 600) return whole % 60 === 0 ? `${minutes} min` : `${minutes} min ${whole % 60} s`;
  if (minutes < 60) return `${minutes} min`;
  return minutes % 60 === 0 ? `${Math.floor(minutes / 60)} h` : `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}

/** A duration that has ended: `48 s`, `4 min`, `1 h 20 min`. */
export function duration(ms: number): string {
  if (ms < MINUTE) return `${Math.max(0, Math.round(ms / 1000))} s`;
  return spokenElapsed(Math.round(ms / MINUTE) * MINUTE);
}

const grouped = new Map<number, Intl.NumberFormat>();
/** `4 812`, with narrow spaces between thousands; `digits` after the point are fixed. */
export function number(value: number, digits = 0): string {
  const known = grouped.get(digits) ?? new Intl.NumberFormat('en-GB', { minimumFractionDigits: digits, maximumFractionDigits: digits });
  grouped.set(digits, known);
  return known.format(value).replace(/,/g, '\u202f').replace('-', '−');
}

export const percent = (value: number, digits = 0): string => `${number(value, digits)}%`;
export const feet = (value: number): string => `${Number.isInteger(value) ? value : number(value, 1)} ft`;
/** Microlitres as millilitres: `24.65 mL`. */
export const millilitres = (ul: number, digits = 2): string => `${number(ul / 1000, digits)} mL`;
/** `1 lane`, `3 lanes`. */
export const plural = (count: number, one: string, many = `${one}s`): string => `${number(count)} ${count === 1 ? one : many}`;

/** Lanes as people say them: `7`, `7–8`, `1–12, 15`. Joins what is adjacent. */
export function laneRanges(lanes: readonly number[]): string {
  const sorted = [...new Set(lanes)].sort((a, b) => a - b);
  const ranges: [number, number][] = [];
  for (const lane of sorted) {
    const last = ranges.at(-1);
    if (last && last[1] === lane - 1) last[1] = lane;
    else ranges.push([lane, lane]);
  }
  return ranges.map(([from, to]) => (from === to ? String(from) : `${from}–${to}`)).join(', ');
}

/** `lane 7`, `lanes 7–8`. */
export const lanesText = (lanes: readonly number[]): string => `${new Set(lanes).size === 1 ? 'lane' : 'lanes'} ${laneRanges(lanes)}`;
/** `9, 10 and 12` */
export const listed = (items: readonly string[]): string => (items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`);
/** A rate with its interval: `1.87 (0.86–3.55)`. */
export const withInterval = (value: number, low: number, high: number, digits = 2): string =>
  `${number(value, digits)} (${number(low, digits)}–${number(high, digits)})`;
