import { describe, expect, it } from 'vitest';
import { FAILURES_FOR_ADVICE, partFinding, rateFinding, SAVING_WORTH_A_RULE, waitFinding } from './findings-of-service.ts';
import { missing } from './missing.ts';
import { perThousand, pooled } from './rates.ts';
import type { WeibullFit } from './weibull.ts';

describe('rateFinding', () => {
  it('gives a value, what a rate without stops is at most, or nothing', () => {
    expect(rateFinding(perThousand(4, 1000))).toMatchObject({ code: 'rate.value', rate: 4 });
    expect(rateFinding(perThousand(0, 1000))).toMatchObject({ code: 'rate.none', frames: 1000, atMost: expect.closeTo(3.689, 3) });
    expect(rateFinding(perThousand(0, 0))).toEqual({ code: 'rate.no-frames' });
    expect(rateFinding(pooled([{ count: 0, frames: 1, basis: 'a' }, { count: 0, frames: 1, basis: 'b' }]))).toEqual({ code: 'rate.mixed' });
  });
});

describe('partFinding', () => {
  const fit = (failures: number, low: number): WeibullFit => ({ failures, shapeLimits: { value: 2, low, high: 3 } }) as WeibullFit;
  const age = (costRate: number): { age: number; costRate: number; costRateRunToFailure: number } => ({ age: 500, costRate, costRateRunToFailure: 1 });

  it('advises an age from the tenth failure, when wear is shown and it saves something', () => {
    expect(partFinding(fit(FAILURES_FOR_ADVICE, 1.01), age(0.7))).toEqual({ code: 'part.replace-at', age: 500, saving: expect.closeTo(0.3, 12) });
    expect(partFinding(fit(FAILURES_FOR_ADVICE - 1, 1.01), age(0.7))).toEqual({ code: 'part.too-few', failures: 9 });
    expect(partFinding(fit(20, 1), age(0.7))).toEqual({ code: 'part.no-wear-shown' });
    expect(partFinding(fit(20, 1.5), age(1 - SAVING_WORTH_A_RULE / 2))).toEqual({ code: 'part.run-to-failure' });
    expect(partFinding(fit(20, 1.5), missing('failure-not-dearer'))).toEqual({ code: 'part.run-to-failure' });
    expect(partFinding(missing('too-few'), missing('no-wear'))).toEqual({ code: 'part.too-few', failures: 0 });
  });
});

describe('waitFinding', () => {
  const aim = { wanted: 0.9, minutes: 3, mechanics: 2 };
  it('is met at exactly what was wanted', () => {
    expect(waitFinding({ value: 0.9 }, aim)).toMatchObject({ code: 'wait.met' });
    expect(waitFinding({ value: 0.8999 }, aim)).toMatchObject({ code: 'wait.missed' });
    expect(waitFinding(missing('overloaded'), aim)).toEqual({ code: 'wait.overloaded', mechanics: 2 });
  });
});
