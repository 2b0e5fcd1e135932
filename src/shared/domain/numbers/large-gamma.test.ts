import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gammaCdf, gammaQuantile, poissonCdf, poissonPmf } from './distributions.ts';
import { largeGamma, largeGammaQuantile, LIBRARY_HOLDS_UP_TO } from './large-gamma.ts';

describe('largeGamma', () => {
  it('goes over from the library without a step', () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 5, noNaN: true }), (z) => {
        const a = LIBRARY_HOLDS_UP_TO + z * Math.sqrt(LIBRARY_HOLDS_UP_TO);
        const x = LIBRARY_HOLDS_UP_TO - 1e-9;
        expect(Math.abs(gammaCdf(x, a, 1) / largeGamma(a, x).lower - 1)).toBeLessThan(1e-10);
      }),
    );
  });

  it('rises with x, and both tails make one', () => {
    fc.assert(
      fc.property(fc.double({ min: 500, max: 60_000, noNaN: true }), fc.double({ min: -6, max: 6, noNaN: true }), (a, z) => {
        const x = a + z * Math.sqrt(a);
        const { lower, upper } = largeGamma(a, x);
        expect(lower + upper).toBeCloseTo(1, 14);
        expect(largeGamma(a, x * 1.001).lower).toBeGreaterThanOrEqual(lower);
      }),
    );
  });

  it('is the sum of Poisson probabilities', () => {
    for (const [k, mean] of [[1005, 1010.5], [1100, 1050], [2900, 3000]] as const) {
      let sum = 0;
      for (let i = 0; i <= k; i += 1) sum += poissonPmf(i, mean);
      expect(Math.abs(poissonCdf(k, mean) / sum - 1)).toBeLessThan(1e-10);
    }
  });
});

it('largeGammaQuantile goes over from the library without a step', () => {
  for (const p of [1e-6, 0.001, 0.025, 0.5, 0.975, 0.999]) {
    expect(Math.abs(largeGammaQuantile(p, 800) / gammaQuantile(p, 800, 1) - 1)).toBeLessThan(1e-12);
  }
});
