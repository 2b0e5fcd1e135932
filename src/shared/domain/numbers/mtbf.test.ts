import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mtbf } from './mtbf.ts';

describe('mtbf', () => {
  it('knows no mean without a failure, only a one-sided lower limit', () => {
    expect(mtbf(0, 100, 0.9)).toEqual({ value: null, low: expect.closeTo(43.429448190325, 10), high: null });
  });

  it('is missing without use, or when a period can not have ended at its last failure', () => {
    expect(mtbf(0, 0)).toEqual({ value: null, reason: 'no-use' });
    expect(mtbf(0, 100, 0.9, 'failure')).toEqual({ value: null, reason: 'no-failure-to-end-at' });
  });

  it('claims less at the low end of a time-terminated period, and the same at the high end', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 300 }), (failures) => {
        const byTime = mtbf(failures, 1000, 0.95, 'time') as { low: number; high: number; value: number };
        const byFailure = mtbf(failures, 1000, 0.95, 'failure') as { low: number; high: number };
        expect(byTime.low).toBeLessThan(byFailure.low);
        expect(byTime.high).toBe(byFailure.high);
        expect(byTime.low).toBeLessThan(byTime.value);
        expect(byTime.high).toBeGreaterThan(byTime.value);
      }),
    );
  });
});
