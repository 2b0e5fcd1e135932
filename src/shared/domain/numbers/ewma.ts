import { demandAmount, demandCount, demandPositive, demandSameLength } from './demand.ts';

/** One point; `z` is the smoothed value. Beyond a limit is strict. */
export type EwmaPoint = { z: number; low: number; high: number; outside: 'above' | 'below' | null };

/** `weight` of the newest value, 0…1; `width` of the limits in standard deviations of the smoothed value. */
export type EwmaOptions = { weight?: number; width?: number };

/**
 * Exponentially weighted chart of values against a known centre and standard deviation: finds slow drift that single
 * points don't show. z starts at the centre; limits widen from the first point to their steady width.
 * Source: S. W. Roberts, Technometrics 1 (1959) 239–250; NIST/SEMATECH e-Handbook, section 6.3.2.4.
 */
export function ewmaChart(values: readonly number[], centre: number, sigma: number, options: EwmaOptions = {}): EwmaPoint[] {
  demandPositive('sigma', sigma);
  return smooth(values, values.map(() => sigma * sigma), centre, options);
}

/**
 * The same for counts over varying exposure against a known rate (events per unit of exposure): the variance of each
 * period is rate ÷ exposure, so a week with few frames moves the limits out. A period without exposure changes nothing
 * and carries its predecessor's point. Lower limits end at 0.
 * Source: C. M. Borror, C. W. Champ and S. E. Rigdon, Journal of Quality Technology 30 (1998) 352–361, varying exposure ours.
 */
export function ewmaRateChart(counts: readonly number[], exposures: readonly number[], rate: number, options: EwmaOptions = {}): EwmaPoint[] {
  demandSameLength('counts and exposures', counts, exposures);
  demandPositive('rate', rate);
  counts.forEach((count) => demandCount('count', count));
  exposures.forEach((exposure) => demandAmount('exposure', exposure));
  const values = counts.map((count, i) => (exposures[i] === 0 ? null : count / (exposures[i] as number)));
  const variances = exposures.map((exposure) => (exposure === 0 ? 0 : rate / exposure));
  const points = smooth(values, variances, rate, options);
  for (const point of points) point.low = Math.max(0, point.low);
  return points;
}

function smooth(values: readonly (number | null)[], variances: readonly number[], centre: number, options: EwmaOptions): EwmaPoint[] {
  const { weight = 0.2, width = 3 } = options;
  if (!(weight > 0 && weight <= 1)) throw new RangeError(`weight must lie within 0 and 1, got ${weight}`);
  demandPositive('width', width);
  let z = centre;
  let variance = 0;
  const [fresh, kept] = [weight * weight, (1 - weight) * (1 - weight)];
  return values.map((value, i) => {
    if (value !== null) {
      z = weight * value + (1 - weight) * z;
      variance = fresh * (variances[i] as number) + kept * variance;
    }
    const half = width * Math.sqrt(variance);
    return { z, low: centre - half, high: centre + half, outside: z > centre + half ? 'above' : z < centre - half ? 'below' : null };
  });
}
