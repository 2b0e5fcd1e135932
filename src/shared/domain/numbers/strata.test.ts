import { describe, expect, it } from 'vitest';
import { stratifiedRatio, type Stratum } from './strata.ts';

const stratum = (a: number, b: number, c: number, d: number): Stratum => ({ first: { count: a, frames: b }, second: { count: c, frames: d } });

describe('stratifiedRatio', () => {
  it('is the crude ratio for one stratum, without a test of agreement', () => {
    const result = stratifiedRatio([stratum(10, 1000, 5, 2000)]) as { ratio: number; homogeneity: unknown };
    expect(result.ratio).toBeCloseTo(4, 12);
    expect(result.homogeneity).toBeNull();
  });

  it('finds the common ratio where pooling would find another', () => {
    // Twice the rate in either kind of play, but unequal shares of it: pooled it looks like 0.65.
    const strata = [stratum(20, 1000, 90, 9000), stratum(18, 9000, 1, 1000)];
    const result = stratifiedRatio(strata) as { ratio: number; homogeneity: { chisquare: number; p: number } };
    expect(result.ratio).toBeCloseTo(2, 9);
    expect(result.homogeneity.chisquare).toBeCloseTo(0, 12);
    expect(result.homogeneity.p).toBeCloseTo(1, 9);
  });

  it('leaves out strata that say nothing, and is missing when none is left or one side has no event', () => {
    const useful = stratum(10, 1000, 5, 2000);
    expect(stratifiedRatio([useful, stratum(3, 100, 0, 0), stratum(0, 10, 0, 10)])).toEqual(stratifiedRatio([useful]));
    expect(stratifiedRatio([])).toEqual({ value: null, reason: 'no-events' });
    expect(stratifiedRatio([stratum(4, 10, 0, 10)])).toEqual({ value: null, reason: 'one-sided' });
  });
});
