import { demandAmount, demandCount, demandOpenUnit, demandPositive } from './demand.ts';
import { binomialCdf, normalQuantile, poissonCdf, poissonPmf } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import type { CountedFrames } from './rates.ts';

/** More frames than this many times those before count as out of reach. */
const MOST_TIMES = 200;

/** A comparison to be made: events per frame before, true ratio after ÷ before, frames on both sides. */
export type ComparisonPlan = { rate: number; ratio: number; framesBefore: number; framesAfter: number };

/**
 * Probability that the exact conditional test (each side at significance ÷ 2) finds the change in its true direction.
 * Summed over all outcomes, no approximation but for outcomes beyond 7 standard deviations.
 */
export function comparisonPower(plan: ComparisonPlan, significance = 0.05): number {
  demandPositive('rate', plan.rate);
  demandPositive('ratio', plan.ratio);
  demandPositive('framesBefore', plan.framesBefore);
  demandPositive('framesAfter', plan.framesAfter);
  demandOpenUnit('significance', significance);
  const before = { mean: plan.rate * plan.framesBefore, frames: plan.framesBefore };
  const after = { mean: plan.rate * plan.ratio * plan.framesAfter, frames: plan.framesAfter };
  const [lower, higher] = plan.ratio < 1 ? [after, before] : [before, after];
  const share = lower.frames / (lower.frames + higher.frames);
  const reach = 7 * Math.sqrt(higher.mean) + 10;
  const significant = (few: number, many: number): boolean => binomialCdf(few, few + many, share) <= significance / 2;
  let few = -1;
  let stride = Math.ceil(lower.mean / 4);
  let found = 0;
  for (let many = Math.max(0, Math.floor(higher.mean - reach)); many <= higher.mean + reach; many += 1) {
    // The largest count on the lower side that is still significant rises with the count on the higher side.
    const start = few;
    while (significant(few + stride, many)) few += stride;
    for (let half = stride; half > 1; ) {
      half = Math.ceil(half / 2);
      if (significant(few + half, many)) few += half;
    }
    found += poissonPmf(many, higher.mean) * poissonCdf(few, lower.mean);
    stride = Math.max(1, few - start);
  }
  return Math.min(1, found);
}

export type FramesNeeded = {
  /** Frames after the change in all. */
  frames: number;
  /** Frames still to come, `frames` less those already bowled; 0 when there are enough. */
  still: number;
  /** Exact power reached with `frames`. */
  power: number;
};

/**
 * Frames after a change that are needed to find a true ratio with the wanted power, the rate before taken as known from
 * its count and frames. Starts at the normal formula for the log ratio (M. L. Tang and H. K. T. Ng, Statistics in Medicine
 * 24 (2005) 955–965) and ends within one percentage point above the wanted exact power.
 * Missing 'out-of-reach': the count before is so small that not even 200 times its frames after will do.
 */
export function framesNeeded(
  input: { before: CountedFrames; ratio: number; soFar?: number; power?: number; significance?: number },
): FramesNeeded | Missing<'no-frames' | 'no-events' | 'no-change-asked' | 'out-of-reach'> {
  const { before, ratio, soFar = 0, power = 0.8, significance = 0.05 } = input;
  demandCount('count', before.count);
  demandAmount('frames', before.frames);
  demandPositive('ratio', ratio);
  demandAmount('soFar', soFar);
  demandOpenUnit('power', power);
  if (before.frames === 0) return missing('no-frames');
  if (before.count === 0) return missing('no-events');
  if (ratio === 1) return missing('no-change-asked');
  const rate = before.count / before.frames;
  const effect = Math.abs(Math.log(ratio));
  const wanted = normalQuantile(power);
  const spread = (effect / (normalQuantile(1 - significance / 2) + wanted)) ** 2 - 1 / before.count;
  if (spread <= 0) return missing('out-of-reach');
  let frames = 1 / (spread * rate * ratio);
  for (let step = 0; step < 12; step += 1) {
    const reached = comparisonPower({ rate, ratio, framesBefore: before.frames, framesAfter: frames }, significance);
    if (reached >= power && reached <= power + 0.01) {
      const whole = Math.ceil(frames);
      return { frames: whole, still: Math.max(0, whole - soFar), power: reached };
    }
    // One Newton step in ln(frames) on the scale of the normal formula, aimed half a point above the wanted power.
    const noise = 1 / (rate * ratio * frames);
    const slope = 0.5 * effect * noise * (1 / before.count + noise) ** -1.5;
    const gap = normalQuantile(Math.min(0.999999, power + 0.005)) - normalQuantile(Math.min(0.999999, Math.max(1e-6, reached)));
    frames *= Math.exp(Math.max(-1, Math.min(1, gap / slope)));
    if (!(frames < MOST_TIMES * before.frames)) break;
  }
  return missing('out-of-reach');
}
