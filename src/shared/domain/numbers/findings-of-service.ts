import { isMissing, type Missing } from './missing.ts';
import type { ReplacementAge } from './replacement-age.ts';
import type { RatePerThousand } from './rates.ts';
import type { WeibullFit } from './weibull.ts';

export type RateFinding =
  | { code: 'rate.no-frames' }
  | { code: 'rate.mixed' }
  | { code: 'rate.none'; atMost: number; frames: number }
  | { code: 'rate.value'; rate: number; low: number; high: number; level: number };

/** A rate with its uncertainty; without a stop only what it is at most. */
export function rateFinding(result: RatePerThousand | Missing<'no-frames' | 'mixed-basis'>): RateFinding {
  if (!('rate' in result)) return { code: result.reason === 'no-frames' ? 'rate.no-frames' : 'rate.mixed' };
  if (result.count === 0) return { code: 'rate.none', atMost: result.high, frames: result.frames };
  return { code: 'rate.value', rate: result.rate, low: result.low, high: result.high, level: result.level };
}

/** Fewer failures than this don't support advice on an age. */
export const FAILURES_FOR_ADVICE = 10;

export type PartFinding =
  | { code: 'part.too-few'; failures: number }
  /** The lower limit of the shape doesn't exceed 1: wear isn't shown, replacing early may gain nothing. */
  | { code: 'part.no-wear-shown' }
  | { code: 'part.run-to-failure' }
  /** Replace at `age` (unit of the lives); `saving` is the share of cost saved against running to failure. */
  | { code: 'part.replace-at'; age: number; saving: number };

/** Savings below this share aren't worth a rule. */
export const SAVING_WORTH_A_RULE = 0.02;

/** What the fitted life and the costs advise. */
export function partFinding(fit: WeibullFit | Missing, age: ReplacementAge | Missing): PartFinding {
  if (isMissing(fit)) return { code: 'part.too-few', failures: 0 };
  if (fit.failures < FAILURES_FOR_ADVICE) return { code: 'part.too-few', failures: fit.failures };
  if (fit.shapeLimits.low <= 1) return { code: 'part.no-wear-shown' };
  if (isMissing(age)) return { code: 'part.run-to-failure' };
  const saving = 1 - age.costRate / age.costRateRunToFailure;
  return saving < SAVING_WORTH_A_RULE ? { code: 'part.run-to-failure' } : { code: 'part.replace-at', age: age.age, saving };
}

export type WaitFinding =
  | { code: 'wait.overloaded'; mechanics: number }
  | { code: 'wait.met' | 'wait.missed'; share: number; wanted: number; minutes: number; mechanics: number };

/** Whether a share of calls answered within some minutes meets what was wanted; meeting it exactly is meeting it. */
export function waitFinding(
  answered: { value: number } | Missing<'overloaded'>,
  aim: { wanted: number; minutes: number; mechanics: number },
): WaitFinding {
  if (answered.value === null) return { code: 'wait.overloaded', mechanics: aim.mechanics };
  return { code: answered.value >= aim.wanted ? 'wait.met' : 'wait.missed', share: answered.value, ...aim };
}
