import { HOUR_MS } from './ageing.ts';

/** What is expected on a lane between two instants (ms). */
export interface ExpectedPlay {
  start: number;
  end: number;
  /** Frames expected over the whole span. */
  frames: number;
}

/** Deliveries a frame: a complete game has 11 to 21 deliveries in 10 frames; players lie between. */
export interface DeliveriesPerFrame {
  low: number;
  likely: number;
  high: number;
}

/** From memory of common practice; a centre's own counts replace it. */
export const DEFAULT_DELIVERIES_PER_FRAME: DeliveriesPerFrame = { low: 1.4, likely: 1.7, high: 2 };

export interface Range {
  low: number;
  likely: number;
  high: number;
}

/** Frames of a booking that fall between two instants, played evenly over its span. */
export function framesBetween(play: readonly ExpectedPlay[], from: number, to: number): number {
  return play.reduce((sum, { start, end, frames }) => {
    const shared = Math.min(end, to) - Math.max(start, from);
    return shared > 0 && end > start ? sum + (frames * shared) / (end - start) : sum;
  }, 0);
}

/**
 * Deliveries on a lane at a later instant: those counted so far, plus the booked play until then, plus
 * open play at its mean a hour where nothing is booked (`openPerHour`, deliveries). A forecast, never a count.
 */
export function forecastDeliveries(
  counted: number,
  play: readonly ExpectedPlay[],
  span: { now: number; at: number },
  options: { openPerHour?: number; perFrame?: DeliveriesPerFrame } = {},
): Range {
  const perFrame = options.perFrame ?? DEFAULT_DELIVERIES_PER_FRAME;
  const frames = framesBetween(play, span.now, span.at);
  const open = ((options.openPerHour ?? 0) * freeMs(play, span)) / HOUR_MS;
  const total = (rate: number, share: number): number => Math.round(counted + frames * rate + open * share);
  return { low: total(perFrame.low, 0), likely: total(perFrame.likely, 1), high: total(perFrame.high, 2) };
}

/** Milliseconds of the span in which nothing is booked. */
function freeMs(play: readonly ExpectedPlay[], span: { now: number; at: number }): number {
  let free = 0;
  let until = span.now;
  for (const { start, end } of [...play].sort((a, b) => a.start - b.start)) {
    free += Math.max(0, Math.min(start, span.at) - until);
    until = Math.max(until, end);
  }
  return free + Math.max(0, span.at - until);
}

/** How a session on a lane goes so far. */
export interface SessionPace {
  now: number;
  framesDone: number;
  framesLeft: number;
  /** Milliseconds of play behind the frames done; 0 before the first frame. */
  playedMs: number;
}

export interface PaceSettings {
  /** Frames a minute on one lane expected before anything is seen. */
  usualPace: number;
  /** How many frames of experience the usual pace is worth against what is seen. */
  usualWeight: number;
  /** Minutes to clear the lanes after the last frame: likely least and most. */
  clearMinutes: { low: number; high: number };
}

/** Ten to fifteen minutes to clear is common; 1.2 frames a minute on a lane is from memory of league play. */
export const DEFAULT_PACE: PaceSettings = { usualPace: 1.2, usualWeight: 20, clearMinutes: { low: 10, high: 15 } };

/** z of the 90th percentile: four of five evenings should end inside the range. */
const Z90 = 1.2816;

/**
 * When the lane is free, cleared, as instants (ms): frames left ÷ pace. The pace is what was seen,
 * drawn towards the usual pace by its weight (a gamma prior); the range treats frames as a Poisson
 * stream, of the pace seen so far and of the frames still to come. `low` is the earliest.
 */
export function forecastEnd(session: SessionPace, settings: PaceSettings = DEFAULT_PACE): Range {
  const { now, framesDone, framesLeft, playedMs } = session;
  const weightMinutes = settings.usualWeight / settings.usualPace;
  const pace = (framesDone + settings.usualWeight) / (playedMs / 60_000 + weightMinutes);
  const minutes = framesLeft / pace;
  const spread = framesLeft <= 0 ? 0 : minutes * Math.sqrt(1 / framesLeft + 1 / (framesDone + settings.usualWeight));
  const { low, high } = settings.clearMinutes;
  const at = (played: number, clear: number): number => now + Math.round((Math.max(0, played) + clear) * 60_000);
  return { low: at(minutes - Z90 * spread, low), likely: at(minutes, (low + high) / 2), high: at(minutes + Z90 * spread, high) };
}
