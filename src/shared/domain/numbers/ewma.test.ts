import { describe, expect, it } from 'vitest';
import { ewmaChart, ewmaRateChart } from './ewma.ts';

describe('ewmaChart', () => {
  it('is a chart of single values at weight 1', () => {
    expect(ewmaChart([13.5, 12.9], 10, 1, { weight: 1 })).toEqual([
      { z: 13.5, low: 7, high: 13, outside: 'above' },
      { z: 12.9, low: 7, high: 13, outside: null },
    ]);
  });

  it('widens to its steady limits', () => {
    const points = ewmaChart(Array.from({ length: 200 }, () => 0), 0, 1, { weight: 0.3 });
    expect(points[0]!.high).toBeCloseTo(0.9, 12);
    expect(points[199]!.high).toBeCloseTo(3 * Math.sqrt(0.3 / 1.7), 9);
  });

  it('finds a drift that no single point shows', () => {
    const values = Array.from({ length: 30 }, () => 1.2);
    expect(ewmaChart(values, 0, 1, { weight: 1 }).some((point) => point.outside !== null)).toBe(false);
    expect(ewmaChart(values, 0, 1).some((point) => point.outside === 'above')).toBe(true);
    expect(() => ewmaChart([1], 0, 1, { weight: 0 })).toThrow(RangeError);
  });
});

describe('ewmaRateChart', () => {
  it('carries a week without frames, and opens limits for a week with few', () => {
    const points = ewmaRateChart([4, 0, 4], [2, 0, 0.1], 2);
    expect(points[1]).toEqual(points[0]);
    expect(points[2]!.high - 2).toBeGreaterThan(points[1]!.high - 2);
    expect(points[2]!.low).toBe(0);
  });
});
