/** What a call can be about, who else it holds, and what counts as one thing. */

export const EQUIPMENT = [
  'pinsetter', 'ball-return', 'ball-lift', 'foul-unit', 'scoring', 'console', 'masking', 'bumpers', 'channel',
  'lane-surface', 'approach', 'power', 'motion-sensor', 'lane-machine',
] as const;
export type Equipment = (typeof EQUIPMENT)[number];

export const SAFETY_KINDS = ['wet-approach', 'ball-on-lane', 'person-in-pit', 'smoke', 'other-danger'] as const;
export type SafetyKind = (typeof SAFETY_KINDS)[number];

export const LANE_USES = ['league', 'tournament', 'open', 'party', 'warmup', 'coaching', 'maintenance', 'unknown'] as const;
export type LaneUseKind = (typeof LANE_USES)[number];
/** Kind under which counts are kept: `unassigned` are counts on a lane that nobody is known to have opened. */
export type CountKind = LaneUseKind | 'unassigned';

export type Scope = 'lane' | 'pair' | 'house';

/** A pair is 1–2, 3–4 …; it is named by its odd lane. */
export const pairOf = (lane: number): number => (lane % 2 === 1 ? lane : lane - 1);
export const neighbourOf = (lane: number): number => (lane % 2 === 1 ? lane + 1 : lane - 1);

const PAIR_EQUIPMENT: readonly Equipment[] = ['ball-return', 'ball-lift'];

/** Ball return and lift belong to the pair, power to the house; a danger stops the pair. */
export function scopeOf(equipment: Equipment, safety: SafetyKind | null): Scope {
  if (equipment === 'power') return 'house';
  return safety || PAIR_EQUIPMENT.includes(equipment) ? 'pair' : 'lane';
}

/** One open call per lane, pair or house *and* equipment: this is that key. Safety calls stand apart from machine calls. */
export function callKey(equipment: Equipment, lane: number, safety: SafetyKind | null = null): string {
  const scope = scopeOf(equipment, safety);
  const place = scope === 'house' ? 'house' : scope === 'pair' ? `pair:${pairOf(lane)}` : `lane:${lane}`;
  return `${place}/${safety ? 'safety' : equipment}`;
}

/** Lanes that a call keeps from being used, of a house of `lanes` lanes. A power dip is an event of the house: it names no lane. */
export function lanesHeld(equipment: Equipment, lane: number, safety: SafetyKind | null): number[] {
  const scope = scopeOf(equipment, safety);
  if (scope === 'house') return [];
  return scope === 'pair' ? [pairOf(lane), pairOf(lane) + 1] : [lane];
}
