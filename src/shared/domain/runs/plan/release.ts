import { neighbourOf } from '../../equipment.ts';

/**
 * From when a lane may be dressed: both lanes of the pair free, pinsetter off, rake up, nobody in the
 * pit. `freeAt` (ms) by lane, null: nobody knows; a lane that isn't listed is free now. A centre may allow one lane beside play.
 */
export function pairRelease(lane: number, freeAt: ReadonlyMap<number, number | null>, now: number, besidePlay: boolean): number | null {
  const ends = [lane, ...(besidePlay ? [] : [neighbourOf(lane)])].map((one) => freeAt.get(one));
  return ends.includes(null) ? null : Math.max(now, ...ends.map((end) => end ?? now));
}
