import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bestReplacementAge, meanUseUntil, replacementCostRate, type ReplacementAge } from './replacement-age.ts';
import { weibullMean } from './weibull.ts';

describe('bestReplacementAge', () => {
  it('is cheaper than any other age and than running to failure', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1.3, max: 6, noNaN: true }),
        fc.double({ min: 1.5, max: 50, noNaN: true }),
        fc.double({ min: 0.02, max: 4, noNaN: true }),
        (shape, dear, factor) => {
          const life = { shape, scale: 1000 };
          const costs = { planned: 1, failure: dear };
          const best = bestReplacementAge(life, costs) as ReplacementAge;
          if (!('age' in best)) return;
          expect(best.costRate).toBeLessThanOrEqual(replacementCostRate(best.age * factor, life, costs) * (1 + 1e-12));
          expect(best.costRate).toBeLessThanOrEqual(best.costRateRunToFailure * (1 + 1e-12));
        },
      ),
    );
  });

  it('has no answer without wear, or when a failure costs no more', () => {
    expect(bestReplacementAge({ shape: 1, scale: 9 }, { planned: 1, failure: 5 })).toEqual({ value: null, reason: 'no-wear' });
    expect(bestReplacementAge({ shape: 3, scale: 9 }, { planned: 5, failure: 5 })).toEqual({ value: null, reason: 'failure-not-dearer' });
  });
});

describe('meanUseUntil', () => {
  it('is the age itself while nothing fails, and the mean life when nothing is replaced', () => {
    const life = { shape: 3, scale: 1000 };
    expect(meanUseUntil(1, life)).toBeCloseTo(1, 8);
    expect(meanUseUntil(1e6, life)).toBeCloseTo(weibullMean(life), 8);
  });
});
