import { demandAmount, demandCount, demandSameLength } from './demand.ts';
import { chisquareTail } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import { percentile } from './percentiles.ts';

export type Dispersion = {
  /** Pearson's Σ(x − E)²/E against one pooled rate. */
  chisquare: number;
  df: number;
  /** Small: the counts differ by more than Poisson chance. */
  p: number;
  /** χ² ÷ df, at least 1: the factor by which variances exceed Poisson's. */
  factor: number;
  /** Square root of `factor`: what distances of limits from the centre are multiplied by. */
  widen: number;
};

/**
 * Over-dispersion of counts with their own exposures: Pearson test, and the factor for widened limits.
 * With `winsorise` (a share such as 0.1) the standardised values beyond that share at either end are pulled in before
 * the factor is taken, so that one bad lane doesn't widen the limits that should show it (the test itself isn't touched).
 * Sources: R. A. Fisher's index of dispersion; D. J. Spiegelhalter, Statistics in Medicine 24 (2005) 1185–1202, section 5.
 */
export function dispersion(counts: readonly number[], exposures: readonly number[], winsorise = 0): Dispersion | Missing<'too-few' | 'no-events'> {
  demandSameLength('counts and exposures', counts, exposures);
  if (!(winsorise >= 0 && winsorise < 0.5)) throw new RangeError(`winsorise must lie within 0 and 0.5, got ${winsorise}`);
  let [events, exposure, units] = [0, 0, 0];
  counts.forEach((count, i) => {
    demandCount('count', count);
    demandAmount('exposure', exposures[i] as number);
    if (exposures[i] === 0) return;
    events += count;
    exposure += exposures[i] as number;
    units += 1;
  });
  if (units < 2) return missing('too-few');
  if (events === 0) return missing('no-events');
  const scores: number[] = [];
  counts.forEach((count, i) => {
    const expected = (events * (exposures[i] as number)) / exposure;
    if (expected > 0) scores.push((count - expected) / Math.sqrt(expected));
  });
  const squares = (values: number[]): number => values.reduce((sum, z) => sum + z * z, 0);
  const chisquare = squares(scores);
  const df = units - 1;
  const factor = Math.max(1, (winsorise === 0 ? chisquare : squares(pullIn(scores, winsorise))) / df);
  return { chisquare, df, p: chisquareTail(chisquare, df), factor, widen: Math.sqrt(factor) };
}

function pullIn(scores: number[], share: number): number[] {
  const low = percentile(scores, share).value as number;
  const high = percentile(scores, 1 - share).value as number;
  return scores.map((z) => Math.min(high, Math.max(low, z)));
}
