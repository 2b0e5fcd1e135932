import { describe, expect, it } from 'vitest';
import { forecastDeliveries, forecastEnd, framesBetween } from './forecast.ts';

const MIN = 60_000;

describe('deliveries to come', () => {
  const play = [{ start: 60 * MIN, end: 180 * MIN, frames: 240 }];

  it('takes the share of the booking until then', () => {
    expect(framesBetween(play, 0, 60 * MIN)).toBe(0);
    expect(framesBetween(play, 0, 120 * MIN)).toBe(120);
    expect(framesBetween(play, 150 * MIN, 400 * MIN)).toBe(60);
    expect(forecastDeliveries(30, play, { now: 0, at: 120 * MIN })).toEqual({ low: 198, likely: 234, high: 270 });
  });

  it('adds open play only where nothing is booked', () => {
    expect(forecastDeliveries(0, play, { now: 0, at: 240 * MIN }, { openPerHour: 60, perFrame: { low: 1, likely: 1, high: 1 } })).toEqual({ low: 240, likely: 360, high: 480 });
    expect(forecastDeliveries(7, [], { now: 0, at: 0 }, { openPerHour: 60 })).toEqual({ low: 7, likely: 7, high: 7 });
  });
});

describe('end of a session', () => {
  it('follows the usual pace before anything is seen, then what is seen', () => {
    const start = forecastEnd({ now: 0, framesDone: 0, framesLeft: 120, playedMs: 0 });
    expect(start.likely).toBe((100 + 12.5) * MIN);
    const slow = forecastEnd({ now: 0, framesDone: 60, framesLeft: 60, playedMs: 100 * MIN });
    expect(slow.likely).toBeGreaterThan((60 / 0.8) * MIN);
    expect(slow.likely).toBeLessThan((60 / 0.6 + 12.5) * MIN);
  });

  it('narrows as the session goes on and ends with the clearing time', () => {
    const width = (framesDone: number) => {
      const { low, high } = forecastEnd({ now: 0, framesDone, framesLeft: 120 - framesDone, playedMs: (framesDone / 1.2) * MIN });
      return high - low;
    };
    expect([0, 30, 60, 90, 119].map(width)).toEqual([0, 30, 60, 90, 119].map(width).sort((a, b) => b - a));
    expect(forecastEnd({ now: 5, framesDone: 120, framesLeft: 0, playedMs: 100 * MIN })).toEqual({ low: 5 + 10 * MIN, likely: 5 + 12.5 * MIN, high: 5 + 15 * MIN });
  });
});
