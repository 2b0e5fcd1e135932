import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { kaplanMeier, survivalAt, survivalTime, type SurvivalStep } from './kaplan-meier.ts';

const lives = fc.array(fc.record({ time: fc.integer({ min: 1, max: 20 }), failed: fc.boolean() }), { minLength: 1, maxLength: 40 });

describe('kaplanMeier', () => {
  it('equals the empirical curve without censoring', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 20 }), { minLength: 1, maxLength: 40 }), (times) => {
        const steps = kaplanMeier(times.map((time) => ({ time, failed: true }))) as SurvivalStep[];
        for (let t = 0; t <= 20; t += 1) {
          expect(survivalAt(steps, t)).toBeCloseTo(times.filter((time) => time > t).length / times.length, 12);
        }
      }),
    );
  });

  it('falls, stays within 0 and 1, and its limits hold it and widen with confidence', () => {
    fc.assert(
      fc.property(lives, (list) => {
        const narrow = kaplanMeier(list, 0.8);
        const wide = kaplanMeier(list, 0.99);
        if (!Array.isArray(narrow) || !Array.isArray(wide)) {
          expect(list.some((life) => life.failed)).toBe(false);
          return;
        }
        let before = 1;
        narrow.forEach((step, i) => {
          expect(step.survival).toBeLessThan(before);
          before = step.survival;
          if (step.low === null) {
            expect(step.survival).toBe(0);
            return;
          }
          expect(step.low).toBeGreaterThan(wide[i]!.low as number);
          expect(step.high).toBeLessThan(wide[i]!.high as number);
          expect(step.survival).toBeGreaterThan(step.low);
          expect(step.survival).toBeLessThan(step.high as number);
        });
      }),
    );
  });

  it('is missing without a failure', () => {
    expect(kaplanMeier([{ time: 4, failed: false }])).toEqual({ value: null, reason: 'no-failures' });
  });
});

describe('survivalTime', () => {
  it('is the first time at which the share is reached, or missing', () => {
    const steps = kaplanMeier([1, 2, 3, 4].map((time) => ({ time, failed: time < 4 }))) as SurvivalStep[];
    expect(survivalTime(steps, 0.5)).toEqual({ value: 2 });
    expect(survivalTime(steps, 0.1)).toEqual({ value: null, reason: 'not-reached' });
  });
});
