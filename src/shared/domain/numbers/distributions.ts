import betaQuantileOf from '@stdlib/stats-base-dists-beta-quantile';
import binomialCdfOf from '@stdlib/stats-base-dists-binomial-cdf';
import binomialPmfOf from '@stdlib/stats-base-dists-binomial-pmf';
import chisquareCdfOf from '@stdlib/stats-base-dists-chisquare-cdf';
import chisquareQuantileOf from '@stdlib/stats-base-dists-chisquare-quantile';
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

export const chisquareCdf = (x: number, df: number): number => chisquareCdfOf(x, df);
export const chisquareQuantile = (p: number, df: number): number => chisquareQuantileOf(p, df);

/** P(X ≤ k), X Poisson with the given mean; k may be −1 (0). */
export const poissonCdf = (k: number, mean: number): number => (k < 0 ? 0 : poissonCdfOf(k, mean));
export const poissonPmf = (k: number, mean: number): number => poissonPmfOf(k, mean);
/** Smallest k with P(X ≤ k) ≥ p. */
export const poissonQuantile = (p: number, mean: number): number => poissonQuantileOf(p, mean);

export const binomialCdf = (k: number, n: number, p: number): number => (k < 0 ? 0 : binomialCdfOf(k, n, p));
export const binomialPmf = (k: number, n: number, p: number): number => binomialPmfOf(k, n, p);

/** Quantile of the gamma distribution with shape and *rate* (mean = shape ÷ rate). */
export const gammaQuantile = (p: number, shape: number, rate: number): number => gammaQuantileOf(p, shape, rate);

/** Quantile of the beta distribution. */
export const betaQuantile = (p: number, a: number, b: number): number => betaQuantileOf(p, a, b);

/** Upper tail of the χ² distribution, as a p-value. */
export const chisquareTail = (x: number, df: number): number => 1 - chisquareCdf(x, df);
