import { describe, expect, it } from 'vitest';
import { availability, steadyStateAvailability } from '#shared/domain/numbers/availability.ts';
import { mtbf } from '#shared/domain/numbers/mtbf.ts';
import { perThousand, poissonLimits } from '#shared/domain/numbers/rates.ts';
import { near } from './near.ts';
import { garwoodRows, mtbfFactorRows } from './rate-tables.ts';

describe('exact Poisson limits', () => {
  // Garwood, Biometrika 28 (1936) 437–442. Digits: R 4.2.2 poisson.test.
  it.each(garwoodRows)('for a count of %i', (count, ...limits) => {
    const at = [0.9, 0.95, 0.99].flatMap((level) => {
      const { low, high } = poissonLimits(count, level);
      return [low.toFixed(5), high.toFixed(5)];
    });
    expect(at).toEqual(limits.map((limit) => limit.toFixed(5)));
  });

  // N. Gehrels, Astrophysical Journal 303 (1986) 336–346, table of 1σ limits, from memory; digits recomputed in R.
  it.each([
    [1, 0.17275, 3.29953],
    [2, 0.70819, 4.63786],
    [5, 2.84031, 8.38247],
    [10, 6.89131, 14.26695],
    [20, 15.56555, 25.54652],
  ])('one standard deviation either side of %i', (count, low, high) => {
    const limits = poissonLimits(count, 2 * 0.8413447460685429 - 1);
    expect(limits.low).toBeCloseTo(low, 4.9);
    expect(limits.high).toBeCloseTo(high, 4.9);
  });

  it('nickel workers: 137 seen, 24.19893 expected (data in the R manual, ISwR)', () => {
    const ratio = perThousand(137, 24.19893 * 1000) as { rate: number; low: number; high: number };
    expect(ratio.rate).toBeCloseTo(5.661407, 6);
    expect(ratio.low).toBeCloseTo(4.753125, 6);
    expect(ratio.high).toBeCloseTo(6.692709, 6);
  });
});

describe('MTBF limits (NIST/SEMATECH e-Handbook, section 8.4.5.1)', () => {
  it('3200 h with 7 failures, 90 %', () => {
    const result = mtbf(7, 3200, 0.9) as { value: number; low: number; high: number };
    near(result.value, 457.142857143);
    expect(result.low).toBeCloseTo(243.380917, 6);
    expect(result.high).toBeCloseTo(974.031204, 6);
  });

  it.each([
    [0.6, 1.091357],
    [0.8, 0.621335],
    [0.9, 0.434294],
    [0.95, 0.333808],
  ])('no failure, lower limit at %f', (level, factor) => {
    expect((mtbf(0, 1, level) as { low: number }).low).toBeCloseTo(factor, 6);
  });

  it.each(mtbfFactorRows)('factors for %i failures', (failures, ...factors) => {
    const at = [0.6, 0.8, 0.9, 0.95].flatMap((level) => {
      const { low, high } = mtbf(failures, failures, level) as { low: number; high: number };
      return [low.toFixed(4), high.toFixed(4)];
    });
    expect(at).toEqual(factors.map((factor) => factor.toFixed(4)));
  });
});

describe('availability', () => {
  it('mean time between failures 100 h, to restore 10 h: 90.91 % (worked example at bemas.org)', () => {
    near((steadyStateAvailability(100, 10) as { value: number }).value, 0.9090909090909091);
  });

  it('720 h required, three stops of which part was waiting (recomputed by hand)', () => {
    const result = availability(720, [
      { down: 2, waiting: 1 },
      { down: 0.5, waiting: 0.2 },
      { down: 1.5, waiting: 0.8 },
    ]);
    if (!('mtbf' in result)) throw new Error('expected figures');
    expect(result.up).toBe(716);
    near(result.mtbf, 238.66666666666666);
    near(result.mdt, 4 / 3);
    near(result.activeRepair, 2 / 3);
    near(result.operational, 0.99444444444444);
    near(result.inherent, 0.9972144846796658);
  });
});
