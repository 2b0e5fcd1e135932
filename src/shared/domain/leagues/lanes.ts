import { pairOf } from '../equipment.ts';

export type LaneRangeFault = 'league.lanes-reversed' | 'league.lanes-whole-pairs' | 'league.lanes-outside-house';

/**
 * Lanes from–to that a league may have: in rising order, inside the house, and whole pairs, because a team
 * changes lanes of its pair every frame. Null when they are.
 */
export function pairRangeFault(from: number, to: number, houseLanes: number): LaneRangeFault | null {
  if (from > to) return 'league.lanes-reversed';
  if (from < 1 || to > houseLanes) return 'league.lanes-outside-house';
  return from % 2 === 1 && to % 2 === 0 ? null : 'league.lanes-whole-pairs';
}

/** Lanes that a booking may have: one alone is enough, for parties and open play. */
export function laneRangeFault(from: number, to: number, houseLanes: number): LaneRangeFault | null {
  if (from > to) return 'league.lanes-reversed';
  return from < 1 || to > houseLanes ? 'league.lanes-outside-house' : null;
}

export const lanesBetween = (from: number, to: number): number[] => Array.from({ length: Math.max(0, to - from + 1) }, (_, i) => from + i);

/** Odd lanes that name the pairs, in order, each once. */
export const pairsOf = (lanes: readonly number[]): number[] => [...new Set(lanes.map(pairOf))].sort((a, b) => a - b);

/** Runs of neighbouring lanes: [1,2,3,4,9,10] is 1–4 and 9–10. */
export function laneRuns(lanes: readonly number[]): { from: number; to: number }[] {
  const runs: { from: number; to: number }[] = [];
  for (const lane of [...new Set(lanes)].sort((a, b) => a - b)) {
    const last = runs.at(-1);
    if (last && lane === last.to + 1) last.to = lane;
    else runs.push({ from: lane, to: lane });
  }
  return runs;
}
