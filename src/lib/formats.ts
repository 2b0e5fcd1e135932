import { dayAndTime, dayOf, sinceText, timeOfDay, timeWithSeconds } from '#shared/text/en/formats.ts';
import { useCentre } from './centre.ts';

/** Times in the centre's own zone; everything that needs no zone is in shared/text/en/formats.ts. */
export function useTimes() {
  const { zone } = useCentre();
  return {
    zone,
    time: (at: number) => timeOfDay(at, zone),
    timeWithSeconds: (at: number) => timeWithSeconds(at, zone),
    day: (at: number) => dayOf(at, zone),
    dayAndTime: (at: number) => dayAndTime(at, zone),
    since: (at: number, now: number) => sinceText(at, now, zone),
  };
}
