import { demandOpenUnit } from './demand.ts';
import { normalQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import { riskTable, type Life } from './survival-data.ts';

/** Cumulative hazard just after `time`, with limits that stay above 0. */
export type HazardStep = { time: number; atRisk: number; failures: number; hazard: number; standardError: number; low: number; high: number };

/**
 * Nelson–Aalen cumulative hazard Σ d/n with variance Σ d/n² and limits on the log scale.
 * A straight line is a constant failure rate; bending up is wear.
 * Sources: W. Nelson, J. Quality Technology 1 (1969) 27–52; O. Aalen, Annals of Statistics 6 (1978) 701–726.
 */
export function nelsonAalen(lives: readonly Life[], level = 0.95): HazardStep[] | Missing<'no-failures'> {
  demandOpenUnit('level', level);
  const z = normalQuantile(1 - (1 - level) / 2);
  const steps: HazardStep[] = [];
  let hazard = 0;
  let variance = 0;
  for (const { time, atRisk, failures } of riskTable(lives)) {
    if (failures === 0) continue;
    hazard += failures / atRisk;
    variance += failures / (atRisk * atRisk);
    const standardError = Math.sqrt(variance);
    const spread = Math.exp((z * standardError) / hazard);
    steps.push({ time, atRisk, failures, hazard, standardError, low: hazard / spread, high: hazard * spread });
  }
  return steps.length === 0 ? missing('no-failures') : steps;
}
