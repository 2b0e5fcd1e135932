import type { Call, CallsState } from '../calls/state.ts';
import type { FloorState, LaneState } from '../floor/state.ts';
import type { Session } from '../leagues/session.ts';
import type { RunsState } from '../runs/state.ts';
import type { ReadinessSettings } from './settings.ts';

/** What the centre's records say of a lane. */
export interface LaneFacts {
  lane: number;
  family: 'free-fall' | 'string';
  /** Last local date (`yyyy-mm-dd`) on which its certificate is valid; null: none. */
  certifiedUntil: string | null;
}

/** A pattern that the centre has written down; conditioner a lane in µL of its revisions. */
export interface KnownPattern {
  code: string;
  name: string;
  revisions: readonly { revision: number; aUl: number; bUl: number }[];
}

/** Everything that readiness is computed from, at one moment. */
export interface Surroundings {
  now: number;
  floor: FloorState;
  calls: CallsState;
  runs: RunsState;
  lanes: readonly LaneFacts[];
  /** Sessions of this business day that aren't cancelled. */
  sessions: readonly Session[];
  patterns: readonly KnownPattern[];
  settings: ReadinessSettings;
}

/** Somebody who has the lane between now and a warm-up. */
export interface Occupant {
  name: string | null;
  kind: string;
  session: string | null;
  /** On the lane now, or booked for later. */
  present: boolean;
  from: number;
  /** Last ball and lane cleared, likely and at the latest; null: nobody knows. */
  endAt: number | null;
  freeAt: number | null;
  latestFreeAt: number | null;
  /** Frames still expected on this lane; null: nobody knows. */
  framesLeft: number | null;
}

/** A run that will dress a lane, with its forecast. */
export interface RunOnLane {
  lane: number;
  key: string;
  run: string;
  machine: string;
  status: 'planned' | 'under-way';
  pattern: string | null;
  revision: number | null;
  startAt: number;
  doneAt: number;
  /** The machine is on this lane now. */
  onLane: boolean;
  /** Lanes that it dresses up to and including this one, from now. */
  place: number;
  lastAt: number;
}

/** One lane seen by one session: what a check is given. */
export interface LaneSituation {
  now: number;
  session: Session;
  lane: LaneState;
  facts: LaneFacts | null;
  /** Pinsetter families of all lanes of the session. */
  families: readonly LaneFacts['family'][];
  /** Open calls of this lane, its pair, or the house. */
  calls: readonly Call[];
  /** When somebody was last in the machine or at it, open and closed calls of this lane; null: not this day. */
  repairedAt: number | null;
  occupants: readonly Occupant[];
  run: RunOnLane | null;
  /** Time a lane of the machine that would do it, ms. */
  paceMs: number;
  levels: RunsState['levels'];
  patterns: readonly KnownPattern[];
  settings: ReadinessSettings;
}

/** Last moment at which dressing this lane must begin, with the margin. */
export const latestDressing = (at: Pick<LaneSituation, 'session' | 'settings' | 'paceMs'>): number =>
  at.session.warmUpAt - at.settings.dressMarginMs - at.paceMs;
