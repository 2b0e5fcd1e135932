import betaQuantileOf from '@stdlib/stats-base-dists-beta-quantile';
import binomialCdfOf from '@stdlib/stats-base-dists-binomial-cdf';
import binomialPmfOf from '@stdlib/stats-base-dists-binomial-pmf';
import chisquareCdfOf from '@stdlib/stats-base-dists-chisquare-cdf';
import chisquareQuantileOf from '@stdlib/stats-base-dists-chisquare-quantile';
import gammaCdfOf from '@stdlib/stats-base-dists-gamma-cdf';
import gammaQuantileOf from '@stdlib/stats-base-dists-gamma-quantile';
import normalCdfOf from '@stdlib/stats-base-dists-normal-cdf';
import normalQuantileOf from '@stdlib/stats-base-dists-normal-quantile';
import poissonCdfOf from '@stdlib/stats-base-dists-poisson-cdf';
import poissonPmfOf from '@stdlib/stats-base-dists-poisson-pmf';
import poissonQuantileOf from '@stdlib/stats-base-dists-poisson-quantile';
import gammalnOf from '@stdlib/math-base-special-gammaln';

/** ln Γ(x). */
export const logGamma = (x: number): number => gammalnOf(x);

export const normalCdf = (z: number): number => normalCdfOf(z, 0, 1);
export const normalQuantile = (p: number): number => normalQuantileOf(p, 0, 1);

/** Two-sided p-value of a standard normal statistic. */
export const normalTwoSided = (z: number): number => 2 * normalCdf(-Math.abs(z));

export const chisquareCdf = (x: number, df: number): number => chisquareCdfOf(x, df);
export const chisquareQuantile = (p: number, df: number): number => chisquareQuantileOf(p, df);

/** P(X ≤ k), X Poisson with the given mean; k may be −1 (0). */
export const poissonCdf = (k: number, mean: number): number => (k < 0 ? 0 : poissonCdfOf(k, mean));
export const poissonPmf = (k: number, mean: number): number => poissonPmfOf(k, mean);
/** Smallest k with P(X ≤ k) ≥ p. */
export const poissonQuantile = (p: number, mean: number): number => poissonQuantileOf(p, mean);

export const binomialCdf = (k: number, n: number, p: number): number => (k < 0 ? 0 : binomialCdfOf(k, n, p));
export const binomialPmf = (k: number, n: number, p: number): number => binomialPmfOf(k, n, p);

/** P(X ≤ x) for the gamma distribution with shape and *rate*. */
export const gammaCdf = (x: number, shape: number, rate: number): number => gammaCdfOf(x, shape, rate);
/** Quantile of the gamma distribution with shape and *rate* (mean = shape ÷ rate). */
export const gammaQuantile = (p: number, shape: number, rate: number): number => gammaQuantileOf(p, shape, rate);

/** Quantile of the beta distribution. */
export const betaQuantile = (p: number, a: number, b: number): number => betaQuantileOf(p, a, b);

/** P(X ≥ k), X binomial, exact far out in the tail as well. */
export const binomialTail = (k: number, n: number, p: number): number => (k > n ? 0 : binomialCdfOf(n - k, n, 1 - p));

/**
 * P(χ² > x). Even degrees of freedom go through the Poisson sum, which keeps its digits far out in the tail;
 * odd ones are accurate to about 1e-16 absolute.
 */
export const chisquareTail = (x: number, df: number): number =>
  df % 2 === 0 && x > 0 ? poissonCdf(df / 2 - 1, x / 2) : 1 - chisquareCdf(x, df);
