import { normalCdf, normalTwoSided } from './distributions.ts';
import { interior, type EventSeries } from './event-series.ts';
import { missing, type Missing } from './missing.ts';

export type LaplaceTest = {
  /** Negative: events come early, the thing improves. */
  z: number;
  /** Small when it improves; when it gets worse; either. */
  improving: number;
  worsening: number;
  twoSided: number;
};

/**
 * Laplace's test of a constant rate against a log-linear trend: z = √(12r)·Σ(tᵢ − T/2)/(rT), standard normal.
 * Failure-terminated: over the first r − 1 events with T the last one.
 * Source: NIST/SEMATECH e-Handbook, section 8.2.3.4.
 */
export function laplaceTest(series: EventSeries): LaplaceTest | Missing<'too-few'> {
  const { times, end } = interior(series);
  const r = times.length;
  if (r === 0) return missing('too-few');
  const away = times.reduce((sum, time) => sum + (time - end / 2), 0);
  const z = (Math.sqrt(12 * r) * away) / (r * end);
  return { z, improving: normalCdf(z), worsening: normalCdf(-z), twoSided: normalTwoSided(z) };
}
