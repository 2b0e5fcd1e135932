import type { CountKind, LaneUseKind } from '../equipment.ts';

/** People on a lane from `from` till `to` (null: still). `lastDeliveryAt` ends one that was forgotten open. */
export interface Use {
  kind: LaneUseKind;
  from: number;
  to: number | null;
  lastDeliveryAt: number | null;
  bowlers: number | null;
  label: string | null;
  until: number | null;
  games: number | null;
  by: 'gateway' | 'user' | 'job';
}

/** A time out of service that has ended. */
export interface Out {
  from: number;
  to: number;
  reason: string;
}

/** Counts of one lane, UTC quarter hour and kind; `opened` is the `from` of the use they belong to, 0 when unassigned. */
export interface QuarterCount {
  quarter: number;
  kind: CountKind;
  opened: number;
  deliveries: number;
  cycles: number;
  frames: number;
  framesEstimated: number;
  games: number;
}

export interface Dressing {
  at: number;
  machine: string;
  run: string;
  pattern: string | null;
  revision: number | null;
}

export interface LaneState {
  lane: number;
  use: Use | null;
  progress: { game: number; frame: number; at: number } | null;
  /** As last heard; `unknown` until a pinsetter event was heard. */
  power: 'on' | 'off' | 'unknown';
  stop: { since: number; reason: string | null; code: string | null; text: string | null; pins: number[] | null } | null;
  bumpers: boolean;
  outOfService: { since: number; reason: string; by: string } | null;
  dressed: Dressing | null;
  /** The machine broke off here: cleaned and redone before it is playable. */
  brokenOff: { at: number; machine: string; run: string } | null;
  deliveriesSince: number;
  /** Deliveries since dressing, by the use (its `from`) that bowled them; 0 = unassigned. */
  deliveriesSinceBy: Record<string, number>;
  /** Frames since the beginning, and their value at the last stops (newest last, at most 12). */
  framesEver: number;
  stopMarks: number[];
  /** What has ever been heard of this lane: what no gateway tells isn't drawn. */
  hears: { deliveries: boolean; frames: boolean; stops: boolean };
  /** Source of the last device event, and its time: a silent gateway's lanes are *unheard*. */
  source: string | null;
  lastAt: number;
  /** Since the last checkpoint, oldest first: ended uses, ended times out of service, counts by quarter (the last one grows). */
  uses: Use[];
  outs: Out[];
  counts: QuarterCount[];
}

/** Lane n stands at index n − 1. Replaced, never changed in place. */
export type FloorState = readonly LaneState[];

export function emptyLane(lane: number): LaneState {
  return {
    lane, use: null, progress: null, power: 'unknown', stop: null, bumpers: false, outOfService: null, dressed: null, brokenOff: null,
    deliveriesSince: 0, deliveriesSinceBy: {}, framesEver: 0, stopMarks: [], hears: { deliveries: false, frames: false, stops: false },
    source: null, lastAt: 0, uses: [], outs: [], counts: [],
  };
}

export const emptyFloor = (lanes: number): FloorState => Array.from({ length: lanes }, (_, i) => emptyLane(i + 1));
