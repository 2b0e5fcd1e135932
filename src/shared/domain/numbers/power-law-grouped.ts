import { demandCount, demandPositive, demandSameLength } from './demand.ts';
import { missing, type Missing } from './missing.ts';
import type { PowerLaw } from './power-law.ts';
import { findRoot } from './root.ts';

/** Fit, and mean use between events at the end of the last group. */
export type GroupedPowerLaw = PowerLaw & { currentMtbf: number };

/**
 * Power-law process by maximum likelihood when only counts between inspections are known.
 * @param ends use at the end of each group, rising, the first group beginning at 0.
 * @param counts events in each group.
 * Solves Σ nᵢ·[(Tᵢᵇ ln Tᵢ − Tᵢ₋₁ᵇ ln Tᵢ₋₁)/(Tᵢᵇ − Tᵢ₋₁ᵇ) − ln T] = 0. Source: MIL-HDBK-189, appendix on grouped data.
 * Missing when all events fall into one end group, where the likelihood has no maximum.
 */
export function fitGroupedPowerLaw(ends: readonly number[], counts: readonly number[]): GroupedPowerLaw | Missing<'too-few' | 'no-maximum'> {
  demandSameLength('ends and counts', ends, counts);
  ends.forEach((end, i) => {
    demandPositive('end', end);
    if (i > 0 && end <= (ends[i - 1] as number)) throw new RangeError('ends must rise');
  });
  counts.forEach((count) => demandCount('count', count));
  const events = counts.reduce((sum, count) => sum + count, 0);
  const last = ends[ends.length - 1];
  if (events === 0 || last === undefined || ends.length < 2) return missing('too-few');
  if (counts[0] === events || counts[counts.length - 1] === events) return missing('no-maximum');
  const logs = ends.map((end) => Math.log(end / last));
  const score = (shape: number): number => groupedScore(logs, counts, shape);
  // Positive near 0 and negative far out, as not all events lie in one end group.
  let low = 1;
  while (score(low) < 0) low /= 2;
  let high = 2 * low;
  while (score(high) > 0) high *= 2;
  const shape = findRoot(score, low, high);
  return { shape, scale: events / last ** shape, currentMtbf: last / (events * shape) };
}

/** dℓ/d(shape), with logarithms of times as a share of the whole, so that the last is 0. */
function groupedScore(logs: readonly number[], counts: readonly number[], shape: number): number {
  let sum = (counts[0] as number) * (logs[0] as number);
  for (let i = 1; i < logs.length; i += 1) {
    const count = counts[i] as number;
    if (count === 0) continue;
    const end = logs[i] as number;
    const start = logs[i - 1] as number;
    // Divided through by endᵇ: (ln end − q ln start)/(1 − q), q = (start/end)ᵇ.
    const q = Math.exp(shape * (start - end));
    sum += (count * (end - q * start)) / (1 - q);
  }
  return sum;
}
