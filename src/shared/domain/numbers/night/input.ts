import type { Call } from '../../calls/state.ts';
import type { CountKind, LaneUseKind } from '../../equipment.ts';
import type { QuarterCount } from '../../floor/state.ts';
import type { Span } from '../spans.ts';

/** What is known of one lane on one business day. Instants in epoch ms. */
export interface LaneNight {
  lane: number;
  uses: readonly { kind: LaneUseKind; from: number; to: number | null; lastDeliveryAt: number | null }[];
  outs: readonly { from: number; to: number | null }[];
  counts: readonly QuarterCount[];
  /** A lane machine was on it. Volumes in µL; null: not told. */
  dressings: readonly (Span & { ul: number | null })[];
}

export interface SessionNight {
  kind: LaneUseKind | 'practice';
  lanes: readonly number[];
  warmUpAt: number;
  startAt: number;
  endAt: number;
}

export interface NightInput {
  day: Span;
  /** Nothing later than this has happened yet. */
  now: number;
  /** Opening or manned hours within the day. */
  opening: readonly Span[];
  lanes: readonly LaneNight[];
  sessions: readonly SessionNight[];
  /** Raised within the day, or standing in it. */
  calls: readonly Call[];
  /** Counter readings on lanes of leagues while the other lane of the pair stood still. */
  bowled: readonly { lane: number; at: number }[];
  /** League sessions that began warming up in the day, and how many of them were ready then. */
  ready: { ready: number; of: number };
}

/** A lane forgotten open ends this long after its last delivery (common practice; a setting later). */
export const FORGOTTEN_MS = 10 * 60_000;

/** Kind of a use: what the opening said, else the session that has the lane. */
export function kindAt(said: CountKind, lane: number, at: number, sessions: readonly SessionNight[]): CountKind {
  if (said !== 'unknown') return said;
  const session = sessions.find((s) => s.lanes.includes(lane) && s.warmUpAt <= at && at < s.endAt);
  if (!session) return 'unknown';
  return session.kind === 'practice' ? 'warmup' : session.kind;
}

/** A use as a span that ends: by its closing, ten minutes after its last delivery, or now. */
export function spanOf(use: LaneNight['uses'][number], now: number): Span {
  const to = Math.min(use.to ?? now, now);
  return { from: use.from, to: use.lastDeliveryAt === null ? to : Math.max(use.from, Math.min(to, use.lastDeliveryAt + FORGOTTEN_MS)) };
}
