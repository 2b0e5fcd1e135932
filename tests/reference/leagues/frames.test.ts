import { describe, expect, it } from 'vitest';
import { deliveriesAGame, deliveriesBounds, framesOnLane, framesOnOneLane } from '#shared/domain/leagues/frames.ts';
import { DEFAULT_DELIVERIES_PER_FRAME } from '#shared/domain/runs/forecast.ts';

/** Sources: rules of tenpin (USBC playing rules, rule 2 and 106a/b as quoted publicly; bowling.sport rule 1.1); totals computed from them. */
describe('frame arithmetic', () => {
  it('a complete game takes 11 to 21 deliveries', () => {
    expect(deliveriesAGame()).toEqual({ least: 11, most: 21 });
  });

  it('frames 1–9 take one or two, the tenth two or three; there is no eleventh', () => {
    expect(deliveriesBounds(1)).toEqual({ least: 1, most: 2 });
    expect(deliveriesBounds(10)).toEqual({ least: 2, most: 3 });
    expect(() => deliveriesBounds(11)).toThrow(RangeError);
  });

  it('a perfect game of 12 lies inside, and so does the expected number', () => {
    const { least, most } = deliveriesAGame();
    expect(12).toBeGreaterThanOrEqual(least);
    expect(DEFAULT_DELIVERIES_PER_FRAME.low * 10).toBeGreaterThan(least);
    expect(DEFAULT_DELIVERIES_PER_FRAME.high * 10).toBeLessThan(most);
  });

  it('on two lanes each bowler has five frames of a game on each', () => {
    expect(framesOnLane({ bowlers: 1, games: 1, absent: 0 })).toBe(5);
    expect(framesOnOneLane({ bowlers: 1, games: 1, absent: 0 })).toBe(10);
  });
});
