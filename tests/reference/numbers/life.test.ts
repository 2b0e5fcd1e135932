import { describe, expect, it } from 'vitest';
import { kaplanMeier, survivalTime, type SurvivalStep } from '#shared/domain/numbers/kaplan-meier.ts';
import { nelsonAalen, type HazardStep } from '#shared/domain/numbers/nelson-aalen.ts';
import { bestReplacementAge, type ReplacementAge } from '#shared/domain/numbers/replacement-age.ts';
import { fitWeibull, type WeibullFit } from '#shared/domain/numbers/weibull.ts';
import { aircraft, remission } from './fixtures.ts';
import { near } from './near.ts';
import { secondOpinion } from './second-opinion.ts';

describe('remission under 6-mercaptopurine (Freireich et al. 1963)', () => {
  const curve = kaplanMeier(remission) as SurvivalStep[];

  it('Kaplan–Meier: the textbook curve, median 23 weeks', () => {
    expect(curve.map((step) => step.survival.toFixed(3))).toEqual(['0.857', '0.807', '0.753', '0.690', '0.627', '0.538', '0.448']);
    expect(survivalTime(curve, 0.5)).toEqual({ value: 23 });
  });

  it(`Kaplan–Meier with Greenwood and log–log limits against ${secondOpinion.versions}`, () => {
    expect(curve).toHaveLength(secondOpinion.kaplanMeier.length);
    secondOpinion.kaplanMeier.forEach((row, i) => {
      const step = curve[i]!;
      [step.time, step.survival, step.standardError, step.low, step.high].forEach((value, j) => near(value, row[j] as number));
    });
  });

  it(`Nelson–Aalen against ${secondOpinion.versions}`, () => {
    const hazard = nelsonAalen(remission) as HazardStep[];
    expect(hazard).toHaveLength(secondOpinion.nelsonAalen.length);
    secondOpinion.nelsonAalen.forEach((row, i) => {
      const step = hazard[i]!;
      [step.time, step.hazard, step.standardError].forEach((value, j) => near(value, row[j] as number));
    });
  });

  const weibull = (fit: WeibullFit): number[] => [fit.shape, fit.scale, fit.logLikelihood, fit.shapeLimits.low, fit.shapeLimits.high, fit.scaleLimits.low, fit.scaleLimits.high];

  it(`Weibull with right censoring against ${secondOpinion.versions}`, () => {
    weibull(fitWeibull(remission) as WeibullFit).forEach((value, i) => near(value, secondOpinion.weibullRemission[i] as number, 1e-8));
  });

  it(`Weibull without censoring against ${secondOpinion.versions}: air conditioning of plane 7909`, () => {
    const plane = aircraft.find((one) => one.plane === 7909)!;
    const fit = fitWeibull(plane.intervals.map((time) => ({ time, failed: true }))) as WeibullFit;
    weibull(fit).forEach((value, i) => near(value, secondOpinion.weibullPlane7909[i] as number, 1e-8));
  });
});

it.each(secondOpinion.replacement)(`best replacement age against ${secondOpinion.versions}: shape %d`, (shape, scale, planned, failure, age, cost) => {
  const best = bestReplacementAge({ shape: shape, scale: scale }, { planned: planned, failure: failure }) as ReplacementAge;
  // A minimum is flat: its place is known to half the digits of its height.
  near(best.age, age, 1e-6);
  near(best.costRate, cost, 1e-10);
});
