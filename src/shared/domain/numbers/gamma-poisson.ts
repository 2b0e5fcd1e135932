import { demandCount, demandOpenUnit, demandPositive, demandSameLength } from './demand.ts';
import { digamma } from './digamma.ts';
import { gammaQuantile, logGamma } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import { findRoot } from './root.ts';

/** Rates of lanes spread as a gamma distribution with `shape` and `mean`; `mean` in events per unit of exposure. */
export type GammaPoisson = { shape: number; mean: number; logLikelihood: number };

/**
 * Maximum likelihood of the Gamma–Poisson (negative binomial) model: lane i has its own rate, Gamma(shape, shape ÷ mean),
 * and a Poisson count over its own exposure. Missing 'no-spread': the lanes differ no more than Poisson chance,
 * the likelihood rises towards one common rate.
 * Source: model of M. Greenwood and G. U. Yule, J. Royal Statistical Society 83 (1920) 255–279; score equations derived here.
 * @param exposures one per count, above 0 (leave lanes without frames out).
 */
export function fitGammaPoisson(counts: readonly number[], exposures: readonly number[]): GammaPoisson | Missing<'too-few' | 'no-events' | 'no-spread'> {
  demandSameLength('counts and exposures', counts, exposures);
  counts.forEach((count) => demandCount('count', count));
  exposures.forEach((exposure) => demandPositive('exposure', exposure));
  if (counts.length < 2) return missing('too-few');
  const events = counts.reduce((sum, count) => sum + count, 0);
  if (events === 0) return missing('no-events');
  const pooled = events / exposures.reduce((sum, exposure) => sum + exposure, 0);
  // Slope of the likelihood in 1/shape at 0: not positive means that no spread fits best.
  const excess = counts.reduce((sum, count, i) => sum + (count - pooled * (exposures[i] as number)) ** 2 - count, 0);
  if (excess <= 0) return missing('no-spread');
  const score = (logShape: number): number => shapeScore(counts, exposures, Math.exp(logShape), pooled);
  let low = 0;
  while (score(low) <= 0 && low > -30) low -= 2;
  let high = low + 2;
  while (score(high) > 0) {
    high += 2;
    if (high > 25) return missing('no-spread');
  }
  const shape = Math.exp(findRoot(score, low, high));
  const mean = meanForShape(counts, exposures, shape, pooled);
  return { shape, mean, logLikelihood: logLikelihood(counts, exposures, shape, mean) };
}

/** The mean that maximises the likelihood for a shape: Newton on Σ (x − mE)/(shape + mE) = 0, which falls in m. */
function meanForShape(counts: readonly number[], exposures: readonly number[], shape: number, start: number): number {
  let mean = start;
  for (let step = 0; step < 100; step += 1) {
    let [value, slope] = [0, 0];
    for (let i = 0; i < counts.length; i += 1) {
      const exposure = exposures[i] as number;
      const below = shape + mean * exposure;
      value += ((counts[i] as number) - mean * exposure) / below;
      slope -= (exposure * (shape + (counts[i] as number))) / (below * below);
    }
    const next = Math.max(mean / 4, mean - value / slope);
    const moved = Math.abs(next - mean);
    mean = next;
    if (moved <= 4 * Number.EPSILON * mean) break;
  }
  return mean;
}

/** dℓ/d(shape) at the best mean for that shape. */
function shapeScore(counts: readonly number[], exposures: readonly number[], shape: number, start: number): number {
  const mean = meanForShape(counts, exposures, shape, start);
  const own = digamma(shape);
  let sum = 0;
  for (let i = 0; i < counts.length; i += 1) {
    const expected = mean * (exposures[i] as number);
    const count = counts[i] as number;
    sum += digamma(shape + count) - own - Math.log1p(expected / shape) + (expected - count) / (shape + expected);
  }
  return sum;
}

function logLikelihood(counts: readonly number[], exposures: readonly number[], shape: number, mean: number): number {
  return counts.reduce((sum, count, i) => {
    const expected = mean * (exposures[i] as number);
    const factor = logGamma(shape + count) - logGamma(shape) - logGamma(count + 1);
    return sum + factor - shape * Math.log1p(expected / shape) + (count === 0 ? 0 : count * Math.log(expected / (shape + expected)));
  }, 0);
}

/** A lane's rate drawn towards the house's by as much as its frames are few. `index` is its place in the input. */
export type ShrunkRate = { index: number; rate: number; low: number; high: number };

/**
 * Shrunk rates, highest first: posterior mean (shape + count) ÷ (shape ÷ mean + exposure) and its central interval.
 * The fitted shape and mean are taken as known, so intervals are a little short when lanes are few.
 */
export function shrunkRanking(counts: readonly number[], exposures: readonly number[], model: GammaPoisson, level = 0.95): ShrunkRate[] {
  demandSameLength('counts and exposures', counts, exposures);
  demandOpenUnit('level', level);
  const tail = (1 - level) / 2;
  const ranking = counts.map((count, index) => {
    const shape = model.shape + count;
    const scale = model.shape / model.mean + (exposures[index] as number);
    return { index, rate: shape / scale, low: gammaQuantile(tail, shape, scale), high: gammaQuantile(1 - tail, shape, scale) };
  });
  return ranking.sort((a, b) => b.rate - a.rate || a.index - b.index);
}
