/** Two minutes a lane, moves included, until a machine has shown its own pace (1.5 to 2.5 is common). */
export const USUAL_LANE_MS = 120_000;
/** Lanes seen before a machine's own median replaces the usual time. */
export const LANES_SEEN = 8;

/** Time a lane of one machine with one pattern: its own median, or the usual time while too few lanes are known. */
export function laneTimeMs(seen: readonly number[], usualMs: number = USUAL_LANE_MS): number {
  if (seen.length < LANES_SEEN) return usualMs;
  const sorted = [...seen].sort((a, b) => a - b);
  const half = Math.floor(sorted.length / 2);
  const [low, high] = [sorted[half - 1] ?? usualMs, sorted[half] ?? usualMs];
  return Math.round(sorted.length % 2 === 1 ? high : (low + high) / 2);
}
