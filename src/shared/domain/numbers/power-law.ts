import { demandOpenUnit } from './demand.ts';
import { chisquareQuantile, normalQuantile } from './distributions.ts';
import { interior, type EventSeries } from './event-series.ts';
import { missing, type Missing } from './missing.ts';

/** Expected events until t: scale·t^shape. Shape below 1: improving; above 1: wearing. */
export type PowerLaw = { shape: number; scale: number };

export type PowerLawFit = PowerLaw & {
  /** Mean use between events at the end of the watch: T ÷ (r·shape). */
  currentMtbf: number;
  /** Which estimator this is; the two differ, so a figure always says which. */
  estimator: 'maximum-likelihood' | 'bias-corrected';
  /** Exact limits of the shape. */
  shapeLow: number;
  shapeHigh: number;
};

/**
 * Power-law process (Crow, Duane) fitted to the times of events.
 * Maximum likelihood: shape = r/S, S = Σ ln(T/tᵢ). Bias-corrected: (r−1)/S time-terminated, (r−2)/S failure-terminated.
 * Scale = r/T^shape. Limits of the shape from 2r·shape/shape_ML ~ χ²(2r), 2(r−1) failure-terminated.
 * Sources: L. H. Crow, "Reliability analysis for complex, repairable systems", in Reliability and Biometry (SIAM, 1974);
 * NIST/SEMATECH e-Handbook, sections 8.1.7.2 and 8.4.5.2, whose figures are the bias-corrected ones.
 */
export function fitPowerLaw(
  series: EventSeries,
  estimator: PowerLawFit['estimator'] = 'bias-corrected',
  level = 0.95,
): PowerLawFit | Missing<'too-few' | 'event-at-zero'> {
  demandOpenUnit('level', level);
  const { times, end } = interior(series);
  const r = series.times.length;
  const spared = series.termination === 'failure' ? 2 : 1;
  if (r <= spared) return missing('too-few');
  if (times[0] === 0) return missing('event-at-zero');
  const sum = times.reduce((all, time) => all + Math.log(end / time), 0);
  if (sum === 0) return missing('too-few');
  const shape = (estimator === 'bias-corrected' ? r - spared : r) / sum;
  const tail = (1 - level) / 2;
  const df = 2 * times.length;
  return {
    shape,
    scale: r / end ** shape,
    currentMtbf: end / (r * shape),
    estimator,
    shapeLow: chisquareQuantile(tail, df) / (2 * sum),
    shapeHigh: chisquareQuantile(1 - tail, df) / (2 * sum),
  };
}

/**
 * Limits of the current MTBF of a time-terminated watch, approximate, for an MTBF M at its end:
 * low = M·r(r−1)/(r + z²/4 + √(rz²/2 + z⁴/16))², high = M·r(r−1)/(r − z√(r/2))².
 * `high` is null when so few events leave it unbounded. Source: NIST/SEMATECH e-Handbook, section 8.4.5.2.
 */
export function currentMtbfLimits(currentMtbf: number, events: number, level = 0.95): { low: number; high: number | null } | Missing<'too-few'> {
  demandOpenUnit('level', level);
  if (events < 2) return missing('too-few');
  const z = normalQuantile(1 - (1 - level) / 2);
  const lead = currentMtbf * events * (events - 1);
  const below = events + (z * z) / 4 + Math.sqrt((events * z * z) / 2 + z ** 4 / 16);
  const above = events - z * Math.sqrt(events / 2);
  return { low: lead / below ** 2, high: above > 0 ? lead / above ** 2 : null };
}

/**
 * Cramér–von Mises distance between the events and the fitted power law (bias-corrected shape):
 * 1/(12M) + Σ((tᵢ/T)^shape − (2i−1)/(2M))². Small is a good fit; critical values depend on M.
 * Source: MIL-HDBK-189, appendix C.
 */
export function powerLawDistance(series: EventSeries): { value: number } | Missing<'too-few' | 'event-at-zero'> {
  const fit = fitPowerLaw(series);
  if (!('shape' in fit)) return fit;
  const { times, end } = interior(series);
  const m = times.length;
  const distance = times.reduce((sum, time, i) => sum + ((time / end) ** fit.shape - (2 * i + 1) / (2 * m)) ** 2, 0);
  return { value: 1 / (12 * m) + distance };
}
