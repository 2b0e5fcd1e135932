import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { digamma } from '#shared/domain/numbers/digamma.ts';
import { betaQuantile, binomialPmf, chisquareCdf, chisquareQuantile, chisquareTail, gammaCdf, gammaQuantile, normalCdf, normalQuantile, poissonCdf, poissonPmf, poissonQuantile } from '#shared/domain/numbers/distributions.ts';
import { percentile } from '#shared/domain/numbers/percentiles.ts';
import { poissonLimits } from '#shared/domain/numbers/rates.ts';
import { near } from './near.ts';
import { secondOpinion } from './second-opinion.ts';

const { jStat } = jstat;
const shares = [0.001, 0.025, 0.05, 0.2, 0.5, 0.8, 0.95, 0.975, 0.999];

describe('distribution functions against jStat', () => {
  // jStat's own inverses stop at about 1e-9 (beta), and go astray above some 500 degrees of freedom (chi-square).
  it('chi-square and gamma', () => {
    for (const df of [1, 2, 3, 7, 20, 75, 200]) {
      for (const p of shares) {
        near(chisquareQuantile(p, df), jStat.chisquare.inv(p, df));
        near(chisquareCdf(df * (0.5 + p), df), jStat.chisquare.cdf(df * (0.5 + p), df));
        near(gammaQuantile(p, df / 2, 0.25), jStat.gamma.inv(p, df / 2, 4));
        near(gammaCdf(df * (0.5 + p), df, 1), jStat.gamma.cdf(df * (0.5 + p), df, 1));
      }
    }
  });

  it('normal and beta', () => {
    expect(normalQuantile(0.5)).toBe(0);
    for (const p of shares) {
      if (p !== 0.5) near(normalQuantile(p), jStat.normal.inv(p, 0, 1));
      near(normalCdf(4 * p - 2), jStat.normal.cdf(4 * p - 2, 0, 1), 1e-8);
      for (const [a, b] of [[1, 5], [3, 4], [12, 20]] as const) near(betaQuantile(p, a, b), jStat.beta.inv(p, a, b), 1e-8);
    }
  });

  it('Poisson and binomial', () => {
    for (const mean of [0.3, 1, 5, 22.5, 80]) {
      for (let k = 0; k < 100; k += 7) {
        near(poissonPmf(k, mean), jStat.poisson.pdf(k, mean), 1e-8);
        near(poissonCdf(k, mean), jStat.poisson.cdf(k, mean), 1e-8);
        near(binomialPmf(Math.min(k, 40), 40, 0.37), jStat.binomial.pdf(Math.min(k, 40), 40, 0.37), 1e-8);
      }
    }
  });
});

describe(`against ${secondOpinion.versions}`, () => {
  it('digamma', () => secondOpinion.digamma.forEach(([x, value]) => near(digamma(x as number), value as number, 1e-12)));

  // Beyond 1000 the library alone is wrong in places; these hold what is done about it.
  it('large arguments: gamma, Poisson, their quantiles, limits of large counts', () => {
    for (const [shape, x, lower, upper] of secondOpinion.largeGamma as [number, number, number, number][]) {
      near(gammaCdf(x, shape, 1), lower);
      near(chisquareTail(2 * x, 2 * shape), upper, Number.isInteger(shape) ? 1e-9 : 1e-8);
    }
    for (const [p, shape, value] of secondOpinion.largeQuantiles as [number, number, number][]) near(gammaQuantile(p, shape, 1), value, 1e-11);
    for (const [k, mean, value] of secondOpinion.largePoisson as [number, number, number][]) near(poissonCdf(k, mean), value);
    for (const [p, mean, value] of secondOpinion.largePoissonQuantiles as [number, number, number][]) expect(poissonQuantile(p, mean)).toBe(value);
    for (const [count, low, high] of secondOpinion.largeLimits as [number, number, number][]) {
      near(poissonLimits(count).low, low);
      near(poissonLimits(count).high, high);
    }
  });

  it('quantiles of definition 7', () => {
    const { values, at } = secondOpinion.quantiles;
    at.forEach(([p, value]) => near(percentile(values, p as number).value, value as number, 1e-12));
  });

  it('the normal quantiles usual for funnels', () => {
    expect(normalQuantile(0.975)).toBeCloseTo(1.959964, 6);
    expect(normalQuantile(0.999)).toBeCloseTo(3.090232, 6);
  });
});
