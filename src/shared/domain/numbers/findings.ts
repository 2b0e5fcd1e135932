import { probabilityOfOutside } from './chance.ts';
import type { Dispersion } from './dispersion.ts';
import type { Funnel } from './funnel.ts';
import type { EwmaPoint } from './ewma.ts';
import { isMissing, type Missing } from './missing.ts';
import type { RateComparison } from './two-rates.ts';

/** A p below this is called a finding; one equal to it isn't. */
export const SIGNIFICANCE = 0.05;
/** The stricter bar for saying that lanes differ as a whole, and for trends, as many are looked at. */
export const STRICT = 0.01;

export type LaneFinding =
  | { code: 'lanes.no-frames' }
  | { code: 'lanes.no-stops' }
  /** Lanes above the outer limits; `byChance` of `of` would be, were all alike. */
  | { code: 'lanes.watch'; lanes: number[]; byChance: number; of: number }
  /** So many stand out that the house is uneven as a whole: no single lane is the story. */
  | { code: 'lanes.uneven'; lanes: number[]; of: number }
  /** Some between the limits, as many as chance brings. */
  | { code: 'lanes.high-by-chance'; lanes: number[]; byChance: number; of: number }
  /** Some between the limits, more than chance brings, but none is far out. */
  | { code: 'lanes.several-high'; lanes: number[]; byChance: number; of: number }
  | { code: 'lanes.alike'; of: number };

/**
 * What the funnel says about lanes that stop more than the house. Never names a lane inside the band.
 * Uneven: more than one in eight beyond the outer limits, and the spread itself beyond chance.
 */
export function laneFinding(result: Funnel | Missing<'no-frames' | 'no-events'>, spread: Dispersion | Missing): LaneFinding {
  if (!('lanes' in result)) return { code: result.reason === 'no-frames' ? 'lanes.no-frames' : 'lanes.no-stops' };
  const of = result.lanes.length;
  const far = result.lanes.filter((one) => one.position === 'above-outer').map((one) => one.lane);
  const high = result.lanes.filter((one) => one.position === 'above-inner').map((one) => one.lane);
  const uneven = !isMissing(spread) && spread.p < STRICT && far.length * 8 > of;
  if (uneven) return { code: 'lanes.uneven', lanes: far, of };
  if (far.length > 0) return { code: 'lanes.watch', lanes: far, byChance: result.byChance.outer.above, of };
  if (high.length === 0) return { code: 'lanes.alike', of };
  const byChance = result.byChance.inner.above;
  const likely = probabilityOfOutside(of, byChance / of, high.length) >= SIGNIFICANCE;
  return { code: likely ? 'lanes.high-by-chance' : 'lanes.several-high', lanes: high, byChance, of };
}

export type ChangeFinding =
  | { code: 'change.no-frames' }
  | { code: 'change.no-stops' }
  /** Fewer or more stops than before; shares of the rate before, 0.6 = 40 % fewer. `high` null: no upper limit known. */
  | { code: 'change.fewer' | 'change.more'; ratio: number | null; low: number; high: number | null }
  /** Could be chance. `still`: frames until the change asked about would probably show; null if no number would do. */
  | { code: 'change.not-shown'; low: number; high: number | null; still: number | null };

/** What a comparison after (first) against before (second) says, at a two-sided p below SIGNIFICANCE. */
export function changeFinding(comparison: RateComparison | Missing<'no-frames' | 'no-events'>, still: number | null): ChangeFinding {
  if (!('twoSided' in comparison)) return { code: comparison.reason === 'no-frames' ? 'change.no-frames' : 'change.no-stops' };
  const { ratio, low, high, twoSided, lower, higher } = comparison;
  if (twoSided >= SIGNIFICANCE) return { code: 'change.not-shown', low, high, still };
  return { code: lower < higher ? 'change.fewer' : 'change.more', ratio, low, high };
}

export type TrendFinding = { code: 'trend.too-few' } | { code: 'trend.improving' | 'trend.worsening' | 'trend.steady'; p: number };

/** What a trend test says. Both p are one-sided; the smaller, doubled, must be below STRICT. */
export function trendFinding(test: { improving: number; worsening: number } | Missing): TrendFinding {
  if (isMissing(test)) return { code: 'trend.too-few' };
  const p = Math.min(1, 2 * Math.min(test.improving, test.worsening));
  if (p >= STRICT) return { code: 'trend.steady', p };
  return { code: test.improving < test.worsening ? 'trend.improving' : 'trend.worsening', p };
}

export type DriftFinding =
  | { code: 'drift.no-data' }
  | { code: 'drift.none' }
  /** The smoothed rate lies outside now, and has for `periods` in a row. */
  | { code: 'drift.up' | 'drift.down'; periods: number };

/** What the exponentially weighted chart says about now; an excursion that is over isn't a finding. */
export function driftFinding(points: readonly EwmaPoint[]): DriftFinding {
  const side = points[points.length - 1]?.outside;
  if (side === undefined) return { code: 'drift.no-data' };
  if (side === null) return { code: 'drift.none' };
  const inside = points.findLastIndex((point) => point.outside !== side);
  return { code: side === 'above' ? 'drift.up' : 'drift.down', periods: points.length - 1 - inside };
}
