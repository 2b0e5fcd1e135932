import { missing, type Missing } from './missing.ts';

/**
 * Sample quantile by definition 7 of R. J. Hyndman and Y. Fan, "Sample quantiles in statistical packages",
 * The American Statistician 50 (1996) 361–365: linear between order statistics at h = (n − 1)p.
 * Unit and order of the values are the caller's; the input isn't changed.
 * @throws RangeError if p lies outside [0, 1] or a value isn't a number.
 */
export function percentile(values: readonly number[], p: number): { value: number } | Missing<'no-values'> {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`p must lie within 0 and 1, got ${p}`);
  if (values.some(Number.isNaN)) throw new RangeError('every value must be a number');
  if (values.length === 0) return missing('no-values');
  const sorted = Float64Array.from(values).sort();
  const h = (sorted.length - 1) * p;
  const below = Math.floor(h);
  const low = sorted[below] as number;
  const high = sorted[Math.min(below + 1, sorted.length - 1)] as number;
  return { value: h === below ? low : low + (h - below) * (high - low) };
}

/** The middle value; the mean of the two middle ones for an even number. */
export function median(values: readonly number[]): { value: number } | Missing<'no-values'> {
  return percentile(values, 0.5);
}
