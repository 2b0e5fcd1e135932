import { demandAmount, demandCount, demandOpenUnit } from './demand.ts';
import { chisquareTail, normalQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import type { CountedFrames } from './rates.ts';

/** One kind of play, family of machine or season: both sides of the comparison inside it. */
export type Stratum = { first: CountedFrames; second: CountedFrames };

export type StratifiedRatio = {
  /** Common ratio first ÷ second. */
  ratio: number;
  low: number;
  high: number;
  /** p of the test that the common ratio is 1 (χ², one degree of freedom, no continuity correction). */
  p: number;
  /** Whether the strata agree on one ratio: χ², its degrees of freedom, p. Null with fewer than two strata that have events. */
  homogeneity: { chisquare: number; df: number; p: number } | null;
};

/**
 * Mantel–Haenszel ratio of rates over strata, log interval by S. Greenland and J. M. Robins, Biometrics 41 (1985) 55–68;
 * homogeneity by N. E. Breslow and N. E. Day, Statistical Methods in Cancer Research II (1987), section 3.6.
 * Strata without frames on either side, or without events, say nothing and are left out.
 */
export function stratifiedRatio(strata: readonly Stratum[], level = 0.95): StratifiedRatio | Missing<'no-events' | 'one-sided'> {
  demandOpenUnit('level', level);
  const useful = strata.filter((stratum) => informs(stratum));
  if (useful.length === 0) return missing('no-events');
  let [top, bottom, variance, excess] = [0, 0, 0, 0];
  for (const { first, second } of useful) {
    const frames = first.frames + second.frames;
    const events = first.count + second.count;
    variance += (events * first.frames * second.frames) / (frames * frames);
    top += (first.count * second.frames) / frames;
    bottom += (second.count * first.frames) / frames;
    excess += first.count - (events * first.frames) / frames;
  }
  if (top === 0 || bottom === 0) return missing('one-sided');
  const ratio = top / bottom;
  const half = normalQuantile(1 - (1 - level) / 2) * Math.sqrt(variance / (top * bottom));
  return {
    ratio,
    low: ratio * Math.exp(-half),
    high: ratio * Math.exp(half),
    p: chisquareTail((excess * excess) / variance, 1),
    homogeneity: homogeneity(useful, ratio),
  };
}

function informs({ first, second }: Stratum): boolean {
  for (const one of [first, second]) {
    demandCount('count', one.count);
    demandAmount('frames', one.frames);
  }
  return first.frames > 0 && second.frames > 0 && first.count + second.count > 0;
}

function homogeneity(strata: readonly Stratum[], ratio: number): StratifiedRatio['homogeneity'] {
  if (strata.length < 2) return null;
  let chisquare = 0;
  for (const { first, second } of strata) {
    const events = first.count + second.count;
    const share = (ratio * first.frames) / (ratio * first.frames + second.frames);
    chisquare += (first.count - events * share) ** 2 / (events * share * (1 - share));
  }
  const df = strata.length - 1;
  return { chisquare, df, p: chisquareTail(chisquare, df) };
}
