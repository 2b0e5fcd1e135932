import { describe, expect, it } from 'vitest';
import { cChart, individualsChart, uChart, type Chart } from './charts.ts';

describe('uChart', () => {
  it('keeps the place of a week without frames', () => {
    const result = uChart([2, 0, 3], [1, 0, 1]) as Chart;
    expect(result.centre).toBe(2.5);
    expect(result.points[1]).toBeNull();
  });

  it('is missing without exposure, and without an event to place limits round', () => {
    expect(uChart([], [])).toEqual({ value: null, reason: 'no-exposure' });
    expect(uChart([0, 0], [1, 1])).toEqual({ value: null, reason: 'no-events' });
    expect(() => uChart([1], [])).toThrow(RangeError);
  });

  it('holds a point on its limit inside, and takes a standard from outside', () => {
    const result = uChart([28, 29], [1, 1], { centre: 16 }) as Chart;
    expect(result.points.map((point) => point?.outside)).toEqual([null, 'above']);
  });
});

describe('cChart', () => {
  it('is a u-chart of equal periods', () => {
    expect(cChart([3, 5, 4])).toEqual(uChart([3, 5, 4], [1, 1, 1]));
  });
});

describe('individualsChart', () => {
  it('needs two values that differ', () => {
    expect(individualsChart([4])).toEqual({ value: null, reason: 'too-few' });
    expect(individualsChart([4, 4, 4])).toEqual({ value: null, reason: 'no-spread' });
  });
});
