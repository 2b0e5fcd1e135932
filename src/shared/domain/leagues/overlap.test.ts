import { describe, expect, it } from 'vitest';
import { type Booked, firstOverlap, overlaps } from './overlap.ts';

const booked = (id: string, lanes: number[], from: number, to: number): Booked => ({ id, lanes, from, to });

describe('bookings in the way of each other', () => {
  it('needs a lane and a moment in common', () => {
    expect(overlaps(booked('a', [1, 2], 0, 10), booked('b', [2, 3], 9, 20))).toBe(true);
    expect(overlaps(booked('a', [1, 2], 0, 10), booked('b', [3, 4], 0, 10))).toBe(false);
    expect(overlaps(booked('a', [1, 2], 0, 10), booked('b', [1, 2], 10, 20))).toBe(false);
  });

  it('names the earliest one and the lanes, and never itself', () => {
    const wanted = booked('a', [1, 2, 3, 4], 5, 15);
    const found = firstOverlap(wanted, [booked('late', [1], 12, 20), booked('early', [3, 4, 5], 0, 6), wanted]);
    expect(found?.other.id).toBe('early');
    expect(found?.lanes).toEqual([3, 4]);
    expect(firstOverlap(wanted, [wanted])).toBeNull();
  });
});
