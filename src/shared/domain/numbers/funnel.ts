import { demandAmount, demandCount, demandOpenUnit, demandPositive } from './demand.ts';
import { poissonCdf, poissonPmf, poissonQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';

/**
 * Prediction limit of a Poisson count with the given mean at probability p, interpolated between whole counts:
 * r = smallest count with F(r) ≥ p, limit = r − (F(r) − p) ÷ (F(r) − F(r − 1)); never below 0.
 * Source: D. J. Spiegelhalter, "Funnel plots for comparing institutional performance",
 * Statistics in Medicine 24 (2005) 1185–1202, appendix (formula from memory).
 */
export function funnelCount(mean: number, p: number): number {
  return Math.max(0, unclippedFunnelCount(mean, p));
}

/** The same without the clip at 0, as the method prints it for small means. */
export function unclippedFunnelCount(mean: number, p: number): number {
  demandPositive('mean', mean);
  demandOpenUnit('p', p);
  const r = poissonQuantile(p, mean);
  return r - (poissonCdf(r, mean) - p) / poissonPmf(r, mean);
}

export type FunnelLimits = { low: number; high: number };
export type FunnelPosition = 'inside' | 'above-inner' | 'above-outer' | 'below-inner' | 'below-outer';

export type FunnelLane = {
  lane: number;
  count: number;
  frames: number;
  /** Count expected from this lane's own frames at the house's pooled rate. */
  expected: number;
  /** Per thousand frames. */
  rate: number;
  inner: FunnelLimits;
  outer: FunnelLimits;
  position: FunnelPosition;
};

export type Funnel = {
  /** Pooled rate per thousand frames. */
  target: number;
  /** Lanes with frames, in the order given; lanes without frames are named apart. */
  lanes: FunnelLane[];
  withoutFrames: number[];
  byChance: { inner: ByChance; outer: ByChance };
};

/**
 * Were all lanes alike: lanes expected above the limits, below them, and the probability of at least one on either side.
 * From each lane's own exact tails: interpolated limits of small counts let a little more out above than their name says.
 */
export type ByChance = { above: number; below: number; any: number };

/** Probability inside the inner and the outer limits. */
export const FUNNEL_INNER = 0.95;
export const FUNNEL_OUTER = 0.998;

/**
 * Which lanes lie outside what their own frames allow, when all had the pooled rate.
 * `widen` ≥ 1 is the square root of an over-dispersion factor: distances of the limits from the target grow by it.
 * A lane on a limit lies inside.
 */
export function funnel(lanes: readonly { lane: number; count: number; frames: number }[], widen = 1): Funnel | Missing<'no-frames' | 'no-events'> {
  if (!(widen >= 1)) throw new RangeError(`widen must be 1 or more, got ${widen}`);
  let events = 0;
  let frames = 0;
  for (const one of lanes) {
    demandCount('count', one.count);
    demandAmount('frames', one.frames);
    if (one.frames > 0) events += one.count;
    frames += one.frames;
  }
  if (frames === 0) return missing('no-frames');
  if (events === 0) return missing('no-events');
  const target = (1000 * events) / frames;
  const counted = lanes.filter((one) => one.frames > 0).map((one) => place(one, target, widen));
  return {
    target,
    lanes: counted,
    withoutFrames: lanes.filter((one) => one.frames === 0).map((one) => one.lane),
    byChance: {
      inner: byChance(counted, (one) => one.inner, FUNNEL_INNER, widen),
      outer: byChance(counted, (one) => one.outer, FUNNEL_OUTER, widen),
    },
  };
}

function byChance(lanes: readonly FunnelLane[], band: (one: FunnelLane) => FunnelLimits, inside: number, widen: number): ByChance {
  let [above, below, none] = [0, 0, 1];
  for (const one of lanes) {
    // Widened limits fit counts that aren't Poisson: there only the nominal share is known.
    const nominal = (1 - inside) / 2;
    const { low, high } = band(one);
    const up = widen > 1 ? nominal : 1 - poissonCdf(Math.floor((high * one.frames) / 1000), one.expected);
    const down = widen > 1 ? nominal : poissonCdf(Math.ceil((low * one.frames) / 1000) - 1, one.expected);
    above += up;
    below += down;
    none *= 1 - up - down;
  }
  return { above, below, any: 1 - none };
}

function place(one: { lane: number; count: number; frames: number }, target: number, widen: number): FunnelLane {
  const expected = (target * one.frames) / 1000;
  const inner = limits(expected, FUNNEL_INNER, one.frames, widen);
  const outer = limits(expected, FUNNEL_OUTER, one.frames, widen);
  const rate = (1000 * one.count) / one.frames;
  return { ...one, expected, rate, inner, outer, position: position(rate, inner, outer) };
}

function limits(expected: number, inside: number, frames: number, widen: number): FunnelLimits {
  const tail = (1 - inside) / 2;
  const at = (p: number): number => (1000 * Math.max(0, expected + widen * (unclippedFunnelCount(expected, p) - expected))) / frames;
  return { low: at(tail), high: at(1 - tail) };
}

function position(rate: number, inner: FunnelLimits, outer: FunnelLimits): FunnelPosition {
  if (rate > outer.high) return 'above-outer';
  if (rate > inner.high) return 'above-inner';
  if (rate < outer.low) return 'below-outer';
  if (rate < inner.low) return 'below-inner';
  return 'inside';
}
