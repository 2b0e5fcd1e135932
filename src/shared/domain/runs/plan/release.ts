/** The other lane of a pair: 1–2, 3–4 … */
export const pairOf = (lane: number): number => (lane % 2 === 1 ? lane + 1 : lane - 1);

/**
 * From when a lane may be dressed: both lanes of the pair free, pinsetter off, rake up, nobody in the
 * pit. `freeAt` (ms) by lane; a lane that isn't listed is free now. A centre may allow one lane beside play.
 */
export function pairRelease(lane: number, freeAt: ReadonlyMap<number, number>, now: number, besidePlay: boolean): number {
  const own = Math.max(now, freeAt.get(lane) ?? now);
  return besidePlay ? own : Math.max(own, freeAt.get(pairOf(lane)) ?? now);
}
