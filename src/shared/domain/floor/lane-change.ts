import type { Fact } from '../journal/fact.ts';
import type { FloorState, LaneState } from './state.ts';

/** Replaces one lane by `change` of it and notes the fact as its newest; an unknown lane changes nothing. */
export function changeLane(floor: FloorState, lane: number, fact: Fact, change: (lane: LaneState) => Partial<Omit<LaneState, 'lastAt' | 'source'>>): FloorState {
  const before = floor[lane - 1];
  if (!before) return floor;
  const source = fact.by?.kind === 'gateway' ? fact.by.id : before.source;
  // A second spread costs V8 more than all the rest of a fold; assigning to the copy doesn't.
  const after: LaneState = Object.assign({ ...before, lastAt: Math.max(before.lastAt, fact.time), source }, change(before));
  return floor.with(lane - 1, after);
}
