import { type CheckResult, result } from '../check.ts';
import type { LaneSituation } from '../situation.ts';

/** Stops of a lane within its last so many frames. */
export const stopsWithin = (lane: LaneSituation['lane'], frames: number): number => lane.stopMarks.filter((mark) => lane.framesEver - mark <= frames).length;

/** Three stops in the last 200 frames: a machine that will stop again. Says nothing where no frames are heard. */
export function checkRepeatedStops(at: LaneSituation): CheckResult {
  const { stops, frames } = at.settings.repeatedStops;
  const found = at.lane.hears.frames ? stopsWithin(at.lane, frames) : 0;
  if (found < stops) return result('repeated-stops', 'ok', 'stops.few');
  return result('repeated-stops', 'at-risk', 'stops.repeated', { params: { stops: found, frames }, waitsFor: { kind: 'mechanic', name: null } });
}
