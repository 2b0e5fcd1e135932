import { demandAmount, demandCount, demandOpenUnit } from './demand.ts';
import { chisquareQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';

/** Exact limits of a Poisson mean. */
export type Limits = { low: number; high: number };

/** Events per thousand frames with its exact interval; count, frames and level are those it was made from. */
export type RatePerThousand = Limits & { rate: number; count: number; frames: number; level: number };

/**
 * Exact (central) confidence limits for the mean of a Poisson count at a level such as 0.95.
 * low = ½·χ²(α/2; 2k), high = ½·χ²(1−α/2; 2k+2); low is 0 for a count of 0.
 * Source: F. Garwood, "Fiducial limits for the Poisson distribution", Biometrika 28 (1936) 437–442.
 * @throws RangeError for a count that isn't whole or is negative, or a level outside (0, 1).
 */
export function poissonLimits(count: number, level = 0.95): Limits {
  demandCount('count', count);
  demandOpenUnit('level', level);
  const tail = (1 - level) / 2;
  return {
    low: count === 0 ? 0 : chisquareQuantile(tail, 2 * count) / 2,
    high: chisquareQuantile(1 - tail, 2 * count + 2) / 2,
  };
}

/**
 * Events (stops, calls) per thousand frames with exact limits. Frames may be a fraction (an estimate).
 * No frames: no rate, whatever the count.
 * @throws RangeError for a negative or fractional count, negative frames, or a level outside (0, 1).
 */
export function perThousand(count: number, frames: number, level = 0.95): RatePerThousand | Missing<'no-frames'> {
  demandAmount('frames', frames);
  const { low, high } = poissonLimits(count, level);
  if (frames === 0) return missing('no-frames');
  const scale = 1000 / frames;
  return { rate: count * scale, low: low * scale, high: high * scale, count, frames, level };
}

/** Mean frames between events; `high` is null without an event: then only a lower limit is known, and `frames` as well. */
export type FramesPerStop = { value: number | null; low: number; high: number | null };

/**
 * Frames per stop: the reciprocal of the rate, with the reciprocal limits. Without a stop there is no mean,
 * but still a lower limit ("more than …").
 */
export function framesPerStop(count: number, frames: number, level = 0.95): FramesPerStop | Missing<'no-frames'> {
  const rate = perThousand(count, frames, level);
  if (!('rate' in rate)) return rate;
  return {
    value: count === 0 ? null : frames / count,
    low: 1000 / rate.high,
    high: count === 0 ? null : 1000 / rate.low,
  };
}

/** A count with its frames, and how both were got ("scored", "estimated", "gateway-heard" …). */
export type CountedFrames = { count: number; frames: number; basis?: string };

/**
 * One rate over several lanes or nights: counts and frames are added first (never an average of rates).
 * Parts of a different basis are not pooled silently: the answer is then missing, reason 'mixed-basis'.
 */
export function pooled(parts: readonly CountedFrames[], level = 0.95): RatePerThousand | Missing<'no-frames' | 'mixed-basis'> {
  let count = 0;
  let frames = 0;
  for (const part of parts) {
    demandCount('count', part.count);
    demandAmount('frames', part.frames);
    if (part.basis !== parts[0]?.basis) return missing('mixed-basis');
    count += part.count;
    frames += part.frames;
  }
  return perThousand(count, frames, level);
}
