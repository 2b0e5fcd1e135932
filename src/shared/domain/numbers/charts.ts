import { demandAmount, demandCount, demandPositive, demandSameLength } from './demand.ts';
import { missing, type Missing } from './missing.ts';

/** One point of a chart. Beyond a limit is strict: a point on the limit is inside. */
export type ChartPoint = { value: number; low: number; high: number; z: number; outside: 'above' | 'below' | null };
/** A chart in the order of its input; a period without exposure has no point (null) and keeps its place. */
export type Chart = { centre: number; points: (ChartPoint | null)[] };

function point(value: number, centre: number, sigma: number, sigmas: number): ChartPoint {
  const low = Math.max(0, centre - sigmas * sigma);
  const high = centre + sigmas * sigma;
  return { value, low, high, z: (value - centre) / sigma, outside: value > high ? 'above' : value < low ? 'below' : null };
}

/**
 * u-chart: events per unit with varying size, limits ū ± sigmas·√(ū/n), never below 0.
 * Source: D. C. Montgomery, Introduction to Statistical Quality Control, chapter on attributes; NIST e-Handbook 6.3.3.1.
 * @param sizes exposure of each period (thousand frames, inspection units); 0 gives no point.
 * @param centre a standard to chart against; left out, the pooled rate of the data.
 */
export function uChart(
  counts: readonly number[],
  sizes: readonly number[],
  options: { centre?: number; sigmas?: number } = {},
): Chart | Missing<'no-exposure' | 'no-events'> {
  demandSameLength('counts and sizes', counts, sizes);
  counts.forEach((count) => demandCount('count', count));
  sizes.forEach((size) => demandAmount('size', size));
  const { sigmas = 3 } = options;
  const size = sizes.reduce((sum, one) => sum + one, 0);
  if (size === 0) return missing('no-exposure');
  const centre = options.centre ?? counts.reduce((sum, count, i) => sum + ((sizes[i] as number) > 0 ? count : 0), 0) / size;
  demandAmount('centre', centre);
  if (centre === 0) return missing('no-events');
  const points = counts.map((count, i) => {
    const n = sizes[i] as number;
    return n === 0 ? null : point(count / n, centre, Math.sqrt(centre / n), sigmas);
  });
  return { centre, points };
}

/** c-chart: counts over equal periods, limits c̄ ± sigmas·√c̄. Source: NIST/SEMATECH e-Handbook, section 6.3.3.1. */
export function cChart(counts: readonly number[], options: { centre?: number; sigmas?: number } = {}): Chart | Missing<'no-exposure' | 'no-events'> {
  return uChart(counts, counts.map(() => 1), options);
}

/** Mean of the moving range of two normal values, in standard deviations, and the factor for its upper limit. */
const D2 = 1.128;
const D4 = 3.267;

export type IndividualsChart = Chart & { movingRange: number; rangeHigh: number };

/**
 * Chart for single values of a mean over time (minutes to answer): limits x̄ ± sigmas·MR̄/1.128; may go below 0.
 * Source: NIST/SEMATECH e-Handbook, section 6.3.2.2.
 */
export function individualsChart(values: readonly number[], sigmas = 3): IndividualsChart | Missing<'too-few' | 'no-spread'> {
  demandPositive('sigmas', sigmas);
  if (values.length < 2) return missing('too-few');
  const centre = values.reduce((sum, value) => sum + value, 0) / values.length;
  let range = 0;
  for (let i = 1; i < values.length; i += 1) range += Math.abs((values[i] as number) - (values[i - 1] as number));
  const movingRange = range / (values.length - 1);
  if (movingRange === 0) return missing('no-spread');
  const sigma = movingRange / D2;
  const [low, high] = [centre - sigmas * sigma, centre + sigmas * sigma];
  const points = values.map((value): ChartPoint => ({
    value,
    low,
    high,
    z: (value - centre) / sigma,
    outside: value > high ? 'above' : value < low ? 'below' : null,
  }));
  return { centre, points, movingRange, rangeHigh: D4 * movingRange };
}
