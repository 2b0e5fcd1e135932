import { describe, expect, it } from 'vitest';
import { currentMtbfLimits, fitPowerLaw, powerLawDistance, type PowerLawFit } from './power-law.ts';

const series = { times: [3, 9, 20, 41, 77], end: 100 };

describe('fitPowerLaw', () => {
  it('says which estimator it shows, the corrected one being the smaller', () => {
    const plain = fitPowerLaw(series, 'maximum-likelihood') as PowerLawFit;
    const corrected = fitPowerLaw(series) as PowerLawFit;
    expect(corrected).toMatchObject({ estimator: 'bias-corrected' });
    expect(corrected.shape).toBeCloseTo(plain.shape * 0.8, 12);
    expect(plain.scale * 100 ** plain.shape).toBeCloseTo(5, 10);
    expect(plain.shapeLow).toBe(corrected.shapeLow);
    expect(plain.shapeLow).toBeLessThan(plain.shape);
    expect(plain.shapeHigh).toBeGreaterThan(plain.shape);
  });

  it('takes two off for a failure-terminated watch', () => {
    const ended = { times: series.times, end: 77, termination: 'failure' as const };
    const plain = fitPowerLaw(ended, 'maximum-likelihood') as PowerLawFit;
    expect((fitPowerLaw(ended) as PowerLawFit).shape).toBeCloseTo((plain.shape * 3) / 5, 12);
  });

  it('keeps its shape in another unit of time', () => {
    const other = fitPowerLaw({ times: series.times.map((time) => time * 60), end: 6000 }) as PowerLawFit;
    expect(other.shape).toBeCloseTo((fitPowerLaw(series) as PowerLawFit).shape, 12);
    expect(other.currentMtbf).toBeCloseTo(60 * (fitPowerLaw(series) as PowerLawFit).currentMtbf, 9);
  });

  it('is missing with too few events or one at the start', () => {
    expect(fitPowerLaw({ times: [5], end: 9 })).toEqual({ value: null, reason: 'too-few' });
    expect(fitPowerLaw({ times: [5, 9], end: 9, termination: 'failure' })).toEqual({ value: null, reason: 'too-few' });
    expect(fitPowerLaw({ times: [0, 5, 6], end: 9 })).toEqual({ value: null, reason: 'event-at-zero' });
    expect(powerLawDistance({ times: [5], end: 9 })).toEqual({ value: null, reason: 'too-few' });
  });
});

describe('currentMtbfLimits', () => {
  it('has no upper limit for very few events', () => {
    expect(currentMtbfLimits(100, 2, 0.99)).toMatchObject({ high: null });
    expect(currentMtbfLimits(100, 1)).toEqual({ value: null, reason: 'too-few' });
  });
});
