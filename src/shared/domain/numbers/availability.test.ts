import { describe, expect, it } from 'vitest';
import { availability, steadyStateAvailability } from './availability.ts';

describe('availability', () => {
  it('is whole, without means, when nothing failed', () => {
    expect(availability(100, [])).toEqual({ mtbf: null, mdt: null, activeRepair: null, up: 100, down: 0, operational: 1, inherent: null });
  });

  it('is missing without required time', () => {
    expect(availability(0, [])).toEqual({ value: null, reason: 'no-required-time' });
    expect(steadyStateAvailability(0, 0)).toEqual({ value: null, reason: 'no-time' });
  });

  it('counts waiting against the operational figure only', () => {
    const quick = availability(100, [{ down: 10, waiting: 9 }]) as { operational: number; inherent: number };
    expect(quick.operational).toBe(0.9);
    expect(quick.inherent).toBeCloseTo(90 / 91, 12);
  });

  it('refuses more down time than there was time, and waiting beyond the down time', () => {
    expect(() => availability(1, [{ down: 2, waiting: 0 }])).toThrow(RangeError);
    expect(() => availability(9, [{ down: 2, waiting: 3 }])).toThrow(RangeError);
  });
});
