import type { Fact } from '../journal/fact.ts';
import type { FloorState, LaneState } from './state.ts';

/** Replaces one lane by `change` of it and notes the fact as its newest; an unknown lane changes nothing. */
export function changeLane(floor: FloorState, lane: number, fact: Fact, change: (lane: LaneState) => Partial<LaneState>): FloorState {
  const before = floor[lane - 1];
  if (!before) return floor;
  const source = fact.by?.kind === 'gateway' ? fact.by.id : before.source;
  const after: LaneState = { ...before, ...change(before), lastAt: Math.max(before.lastAt, fact.time), source };
  return floor.with(lane - 1, after);
}
