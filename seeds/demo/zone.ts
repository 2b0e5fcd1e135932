import { wallOf } from '#shared/domain/business-day.ts';

/** Minutes after midnight that the demo's clock shows at the first start: leagues are about to begin. */
const EVENING = 18 * 60 + 45;

/** A zone in which it is about a quarter to seven in the evening now, the nearest first in the alphabet. */
export function eveningZone(now: number, zones: readonly string[] = Intl.supportedValuesOf('timeZone')): string {
  const away = (zone: string): number => {
    const minutes = Math.abs(wallOf(now, zone).minutes - EVENING);
    return Math.min(minutes, 1440 - minutes);
  };
  const places = zones.filter((zone) => /^(Africa|America|Asia|Atlantic|Australia|Europe|Pacific)\//.test(zone));
  return places.reduce((best, zone) => (away(zone) < away(best) ? zone : best), places[0] ?? 'UTC');
}
