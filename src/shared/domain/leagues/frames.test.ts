import { describe, expect, it } from 'vitest';
import { framesDone, framesOnLane, framesOnOneLane, type PairFormat } from './frames.ts';

const format: PairFormat = { bowlers: 8, games: 3, absent: 0 };

describe('frames of a session', () => {
  it('expects bowlers on the pair × games × 10 ÷ 2 on each lane, less who is missing', () => {
    expect(framesOnLane(format)).toBe(120);
    expect(framesOnLane({ ...format, absent: 1 })).toBe(105);
    expect(framesOnLane({ ...format, absent: 4 })).toBe(60);
    expect(framesOnLane({ ...format, absent: 9 })).toBe(0);
  });

  it('doubles when one lane is left', () => expect(framesOnOneLane(format)).toBe(240));

  it('counts what is done from game and frame, never more than all', () => {
    expect(framesDone(format, 1, 1)).toBe(0);
    expect(framesDone(format, 1, 6)).toBe(20);
    expect(framesDone(format, 3, 1)).toBe(80);
    expect(framesDone(format, 5, 1)).toBe(120);
  });
});
