import { describe, expect, it } from 'vitest';
import { bookedLength, clearedAt, forecastEnd, type Playing } from './end-forecast.ts';

const min = 60_000;
const playing: Playing = { startAt: 0, endAt: 150 * min, format: { bowlers: 8, games: 3, absent: 0 }, progress: null };

describe('end of a session', () => {
  it('books frames on a lane at the usual pace, up to five minutes', () => {
    expect(bookedLength({ bowlers: 8, games: 3, absent: 0 })).toBe(150 * min);
    expect(bookedLength({ bowlers: 6, games: 3, absent: 0 })).toBe(115 * min);
  });

  it('goes by frames left at its own pace', () => {
    const slow = { ...playing, progress: { game: 2, frame: 1, at: 60 * min } };
    expect(forecastEnd(slow, 60 * min)).toEqual({ at: 180 * min, basis: 'frames' });
    const fast = { ...playing, progress: { game: 2, frame: 6, at: 60 * min } };
    expect(forecastEnd(fast, 62 * min)).toEqual({ at: 120 * min, basis: 'frames' });
  });

  it('stays with the booking before three frames are done, and without scoring', () => {
    expect(forecastEnd({ ...playing, progress: { game: 1, frame: 3, at: 20 * min } }, 20 * min)).toEqual({ at: 150 * min, basis: 'booked' });
    expect(forecastEnd(playing, 20 * min)).toEqual({ at: 150 * min, basis: 'booked' });
    expect(forecastEnd(playing, 170 * min)).toEqual({ at: 170 * min, basis: 'booked' });
  });

  it('never forecasts the past', () => {
    expect(forecastEnd({ ...playing, progress: { game: 3, frame: 10, at: 100 * min } }, 140 * min).at).toBe(140 * min);
  });

  it('leaves time to clear', () => expect(clearedAt(150 * min, 15 * min)).toBe(165 * min));
});
