const FORM = /^(\d{4})-(\d{2})-(\d{2})[Tt](\d{2}):(\d{2}):(\d{2})(?:\.(\d+))?(?:([Zz])|([+-])(\d{2}):(\d{2}))$/;
const MINUTE = 60_000;

/**
 * An RFC 3339 timestamp as epoch ms, further digits cut off; null when it isn't one, names a day that isn't in the calendar, or a
 * place in time before 1970. A leap second counts as the last millisecond before it, as epoch time has no room for it.
 */
export function parseInstant(text: string): number | null {
  const parts = FORM.exec(text);
  if (!parts) return null;
  const [year, month, day, hour, minute, second] = parts.slice(1, 7).map(Number) as [number, number, number, number, number, number];
  const offsetHour = Number(parts[10] ?? 0);
  const offsetMinute = Number(parts[11] ?? 0);
  if (hour > 23 || minute > 59 || second > 60 || offsetHour > 23 || offsetMinute > 59) return null;
  const midnight = Date.UTC(year, month - 1, day);
  const date = new Date(midnight);
  if (date.getUTCFullYear() !== year || date.getUTCMonth() !== month - 1 || date.getUTCDate() !== day) return null;
  const ms = second === 60 ? 59_999 : second * 1000 + Number((parts[7] ?? '').padEnd(3, '0').slice(0, 3));
  const offset = (parts[9] === '-' ? -1 : 1) * (offsetHour * 60 + offsetMinute) * MINUTE;
  const at = midnight + (hour * 60 + minute) * MINUTE + ms - offset;
  return at >= 0 ? at : null;
}
