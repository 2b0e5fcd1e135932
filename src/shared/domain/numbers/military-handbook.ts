import { chisquareCdf, chisquareTail } from './distributions.ts';
import { interior, type EventSeries } from './event-series.ts';
import { missing, type Missing } from './missing.ts';

export type MilitaryHandbookTest = {
  chisquare: number;
  df: number;
  /** Small when it improves; when it gets worse; either. */
  improving: number;
  worsening: number;
  twoSided: number;
};

/**
 * Military Handbook test of a constant rate against a power-law trend: χ² = 2Σ ln(T/tᵢ) with 2r degrees of freedom,
 * large when events come early. Failure-terminated: over the first r − 1 events with T the last one.
 * An event at time 0 can't be placed on this scale: missing.
 * Source: MIL-HDBK-189; NIST/SEMATECH e-Handbook, section 8.2.3.4.
 */
export function militaryHandbookTest(series: EventSeries): MilitaryHandbookTest | Missing<'too-few' | 'event-at-zero'> {
  const { times, end } = interior(series);
  if (times.length === 0) return missing('too-few');
  if (times[0] === 0) return missing('event-at-zero');
  const df = 2 * times.length;
  const chisquare = 2 * times.reduce((sum, time) => sum + Math.log(end / time), 0);
  const improving = chisquareTail(chisquare, df);
  const worsening = chisquareCdf(chisquare, df);
  return { chisquare, df, improving, worsening, twoSided: Math.min(1, 2 * Math.min(improving, worsening)) };
}
