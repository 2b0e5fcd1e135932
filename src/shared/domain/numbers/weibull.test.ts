import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitWeibull, scaleForShape, weibullAge, weibullMean, weibullSurvival, type WeibullFit } from './weibull.ts';

const lives = [12, 25, 31, 44, 58, 60, 71, 90, 90, 90].map((time, i) => ({ time, failed: i < 7 }));
const fit = fitWeibull(lives) as WeibullFit;

const likelihood = (shape: number, scale: number): number =>
  lives.reduce((sum, { time, failed }) => sum + (failed ? Math.log(shape / scale) + (shape - 1) * Math.log(time / scale) : 0) - (time / scale) ** shape, 0);

describe('fitWeibull', () => {
  it('sits at the top of the likelihood', () => {
    expect(fit.logLikelihood).toBeCloseTo(likelihood(fit.shape, fit.scale), 10);
    for (const [a, b] of [[1.01, 1], [0.99, 1], [1, 1.01], [1, 0.99], [1.01, 1.01], [0.99, 0.99]] as const) {
      expect(likelihood(fit.shape * a, fit.scale * b)).toBeLessThan(fit.logLikelihood);
    }
  });

  it('has the observed information behind its limits', () => {
    const h = 1e-4;
    const at = (i: number, j: number): number => likelihood(fit.shape * Math.exp(i * h), fit.scale * Math.exp(j * h));
    const shape = -(at(1, 0) - 2 * at(0, 0) + at(-1, 0)) / (h * h);
    const scale = -(at(0, 1) - 2 * at(0, 0) + at(0, -1)) / (h * h);
    const both = -(at(1, 1) - at(1, -1) - at(-1, 1) + at(-1, -1)) / (4 * h * h);
    const spread = 1.959963984540054 * Math.sqrt(scale / (shape * scale - both * both));
    expect(Math.log(fit.shapeLimits.high / fit.shape)).toBeCloseTo(spread, 4);
  });

  it('keeps its shape in another unit, and scales the rest', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 1e6, noNaN: true }), (unit) => {
        const other = fitWeibull(lives.map((life) => ({ ...life, time: life.time * unit }))) as WeibullFit;
        expect(Math.abs(other.shape / fit.shape - 1)).toBeLessThan(1e-9);
        for (const key of ['mean', 'b10'] as const) expect(Math.abs(other[key].high / unit / fit[key].high - 1)).toBeLessThan(1e-8);
      }),
      { numRuns: 20 },
    );
  });

  it('wants two different failures, and lives above 0', () => {
    expect(fitWeibull([{ time: 5, failed: true }, { time: 5, failed: true }, { time: 9, failed: false }])).toEqual({ value: null, reason: 'too-few' });
    expect(() => fitWeibull([{ time: 0, failed: true }])).toThrow(RangeError);
  });
});

describe('shape 1', () => {
  it('is the exponential: survival, mean, and total time by failures', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 1e4, noNaN: true }), fc.double({ min: 0, max: 1e4, noNaN: true }), (scale, time) => {
        expect(weibullSurvival(time, { shape: 1, scale })).toBeCloseTo(Math.exp(-time / scale), 14);
        expect(Math.abs(weibullMean({ shape: 1, scale }) / scale - 1)).toBeLessThan(1e-12);
      }),
    );
    expect(scaleForShape(lives, 1)).toBeCloseTo(lives.reduce((sum, life) => sum + life.time, 0) / 7, 10);
    expect(weibullAge(0.1, { shape: 1, scale: 10 })).toBeCloseTo(-10 * Math.log(0.9), 12);
  });
});
