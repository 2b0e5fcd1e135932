import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { reversalChances, reverseArrangements, type ReverseArrangements } from './reverse-arrangements.ts';

const test = (intervals: number[]): ReverseArrangements => reverseArrangements(intervals) as ReverseArrangements;

describe('reverseArrangements', () => {
  it('counts every pair in which the later is longer', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 9 }), { minLength: 4, maxLength: 60 }), (intervals) => {
        let pairs = 0;
        intervals.forEach((one, j) => intervals.slice(j + 1).forEach((other) => (pairs += one < other ? 1 : 0)));
        expect(test(intervals).count).toBe(pairs);
      }),
    );
  });

  it('is certain of nothing about four equal intervals', () => {
    expect(test([5, 5, 5, 5])).toMatchObject({ count: 0, improving: expect.closeTo(1, 12), worsening: expect.closeTo(1, 12) });
  });

  it('has p of one over all orders at either extreme', () => {
    expect(test([1, 2, 3, 4, 5]).improving).toBeCloseTo(1 / 120, 14);
    expect(test([5, 4, 3, 2, 1]).worsening).toBeCloseTo(1 / 120, 14);
  });

  it('goes over to the normal form without a jump', () => {
    const intervals = Array.from({ length: 40 }, (_, i) => ((i * 17) % 41) + i / 3);
    const exact = test(intervals);
    expect(exact.method).toBe('exact');
    const longer = test([...intervals, 12.5]);
    expect(longer.method).toBe('normal');
    const sigma = Math.sqrt((85 * 39 * 40) / 72);
    expect(Math.abs((exact.count - exact.expected) / sigma)).toBeGreaterThan(1);
    expect(exact.improving).toBeLessThan(0.1);
    expect(longer.improving).toBeLessThan(0.1);
  });

  it('wants four intervals', () => {
    expect(reverseArrangements([1, 2, 3])).toEqual({ value: null, reason: 'too-few' });
  });
});

describe('reversalChances', () => {
  it('counts orders: 1, 3, 5, 6, 5, 3, 1 of 24', () => {
    expect(reversalChances(4).map((chance) => Math.round(chance * 24))).toEqual([1, 3, 5, 6, 5, 3, 1]);
  });
});
