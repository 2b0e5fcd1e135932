import { describe, expect, it } from 'vitest';
import { binomialCdf, poissonPmf } from './distributions.ts';
import { comparisonPower, framesNeeded } from './power.ts';

/** Every outcome of both sides, one by one. */
function powerByHand(meanLow: number, meanHigh: number, share: number, significance: number): number {
  let sum = 0;
  for (let few = 0; few <= 80; few += 1) {
    for (let many = 0; many <= 80; many += 1) {
      if (few + many > 0 && binomialCdf(few, few + many, share) <= significance / 2) sum += poissonPmf(few, meanLow) * poissonPmf(many, meanHigh);
    }
  }
  return sum;
}

describe('comparisonPower', () => {
  it('is the sum over every outcome, whichever side is lower', () => {
    expect(comparisonPower({ rate: 0.01, ratio: 0.4, framesBefore: 2000, framesAfter: 3000 })).toBeCloseTo(powerByHand(12, 20, 0.6, 0.05), 9);
    expect(comparisonPower({ rate: 0.01, ratio: 3, framesBefore: 1000, framesAfter: 500 }, 0.1)).toBeCloseTo(powerByHand(10, 15, 2 / 3, 0.1), 9);
  });

  it('never exceeds half the significance as the change vanishes', () => {
    expect(comparisonPower({ rate: 0.01, ratio: 1 - 1e-9, framesBefore: 4000, framesAfter: 4000 })).toBeLessThanOrEqual(0.025);
  });
});

describe('framesNeeded', () => {
  it.each([
    [40, 10_000, 0.5],
    [40, 10_000, 2],
    [200, 50_000, 0.8],
    [12, 3_000, 0.25],
  ])('reaches the wanted power after %i stops in %i frames for a ratio of %f, and only just', (count, frames, ratio) => {
    const result = framesNeeded({ before: { count, frames }, ratio });
    if (!('frames' in result)) throw new Error(result.reason);
    const rate = count / frames;
    expect(comparisonPower({ rate, ratio, framesBefore: frames, framesAfter: result.frames })).toBeGreaterThanOrEqual(0.8);
    expect(comparisonPower({ rate, ratio, framesBefore: frames, framesAfter: result.frames * 0.9 })).toBeLessThan(0.8);
  });

  it('takes off the frames already bowled, down to none', () => {
    const all = framesNeeded({ before: { count: 40, frames: 10_000 }, ratio: 0.5 }) as { frames: number; still: number };
    expect(framesNeeded({ before: { count: 40, frames: 10_000 }, ratio: 0.5, soFar: 1000 })).toMatchObject({ still: all.frames - 1000 });
    expect(framesNeeded({ before: { count: 40, frames: 10_000 }, ratio: 0.5, soFar: 1e7 })).toMatchObject({ still: 0 });
  });

  it('says when no number of frames will do, and when there is nothing to ask', () => {
    expect(framesNeeded({ before: { count: 5, frames: 1000 }, ratio: 0.9 })).toEqual({ value: null, reason: 'out-of-reach' });
    expect(framesNeeded({ before: { count: 12, frames: 1000 }, ratio: 0.4 })).toEqual({ value: null, reason: 'out-of-reach' });
    expect(framesNeeded({ before: { count: 0, frames: 1000 }, ratio: 0.5 })).toEqual({ value: null, reason: 'no-events' });
    expect(framesNeeded({ before: { count: 0, frames: 0 }, ratio: 0.5 })).toEqual({ value: null, reason: 'no-frames' });
    expect(framesNeeded({ before: { count: 9, frames: 90 }, ratio: 1 })).toEqual({ value: null, reason: 'no-change-asked' });
  });
});
