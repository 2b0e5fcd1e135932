import { demandAmount } from './demand.ts';
import { normalCdf } from './distributions.ts';
import { missing, type Missing } from './missing.ts';

/** Up to this many intervals the distribution is exact. */
export const EXACT_UP_TO = 40;

export type ReverseArrangements = {
  /** Pairs of intervals of which the later is longer. */
  count: number;
  max: number;
  expected: number;
  /** Normal statistic with continuity correction as for improvement; a large sample's approximation. */
  z: number;
  /** Small when intervals grow longer (improvement); when they grow shorter. */
  improving: number;
  worsening: number;
  method: 'exact' | 'normal';
};

/**
 * Reverse-arrangement test on the intervals between events, in order of time.
 * Ties aren't counted as reversals for improvement, and are counted for worsening, so either p errs on the safe side.
 * Normal form for more than EXACT_UP_TO intervals: z = (R − r(r−1)/4 ± ½)/√((2r+5)(r−1)r/72).
 * Source: NIST/SEMATECH e-Handbook, section 8.2.3.4 (H. B. Mann, Econometrica 13 (1945) 245–259).
 */
export function reverseArrangements(intervals: readonly number[]): ReverseArrangements | Missing<'too-few'> {
  intervals.forEach((interval) => demandAmount('interval', interval));
  const r = intervals.length;
  if (r < 4) return missing('too-few');
  const { rising, equal } = countPairs(intervals);
  const max = (r * (r - 1)) / 2;
  const expected = max / 2;
  const sigma = Math.sqrt(((2 * r + 5) * (r - 1) * r) / 72);
  const z = (rising - expected + 0.5) / sigma;
  if (r > EXACT_UP_TO) {
    const improving = normalCdf(-(rising - expected - 0.5) / sigma);
    const worsening = normalCdf((rising + equal - expected + 0.5) / sigma);
    return { count: rising, max, expected, z, improving, worsening, method: 'normal' };
  }
  const chances = reversalChances(r);
  const sum = (from: number, to: number): number => chances.slice(from, to + 1).reduce((all, chance) => all + chance, 0);
  // By symmetry the upper tail is the lower one mirrored, which adds small numbers only.
  return { count: rising, max, expected, z, improving: sum(0, max - rising), worsening: sum(0, rising + equal), method: 'exact' };
}

/** Pairs in which the later value is larger, and pairs of equal values, by merge sort in n·log n. */
function countPairs(values: readonly number[]): { rising: number; equal: number } {
  const n = values.length;
  let sorted = Float64Array.from(values);
  let merged = new Float64Array(n);
  let rising = 0;
  for (let width = 1; width < n; width *= 2) {
    for (let start = 0; start < n; start += 2 * width) {
      const middle = Math.min(start + width, n);
      const end = Math.min(start + 2 * width, n);
      let [i, j] = [start, middle];
      for (let k = start; k < end; k += 1) {
        const fromLeft = i < middle && (j >= end || (sorted[i] as number) < (sorted[j] as number));
        // A later value taken over exceeds every earlier one that went before it.
        if (!fromLeft) rising += i - start;
        merged[k] = (fromLeft ? sorted[i++] : sorted[j++]) as number;
      }
    }
    [sorted, merged] = [merged, sorted];
  }
  let [equal, run] = [0, 0];
  for (let i = 1; i < n; i += 1) {
    run = sorted[i] === sorted[i - 1] ? run + 1 : 0;
    equal += run;
  }
  return { rising, equal };
}

/** Probability of each number of reversals among r intervals in random order: adding the k-th spreads evenly over 0…k−1. */
export function reversalChances(r: number): number[] {
  let chances = [1];
  for (let k = 2; k <= r; k += 1) {
    const next: number[] = [];
    let window = 0;
    for (let count = 0; count < chances.length + k - 1; count += 1) {
      window += chances[count] ?? 0;
      if (count >= k) window -= chances[count - k] ?? 0;
      next.push(window / k);
    }
    chances = next;
  }
  return chances;
}
