import { DEFAULT_PACE, forecastEnd, type PaceSettings } from '../runs/forecast.ts';
import { framesDone, framesOnLane, framesOnOneLane, type PairFormat } from './frames.ts';

const MINUTE = 60_000;

/** Frames a minute when two teams share the one lane that is left: nobody waits for the neighbour lane (common practice, from memory). */
const ONE_LANE_PACE = 1.3;

/**
 * Frames a minute on one lane of a league: two teams of four bowl three games, 120 frames a lane, in two and a half
 * hours (common practice). The session's own pace takes over as it is seen.
 */
export const LEAGUE_PACE: PaceSettings = { ...DEFAULT_PACE, usualPace: 0.8 };

/** Time to clear the lanes after the last ball, ms: likely, and at most. */
export const clearTimeOf = (pace: PaceSettings): { likely: number; high: number } => ({
  likely: ((pace.clearMinutes.low + pace.clearMinutes.high) / 2) * MINUTE,
  high: pace.clearMinutes.high * MINUTE,
});
const clearMs = (pace: PaceSettings): number => clearTimeOf(pace).likely;

/** Booked length of a session from its start to its last ball, ms, rounded up to five minutes: frames on a lane at the usual pace. */
export function bookedLength(format: PairFormat, pace: PaceSettings = LEAGUE_PACE): number {
  const step = 5 * MINUTE;
  return Math.ceil(((framesOnLane(format) / pace.usualPace) * MINUTE) / step) * step;
}

export interface Playing {
  startAt: number;
  /** As booked. */
  endAt: number;
  format: PairFormat | null;
  /** Game and frame on its slowest lane, and when heard; null where no scoring tells. */
  progress: { game: number; frame: number; at: number } | null;
}

export interface EndForecast {
  /** Last ball. */
  endAt: number;
  /** Lanes cleared: likely, and at the latest in nine evenings of ten. */
  freeAt: number;
  latestFreeAt: number;
  basis: 'frames' | 'booked';
}

/**
 * End of a session that is bowling: frames left at its pace, with ten to fifteen minutes to clear. Without progress the
 * booked end, or now when that has passed.
 */
export function forecastSession(playing: Playing, now: number, pace: PaceSettings = LEAGUE_PACE): EndForecast {
  const { format, progress } = playing;
  if (!format || !progress || now <= playing.startAt) return asBooked(playing, now, pace);
  const done = framesDone(format, progress.game, progress.frame);
  const left = framesOnLane(format) - done;
  const at = Math.max(progress.at, playing.startAt);
  const range = forecastEnd({ now: at, framesDone: done, framesLeft: left, playedMs: at - playing.startAt }, pace);
  const endAt = Math.max(now, range.likely - clearMs(pace));
  return { endAt, freeAt: endAt + clearMs(pace), latestFreeAt: Math.max(range.high, endAt + clearMs(pace)), basis: 'frames' };
}

function asBooked(playing: Playing, now: number, pace: PaceSettings): EndForecast {
  const endAt = Math.max(playing.endAt, now);
  return { endAt, freeAt: endAt + clearMs(pace), latestFreeAt: endAt + pace.clearMinutes.high * MINUTE, basis: 'booked' };
}

/** By how much later a pair ends that bowls a whole session on one lane, ms, rounded up to five minutes. */
export function oneLaneDelay(format: PairFormat, pace: PaceSettings = LEAGUE_PACE): number {
  const onTwo = framesOnLane(format) / pace.usualPace;
  const onOne = framesOnOneLane(format) / ONE_LANE_PACE;
  return Math.max(0, Math.ceil((onOne - onTwo) / 5) * 5 * MINUTE);
}
