import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { digamma } from '#shared/domain/numbers/digamma.ts';
import { betaQuantile, binomialPmf, chisquareCdf, chisquareQuantile, gammaCdf, gammaQuantile, normalCdf, normalQuantile, poissonCdf, poissonPmf } from '#shared/domain/numbers/distributions.ts';
import { percentile } from '#shared/domain/numbers/percentiles.ts';
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

  it('quantiles of definition 7', () => {
    const { values, at } = secondOpinion.quantiles;
    at.forEach(([p, value]) => near(percentile(values, p as number).value, value as number, 1e-12));
  });

  it('the normal quantiles usual for funnels', () => {
    expect(normalQuantile(0.975)).toBeCloseTo(1.959964, 6);
    expect(normalQuantile(0.999)).toBeCloseTo(3.090232, 6);
  });
});
