import { demandAmount, demandCount, demandOpenUnit } from './demand.ts';
import { betaQuantile, binomialCdf, binomialPmf, binomialTail } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import type { CountedFrames } from './rates.ts';

export type RateComparison = {
  /** Rate of the first ÷ rate of the second; null when the second has no event. */
  ratio: number | null;
  low: number;
  /** Null: no upper limit, the second has no event. */
  high: number | null;
  /** p against equal rates, both directions, by the minimum-likelihood rule. */
  twoSided: number;
  /** p against "not lower": small when the first rate is lower. */
  lower: number;
  /** p against "not higher": small when the first rate is higher. */
  higher: number;
};

/**
 * Two Poisson rates compared exactly: given the sum of both counts the first is binomial with share
 * frames₁ ÷ (frames₁ + frames₂) when the rates are equal. Interval for the ratio from the Clopper–Pearson interval.
 * Source: J. Przyborowski and H. Wilenski, Biometrika 31 (1940) 313–323; E. L. Lehmann, Testing Statistical Hypotheses,
 * section 4.5. The two-sided p adds all outcomes no likelier than the one seen (as R's poisson.test does).
 * @throws RangeError for counts or frames that can't be, or a level outside (0, 1).
 */
export function compareRates(first: CountedFrames, second: CountedFrames, level = 0.95): RateComparison | Missing<'no-frames' | 'no-events'> {
  for (const one of [first, second]) {
    demandCount('count', one.count);
    demandAmount('frames', one.frames);
  }
  demandOpenUnit('level', level);
  if (first.frames === 0 || second.frames === 0) return missing('no-frames');
  const x = first.count;
  const n = x + second.count;
  if (n === 0) return missing('no-events');
  const share = first.frames / (first.frames + second.frames);
  const rest = second.frames / (first.frames + second.frames);
  const scale = second.frames / first.frames;
  const tail = (1 - level) / 2;
  const low = x === 0 ? 0 : betaQuantile(tail, x, n - x + 1);
  const high = x === n ? null : betaQuantile(1 - tail, x + 1, n - x);
  return {
    ratio: second.count === 0 ? null : (x / second.count) * scale,
    low: (low / (1 - low)) * scale,
    high: high === null ? null : (high / (1 - high)) * scale,
    twoSided: minimumLikelihood(x, n, share, rest),
    lower: binomialCdf(x, n, share),
    higher: binomialTail(x, n, share, rest),
  };
}

/** Probability of every outcome no likelier than x (with the customary slack of 1e-7 for rounding). */
function minimumLikelihood(x: number, n: number, share: number, rest: number): number {
  const mean = n * share;
  if (x === mean) return 1;
  const bar = binomialPmf(x, n, share) * (1 + 1e-7);
  if (x < mean) {
    // Above the mean the probabilities fall: the first that is small enough begins the far tail.
    const from = firstTrue(Math.ceil(mean), n + 1, (i) => binomialPmf(i, n, share) <= bar);
    return Math.min(1, binomialCdf(x, n, share) + binomialTail(from, n, share, rest));
  }
  // Below the mean they rise: everything before the first that is too likely belongs to the far tail.
  const until = firstTrue(0, Math.floor(mean) + 1, (i) => binomialPmf(i, n, share) > bar);
  return Math.min(1, binomialTail(x, n, share, rest) + binomialCdf(until - 1, n, share));
}

/** The first whole number in [from, end) for which a condition that stays true holds; `end` if none. */
function firstTrue(from: number, end: number, holds: (i: number) => boolean): number {
  let [low, high] = [from, end];
  while (low < high) {
    const middle = Math.floor((low + high) / 2);
    if (holds(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}
