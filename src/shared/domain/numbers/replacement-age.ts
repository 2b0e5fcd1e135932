import { demandPositive } from './demand.ts';
import { gammaCdf } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import { findRoot } from './root.ts';
import { weibullMean, weibullSurvival, type Weibull } from './weibull.ts';

/** Cost of a planned replacement and of a failure in play (part, labour, lost league minutes), one currency, minor units. */
export type ReplacementCosts = { planned: number; failure: number };

export type ReplacementAge = {
  /** Replace at this age, in the unit of the lives. */
  age: number;
  /** Cost per unit of use when replaced at that age. */
  costRate: number;
  /** Cost per unit of use when each part runs to failure. */
  costRateRunToFailure: number;
};

/** Mean use of a part that is replaced at failure or at the given age, whichever comes first: ∫₀ᵃ survival. */
export function meanUseUntil(age: number, life: Weibull): number {
  return weibullMean(life) * gammaCdf((age / life.scale) ** life.shape, 1 / life.shape, 1);
}

/** Long-run cost per unit of use under replacement at an age: (planned·S + failure·F) ÷ mean use. */
export function replacementCostRate(age: number, life: Weibull, costs: ReplacementCosts): number {
  const survival = weibullSurvival(age, life);
  return (costs.planned * survival + costs.failure * (1 - survival)) / meanUseUntil(age, life);
}

/**
 * Best age for replacement: where hazard(a)·∫₀ᵃ S − F(a) = planned ÷ (failure − planned).
 * Missing: 'no-wear' (shape 1 or below: a new part is no better than an old one that works),
 * 'failure-not-dearer' (nothing is gained by replacing before a failure).
 * Source: R. E. Barlow and L. C. Hunter, Operations Research 8 (1960) 90–100; Barlow and Proschan,
 * Mathematical Theory of Reliability (1965), chapter 4.
 */
export function bestReplacementAge(life: Weibull, costs: ReplacementCosts): ReplacementAge | Missing<'no-wear' | 'failure-not-dearer'> {
  demandPositive('shape', life.shape);
  demandPositive('scale', life.scale);
  demandPositive('planned', costs.planned);
  demandPositive('failure', costs.failure);
  if (costs.failure <= costs.planned) return missing('failure-not-dearer');
  if (life.shape <= 1) return missing('no-wear');
  const goal = costs.planned / (costs.failure - costs.planned);
  const unit: Weibull = { shape: life.shape, scale: 1 };
  const gap = (age: number): number =>
    unit.shape * age ** (unit.shape - 1) * meanUseUntil(age, unit) - (1 - weibullSurvival(age, unit)) - goal;
  let high = 1;
  while (gap(high) < 0) {
    high *= 2;
    // Beyond this age every part has failed: the gain of replacing earlier is nil.
    if (weibullSurvival(high, unit) === 0) return missing('no-wear');
  }
  let low = high / 2;
  while (gap(low) > 0) low /= 2;
  const age = findRoot(gap, low, high) * life.scale;
  return { age, costRate: replacementCostRate(age, life, costs), costRateRunToFailure: costs.failure / weibullMean(life) };
}
