import type { Equipment } from '../equipment.ts';
import type { LaneState } from '../floor/state.ts';
import { union } from '../numbers/spans.ts';
import type { Call } from './state.ts';

/** Frames over which repeated stops are judged. */
export const HISTORY_FRAMES = 200;

/** Stops of a lane in its last 200 frames; null where no frames are heard. At most twelve are kept, so twelve may mean more. */
export function stopsInLastFrames(lane: Pick<LaneState, 'framesEver' | 'stopMarks' | 'hears'> | undefined, frames: number = HISTORY_FRAMES): number | null {
  if (!lane?.hears.frames) return null;
  return lane.stopMarks.filter((mark) => lane.framesEver - mark < frames).length;
}

/** One ended call in the history of a lane. */
export interface PastCall {
  at: number;
  equipment: Equipment;
  cause: string | null;
  note: string | null;
  by: string | null;
  /** How long the equipment stood, ms; null when nobody told that it stood. */
  downMs: number | null;
}

/** An ended call as its lane's history keeps it. */
export function pastCall(call: Call): PastCall {
  const ended = call.steps.findLast((step) => step.kind === 'cleared' || step.kind === 'back-in-service');
  return {
    at: ended?.at ?? call.lastAt,
    equipment: call.equipment,
    cause: call.cleared?.cause ?? null,
    note: call.cleared?.note ?? null,
    by: call.cleared?.by.name ?? ended?.by?.name ?? null,
    downMs: downtimeOf(call),
  };
}

/** Union of a call's stops, ms; null without one. */
export function downtimeOf(call: Pick<Call, 'stops' | 'lastAt'>): number | null {
  if (call.stops.length === 0) return null;
  return union(call.stops.map((stop) => ({ from: stop.from, to: stop.to ?? call.lastAt }))).reduce((sum, span) => sum + span.to - span.from, 0);
}
