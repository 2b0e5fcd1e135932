import { framesDone, framesOnLane, type PairFormat } from './frames.ts';

const MINUTE = 60_000;

/** Time a frame of one bowler on one lane, ms: 120 frames (two teams of four, three games) in two and a half hours. Common practice. */
export const DEFAULT_FRAME_MS = 75_000;
/** Ten to fifteen minutes to clear the lanes after the last ball (common practice). */
export const DEFAULT_CLEAR_MS = 12 * MINUTE;

/** Booked length of a session from its start, ms, rounded up to five minutes: frames on a lane at the usual pace, without clearing. */
export function bookedLength(format: PairFormat, frameMs: number = DEFAULT_FRAME_MS): number {
  const step = 5 * MINUTE;
  return Math.ceil((framesOnLane(format) * frameMs) / step) * step;
}

export interface Playing {
  startAt: number;
  /** As booked. */
  endAt: number;
  format: PairFormat | null;
  /** Game and frame on its slowest lane, and when heard; null where no scoring tells. */
  progress: { game: number; frame: number; at: number } | null;
}

/**
 * Forecast of the last ball: frames left at this session's own pace once three frames are done, before that as booked.
 * Without progress the booked end, or now when that has passed.
 */
export function forecastEnd(playing: Playing, now: number): { at: number; basis: 'frames' | 'booked' } {
  const { format, progress } = playing;
  const booked = Math.max(playing.endAt, now);
  if (!format || !progress || now <= playing.startAt) return { at: booked, basis: 'booked' };
  const done = framesDone(format, progress.game, progress.frame);
  const rounds = (progress.game - 1) * 10 + progress.frame - 1;
  if (rounds < 3 || done <= 0) return { at: booked, basis: 'booked' };
  const pace = (progress.at - playing.startAt) / done;
  const left = framesOnLane(format) - done;
  return { at: Math.max(now, progress.at + left * Math.max(pace, 0)), basis: 'frames' };
}

/** When the lanes can be had by somebody else. */
export const clearedAt = (endAt: number, clearMs: number = DEFAULT_CLEAR_MS): number => endAt + clearMs;
