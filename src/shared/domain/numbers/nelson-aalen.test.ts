import { expect, it } from 'vitest';
import { kaplanMeier, type SurvivalStep } from './kaplan-meier.ts';
import { nelsonAalen, type HazardStep } from './nelson-aalen.ts';

const lives = [3, 5, 5, 8, 12, 12, 19].map((time, i) => ({ time, failed: i % 3 !== 2 }));

it('adds failures by those at risk, and promises at least as much survival as the product-limit curve', () => {
  const hazard = nelsonAalen(lives) as HazardStep[];
  expect(hazard[0]).toMatchObject({ time: 3, hazard: 1 / 7, standardError: 1 / 7 });
  const survival = kaplanMeier(lives) as SurvivalStep[];
  hazard.forEach((step, i) => {
    expect(step.time).toBe(survival[i]!.time);
    expect(Math.exp(-step.hazard)).toBeGreaterThanOrEqual(survival[i]!.survival);
    expect(step.low).toBeLessThan(step.hazard);
    expect(step.high).toBeGreaterThan(step.hazard);
  });
});

it('is missing without a failure', () => {
  expect(nelsonAalen([])).toEqual({ value: null, reason: 'no-failures' });
});
