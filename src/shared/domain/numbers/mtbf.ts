import { demandAmount, demandCount, demandOpenUnit } from './demand.ts';
import { chisquareQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';

/**
 * How a period ended. 'time': at a moment that the failures didn't choose (a week, a season: every report).
 * 'failure': exactly at the last failure counted.
 */
export type Termination = 'time' | 'failure';

/** Mean use between failures, in the unit of the use passed in (hours, frames). `value` and `high` are null without a failure. */
export type Mtbf = { value: number | null; low: number; high: number | null };

/**
 * MTBF under a constant failure rate with two-sided limits:
 * 2T/χ²(1−α/2; df) and 2T/χ²(α/2; 2r), df = 2r + 2 time-terminated, 2r failure-terminated.
 * Without a failure the mean is unknown and the lower limit is one-sided at the same level: T ÷ −ln(1 − level).
 * Source: NIST/SEMATECH e-Handbook of Statistical Methods, section 8.4.5.1.
 * @param use operating time or frames, the clock being the caller's to name.
 */
export function mtbf(
  failures: number,
  use: number,
  level = 0.95,
  termination: Termination = 'time',
): Mtbf | Missing<'no-use' | 'no-failure-to-end-at'> {
  demandCount('failures', failures);
  demandAmount('use', use);
  demandOpenUnit('level', level);
  if (use === 0) return missing('no-use');
  if (failures === 0) {
    if (termination === 'failure') return missing('no-failure-to-end-at');
    return { value: null, low: use / -Math.log(1 - level), high: null };
  }
  const tail = (1 - level) / 2;
  const df = termination === 'time' ? 2 * failures + 2 : 2 * failures;
  return {
    value: use / failures,
    low: (2 * use) / chisquareQuantile(1 - tail, df),
    high: (2 * use) / chisquareQuantile(tail, 2 * failures),
  };
}
