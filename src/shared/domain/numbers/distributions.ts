import logGammaOf from '@stdlib/math-base-special-gammaln';
import betaQuantileOf from '@stdlib/stats-base-dists-beta-quantile';
import binomialCdfOf from '@stdlib/stats-base-dists-binomial-cdf';
import binomialPmfOf from '@stdlib/stats-base-dists-binomial-pmf';
import gammaCdfOf from '@stdlib/stats-base-dists-gamma-cdf';
import gammaQuantileOf from '@stdlib/stats-base-dists-gamma-quantile';
import normalCdfOf from '@stdlib/stats-base-dists-normal-cdf';
import normalQuantileOf from '@stdlib/stats-base-dists-normal-quantile';
import poissonCdfOf from '@stdlib/stats-base-dists-poisson-cdf';
import poissonPmfOf from '@stdlib/stats-base-dists-poisson-pmf';
import poissonQuantileOf from '@stdlib/stats-base-dists-poisson-quantile';
import { largeGamma, largeGammaQuantile, LIBRARY_HOLDS_UP_TO } from './large-gamma.ts';

/** Quantiles of a gamma variable of this shape stay below LIBRARY_HOLDS_UP_TO, five standard deviations off. */
const SHAPE_FOR_LIBRARY = 800;

/** ln Γ(x). */
export const logGamma = (x: number): number => logGammaOf(x);

export const normalCdf = (z: number): number => normalCdfOf(z, 0, 1);
export const normalQuantile = (p: number): number => normalQuantileOf(p, 0, 1);
/** Two-sided p-value of a standard normal statistic. */
export const normalTwoSided = (z: number): number => 2 * normalCdf(-Math.abs(z));

/** P(X ≤ x) for the gamma distribution with shape and *rate* (mean = shape ÷ rate). */
export const gammaCdf = (x: number, shape: number, rate: number): number =>
  x * rate > LIBRARY_HOLDS_UP_TO ? largeGamma(shape, x * rate).lower : gammaCdfOf(x, shape, rate);

/** Quantile of the gamma distribution with shape and *rate*. */
export const gammaQuantile = (p: number, shape: number, rate: number): number =>
  shape > SHAPE_FOR_LIBRARY ? largeGammaQuantile(p, shape) / rate : gammaQuantileOf(p, shape, rate);

export const chisquareCdf = (x: number, df: number): number => gammaCdf(x, df / 2, 0.5);
export const chisquareQuantile = (p: number, df: number): number => gammaQuantile(p, df / 2, 0.5);

/**
 * P(χ² > x). Even degrees of freedom go through the Poisson sum, which keeps its digits far out in the tail;
 * odd ones are accurate to about 1e-16 absolute.
 */
export const chisquareTail = (x: number, df: number): number =>
  df % 2 === 0 && x > 0 ? poissonCdf(df / 2 - 1, x / 2) : 1 - chisquareCdf(x, df);

/** P(X ≤ k), X Poisson with the given mean; k may be −1 (0). */
export function poissonCdf(k: number, mean: number): number {
  if (k < 0) return 0;
  return mean > LIBRARY_HOLDS_UP_TO ? largeGamma(Math.floor(k) + 1, mean).upper : poissonCdfOf(k, mean);
}

export const poissonPmf = (k: number, mean: number): number => poissonPmfOf(k, mean);

/** Smallest k with P(X ≤ k) ≥ p. */
export function poissonQuantile(p: number, mean: number): number {
  if (mean <= SHAPE_FOR_LIBRARY) return poissonQuantileOf(p, mean);
  const z = normalQuantile(p);
  let k = Math.floor(mean + z * Math.sqrt(mean) + (z * z - 1) / 6);
  while (poissonCdf(k, mean) < p) k += 1;
  while (poissonCdf(k - 1, mean) >= p) k -= 1;
  return k;
}

export const binomialCdf = (k: number, n: number, p: number): number => (k < 0 ? 0 : binomialCdfOf(k, n, p));
export const binomialPmf = (k: number, n: number, p: number): number => binomialPmfOf(k, n, p);
/** P(X ≥ k), X binomial, exact far out in the tail as well. Pass q = 1 − p where p is so small that 1 − p would round. */
export const binomialTail = (k: number, n: number, p: number, q = 1 - p): number => (k > n ? 0 : binomialCdfOf(n - k, n, q));

/** Quantile of the beta distribution. */
export const betaQuantile = (p: number, a: number, b: number): number => betaQuantileOf(p, a, b);
