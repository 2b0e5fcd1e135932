import { demandOpenUnit } from './demand.ts';
import { normalQuantile } from './distributions.ts';
import { missing, type Missing } from './missing.ts';
import { riskTable, type Life } from './survival-data.ts';

/** The curve falls at `time` to `survival`; limits are null where they don't exist (survival 0). */
export type SurvivalStep = {
  time: number;
  atRisk: number;
  failures: number;
  survival: number;
  /** Greenwood's standard error of the survival; null at survival 0. */
  standardError: number | null;
  low: number | null;
  high: number | null;
};

/**
 * Kaplan–Meier curve: one step for each time at which something failed, 1 before the first.
 * Limits on the log(−log) scale, so they stay within 0 and 1.
 * Sources: E. L. Kaplan and P. Meier, J. American Statistical Association 53 (1958) 457–481; M. Greenwood (1926);
 * J. D. Kalbfleisch and R. L. Prentice, The Statistical Analysis of Failure Time Data (1980), section 1.3.
 */
export function kaplanMeier(lives: readonly Life[], level = 0.95): SurvivalStep[] | Missing<'no-failures'> {
  demandOpenUnit('level', level);
  const z = normalQuantile(1 - (1 - level) / 2);
  const steps: SurvivalStep[] = [];
  let survival = 1;
  let greenwood = 0;
  for (const { time, atRisk, failures } of riskTable(lives)) {
    if (failures === 0) continue;
    survival *= (atRisk - failures) / atRisk;
    greenwood += failures / (atRisk * (atRisk - failures));
    if (atRisk === failures) {
      steps.push({ time, atRisk, failures, survival: 0, standardError: null, low: null, high: null });
      continue;
    }
    const spread = Math.exp((z * Math.sqrt(greenwood)) / Math.abs(Math.log(survival)));
    steps.push({ time, atRisk, failures, survival, standardError: survival * Math.sqrt(greenwood), low: survival ** spread, high: survival ** (1 / spread) });
  }
  return steps.length === 0 ? missing('no-failures') : steps;
}

/** Survival just after a time. */
export function survivalAt(steps: readonly SurvivalStep[], time: number): number {
  let survival = 1;
  for (const step of steps) {
    if (step.time > time) break;
    survival = step.survival;
  }
  return survival;
}

/** First time by which at most the given share survives (0.5: median life); missing if the curve never falls that far. */
export function survivalTime(steps: readonly SurvivalStep[], share: number): { value: number } | Missing<'not-reached'> {
  demandOpenUnit('share', share);
  const step = steps.find((one) => one.survival <= share + 1e-12);
  return step === undefined ? missing('not-reached') : { value: step.time };
}
