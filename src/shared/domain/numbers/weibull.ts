import { demandOpenUnit, demandPositive } from './demand.ts';
import { digamma } from './digamma.ts';
import { logGamma, normalQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import { findRoot } from './root.ts';
import type { Life } from './survival-data.ts';

/** Survival exp(−(t/scale)^shape), scale in the unit of the lives. */
export type Weibull = { shape: number; scale: number };
export type Estimate = { value: number; low: number; high: number };

export type WeibullFit = Weibull & {
  logLikelihood: number;
  failures: number;
  shapeLimits: Estimate;
  scaleLimits: Estimate;
  /** Mean life scale·Γ(1 + 1/shape). */
  mean: Estimate;
  /** Age by which a tenth has failed. */
  b10: Estimate;
};

export const weibullSurvival = (time: number, { shape, scale }: Weibull): number => Math.exp(-((time / scale) ** shape));
export const weibullMean = ({ shape, scale }: Weibull): number => scale * Math.exp(logGamma(1 + 1 / shape));
/** Age by which the given share has failed. */
export const weibullAge = (failedShare: number, { shape, scale }: Weibull): number => scale * (-Math.log1p(-failedShare)) ** (1 / shape);

/** The best scale for a given shape: (Σ t^shape ÷ failures)^(1/shape). At shape 1 it is total time ÷ failures, the exponential's. */
export function scaleForShape(lives: readonly Life[], shape: number): number {
  const longest = Math.max(...lives.map((life) => life.time));
  const failures = lives.filter((life) => life.failed).length;
  const sum = lives.reduce((all, life) => all + (life.time / longest) ** shape, 0);
  return longest * (sum / failures) ** (1 / shape);
}

/**
 * Weibull distribution by maximum likelihood with right censoring. Limits are approximate, normal on the log scale
 * from the observed information; with fewer than about ten failures read them as too short.
 * Missing with fewer than two different failure times ('too-few'): the shape then has no maximum or no meaning.
 * Source: J. F. Lawless, Statistical Models and Methods for Lifetime Data (1982), section 4.1; NIST e-Handbook 8.4.1.2.
 * @throws RangeError for a life that isn't above 0.
 */
export function fitWeibull(lives: readonly Life[], level = 0.95): WeibullFit | Missing<'too-few'> {
  demandOpenUnit('level', level);
  lives.forEach((life) => demandPositive('time', life.time));
  const failed = lives.filter((life) => life.failed);
  if (new Set(failed.map((life) => life.time)).size < 2) return missing('too-few');
  const longest = Math.max(...lives.map((life) => life.time));
  const logs = lives.map((life) => Math.log(life.time / longest));
  const meanLog = lives.reduce((sum, life, i) => sum + (life.failed ? (logs[i] as number) : 0), 0) / failed.length;
  const score = (shape: number): number => {
    let [sum, weighted] = [0, 0];
    for (const log of logs) {
      const power = Math.exp(shape * log);
      sum += power;
      weighted += power * log;
    }
    return weighted / sum - 1 / shape - meanLog;
  };
  let high = 1;
  while (score(high) < 0) high *= 2;
  let low = high / 2;
  while (score(low) > 0) low /= 2;
  const shape = findRoot(score, low, high);
  return describe({ shape, scale: scaleForShape(lives, shape) }, lives, failed, level);
}

function describe(fit: Weibull, lives: readonly Life[], failed: readonly Life[], level: number): WeibullFit {
  const { shape, scale } = fit;
  const z = normalQuantile(1 - (1 - level) / 2);
  const covariance = logCovariance(fit, lives, failed.length);
  // d ln(value)/d(ln shape, ln scale) gives the spread of ln(value).
  const estimate = (value: number, byShape: number, byScale: number): Estimate => {
    const variance = byShape ** 2 * covariance.shape + 2 * byShape * byScale * covariance.both + byScale ** 2 * covariance.scale;
    const spread = Math.exp(z * Math.sqrt(Math.max(0, variance)));
    return { value, low: value / spread, high: value * spread };
  };
  const logLikelihood =
    failed.reduce((sum, life) => sum + Math.log(shape / scale) + (shape - 1) * Math.log(life.time / scale), 0) -
    lives.reduce((sum, life) => sum + (life.time / scale) ** shape, 0);
  return {
    ...fit,
    logLikelihood,
    failures: failed.length,
    shapeLimits: estimate(shape, 1, 0),
    scaleLimits: estimate(scale, 0, 1),
    mean: estimate(weibullMean(fit), -digamma(1 + 1 / shape) / shape, 1),
    b10: estimate(weibullAge(0.1, fit), -Math.log(-Math.log(0.9)) / shape, 1),
  };
}

/** Inverse of the observed information in (ln shape, ln scale) at the maximum. */
function logCovariance({ shape, scale }: Weibull, lives: readonly Life[], failures: number): { shape: number; scale: number; both: number } {
  let [one, two] = [0, 0];
  for (const life of lives) {
    const u = shape * Math.log(life.time / scale);
    const power = Math.exp(u);
    one += power * u;
    two += power * u * u;
  }
  // With u = shape·ln(t/scale): ℓ = Σ_failed (ln shape + u − ln t) − Σ eᵘ; at the maximum Σ eᵘ = failures.
  const informationShape = failures + two;
  const informationScale = shape * shape * failures;
  const informationBoth = -shape * one;
  const determinant = informationShape * informationScale - informationBoth ** 2;
  return { shape: informationScale / determinant, scale: informationShape / determinant, both: -informationBoth / determinant };
}
