import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitGammaPoisson, shrunkRanking, type GammaPoisson } from './gamma-poisson.ts';

const counts = [5, 1, 5, 14, 3, 19, 1, 1, 4, 22];
const exposures = [94, 16, 63, 126, 5, 31, 1, 1, 2, 10];
const model = fitGammaPoisson(counts, exposures) as GammaPoisson;

describe('fitGammaPoisson', () => {
  it('scales with the unit of exposure and does not care for the order', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 1000, noNaN: true }), (factor) => {
        const other = fitGammaPoisson([...counts].reverse(), exposures.map((one) => one * factor).reverse()) as GammaPoisson;
        expect(Math.abs(other.shape / model.shape - 1)).toBeLessThan(1e-9);
        expect(Math.abs((other.mean * factor) / model.mean - 1)).toBeLessThan(1e-9);
      }),
      { numRuns: 30 },
    );
  });

  it('says so when lanes differ no more than chance', () => {
    expect(fitGammaPoisson([10, 10, 11], [1, 1, 1])).toEqual({ value: null, reason: 'no-spread' });
    expect(fitGammaPoisson([0, 0], [1, 1])).toEqual({ value: null, reason: 'no-events' });
    expect(fitGammaPoisson([4], [1])).toEqual({ value: null, reason: 'too-few' });
    expect(() => fitGammaPoisson([4, 1], [1, 0])).toThrow(RangeError);
  });
});

describe('shrunkRanking', () => {
  it('draws each rate towards the house, the less the more it was seen', () => {
    const ranking = shrunkRanking(counts, exposures, model);
    for (const { index, rate, low, high } of ranking) {
      const raw = counts[index]! / exposures[index]!;
      expect(Math.abs(rate - model.mean)).toBeLessThanOrEqual(Math.abs(raw - model.mean));
      expect(low).toBeLessThan(rate);
      expect(high).toBeGreaterThan(rate);
    }
    const rates = ranking.map((one) => one.rate);
    expect(rates).toEqual([...rates].sort((a, b) => b - a));
    const seen = new Map(shrunkRanking([2, 200], [1, 100], model).map((one) => [one.index, one.rate]));
    expect(Math.abs(seen.get(1)! - 2)).toBeLessThan(Math.abs(seen.get(0)! - 2));
  });

  it('widens with confidence', () => {
    const at = (level: number): number => shrunkRanking([3], [2], model, level)[0]!.high;
    expect(at(0.99)).toBeGreaterThan(at(0.9));
  });
});
