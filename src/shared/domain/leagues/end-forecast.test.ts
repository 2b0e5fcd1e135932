import { describe, expect, it } from 'vitest';
import { bookedLength, forecastSession, LEAGUE_PACE, type Playing } from './end-forecast.ts';

const min = 60_000;
const format = { bowlers: 8, games: 3, absent: 0 };
const playing: Playing = { startAt: 0, endAt: 150 * min, format, progress: null };

describe('end of a session', () => {
  it('books frames on a lane at the usual pace, up to five minutes', () => {
    expect(bookedLength(format)).toBe(150 * min);
    expect(bookedLength({ ...format, bowlers: 6 })).toBe(115 * min);
  });

  it('at the usual pace it ends as booked, with 10 to 15 minutes to clear', () => {
    const half = { ...playing, progress: { game: 2, frame: 6, at: 75 * min } };
    const forecast = forecastSession(half, 75 * min);
    expect(forecast).toMatchObject({ endAt: 150 * min, freeAt: 162.5 * min, basis: 'frames' });
    expect(forecast.latestFreeAt).toBeGreaterThan(165 * min);
  });

  it('slower than usual ends later, faster earlier', () => {
    expect(forecastSession({ ...playing, progress: { game: 2, frame: 1, at: 75 * min } }, 75 * min).endAt).toBeGreaterThan(170 * min);
    expect(forecastSession({ ...playing, progress: { game: 3, frame: 1, at: 75 * min } }, 75 * min).endAt).toBeLessThan(130 * min);
  });

  it('without scoring it stays with the booking, and with now once that has passed', () => {
    expect(forecastSession(playing, 20 * min)).toMatchObject({ endAt: 150 * min, basis: 'booked' });
    expect(forecastSession(playing, 170 * min).endAt).toBe(170 * min);
    expect(forecastSession(playing, 170 * min).latestFreeAt).toBe((170 + LEAGUE_PACE.clearMinutes.high) * min);
  });

  it('never forecasts the past', () => {
    expect(forecastSession({ ...playing, progress: { game: 3, frame: 10, at: 100 * min } }, 140 * min).endAt).toBe(140 * min);
  });
});
