import { describe, expect, it } from 'vitest';
import { compareRates, type RateComparison } from '#shared/domain/numbers/two-rates.ts';
import { stratifiedRatio, type Stratum } from '#shared/domain/numbers/strata.ts';
import { near } from './near.ts';
import { secondOpinion } from './second-opinion.ts';

describe('two rates', () => {
  it('11 of 800 against 21 of 3011 (data in the R manual, poisson.test)', () => {
    const result = compareRates({ count: 11, frames: 800 }, { count: 21, frames: 3011 }) as RateComparison;
    expect(result.ratio).toBeCloseTo(1.971488, 6);
    expect(result.low).toBeCloseTo(0.858427, 5.9);
    expect(result.high).toBeCloseTo(4.277266, 6);
    expect(result.twoSided).toBeCloseTo(0.07966863, 8);
    expect(result.higher).toBeCloseTo(0.05600866, 8);
  });

  it.each(secondOpinion.twoRates)(`agree with ${secondOpinion.versions}: %d of %d against %d of %d`, (a, b, c, d, ...expected) => {
    const result = compareRates({ count: a as number, frames: b as number }, { count: c as number, frames: d as number }) as RateComparison;
    const got = [result.ratio, result.low, result.high, result.twoSided, result.lower, result.higher];
    got.forEach((value, i) => {
      if (expected[i] === null) expect(value).toBeNull();
      else near(value, expected[i] as number);
    });
  });
});

describe('several strata', () => {
  // Deaths and person-years of British doctors by age, smokers against non-smokers: R. Doll and A. B. Hill (1966), worked
  // in K. J. Rothman, Modern Epidemiology; combined ratio and limits from memory, homogeneity p about 0.02 to 0.03.
  const doctors: Stratum[] = [
    [32, 52_407, 2, 18_790],
    [104, 43_248, 12, 10_673],
    [206, 28_612, 28, 5_710],
    [186, 12_663, 28, 2_585],
    [102, 5_317, 31, 1_462],
  ].map(([a, b, c, d]) => ({ first: { count: a as number, frames: b as number }, second: { count: c as number, frames: d as number } }));

  it('give the published common ratio and limits, and don’t agree', () => {
    const result = stratifiedRatio(doctors);
    if (!('ratio' in result)) throw new Error(result.reason);
    expect(result.ratio).toBeCloseTo(1.424682, 6);
    expect(result.low).toBeCloseTo(1.154703, 6);
    expect(result.high).toBeCloseTo(1.757784, 6);
    expect(result.homogeneity?.df).toBe(4);
    expect(result.homogeneity?.p).toBeGreaterThan(0.02);
    expect(result.homogeneity?.p).toBeLessThan(0.035);
  });
});
