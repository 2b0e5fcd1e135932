import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { betaQuantile, binomialCdf, binomialTail, chisquareCdf, chisquareQuantile, chisquareTail, gammaCdf, gammaQuantile, normalCdf, normalQuantile, normalTwoSided, poissonCdf, poissonPmf, poissonQuantile } from './distributions.ts';

const shares = fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true });

describe('quantiles undo their distribution functions to 1e-9', () => {
  const within = (value: number, expected: number): void => expect(Math.abs(value / expected - 1)).toBeLessThan(1e-9);

  it('normal, chi-square, gamma', () => {
    fc.assert(
      fc.property(shares, fc.integer({ min: 1, max: 5000 }), (p, df) => {
        within(normalCdf(normalQuantile(p)), p);
        within(chisquareCdf(chisquareQuantile(p, df), df), p);
        within(gammaCdf(gammaQuantile(p, df / 3, 2), df / 3, 2), p);
      }),
    );
  });

  it('beta, through the binomial', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.999, noNaN: true }), fc.integer({ min: 1, max: 400 }), fc.integer({ min: 1, max: 400 }), (p, a, b) => {
        within(binomialTail(a, a + b - 1, betaQuantile(p, a, b), betaQuantile(1 - p, b, a)), p);
      }),
    );
  });
});

describe('discrete distributions', () => {
  it('take the step that their probabilities say', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 60 }), fc.double({ min: 0.1, max: 50, noNaN: true }), (k, mean) => {
        expect(poissonCdf(k, mean) - poissonCdf(k - 1, mean)).toBeCloseTo(poissonPmf(k, mean), 12);
      }),
    );
  });

  it('have as quantile the smallest count that reaches the probability', () => {
    fc.assert(
      fc.property(shares, fc.double({ min: 0.01, max: 900, noNaN: true }), (p, mean) => {
        const r = poissonQuantile(p, mean);
        expect(poissonCdf(r, mean)).toBeGreaterThanOrEqual(p);
        expect(poissonCdf(r - 1, mean)).toBeLessThan(p);
      }),
    );
  });

  it('have tails that complement each other, also where 1 − F has no digits left', () => {
    expect(binomialTail(3, 10, 0.3) + binomialCdf(2, 10, 0.3)).toBeCloseTo(1, 14);
    expect(binomialTail(60, 60, 0.3)).toBeCloseTo(0.3 ** 60, 40);
    expect(binomialTail(0, 10, 0.3)).toBe(1);
    expect(binomialTail(11, 10, 0.3)).toBe(0);
    expect(chisquareTail(200, 2)).toBeCloseTo(Math.exp(-100), 55);
    expect(chisquareTail(3.841458820694124, 1)).toBeCloseTo(0.05, 12);
    expect(normalTwoSided(-1.959963984540054)).toBeCloseTo(0.05, 12);
  });
});
