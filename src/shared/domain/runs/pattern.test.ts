import { describe, expect, it } from 'vitest';
import { BOARDS, boardFromIndex, boardIndex, boardsCovered, formatBoard, parseBoard, type BoardCode } from './pattern.ts';

const range = (from: string, to: string) => ({ fromBoard: parseBoard(from) as BoardCode, toBoard: parseBoard(to) as BoardCode });

describe('board codes', () => {
  it('are read, written and numbered from the left', () => {
    expect(parseBoard(' 2l ')).toEqual({ side: 'L', n: 2 });
    expect(boardIndex({ side: 'L', n: 2 })).toBe(2);
    expect(boardIndex({ side: 'R', n: 2 })).toBe(38);
    expect(boardIndex({ side: 'L', n: 20 })).toBe(boardIndex({ side: 'R', n: 20 }));
    for (const bad of ['', 'L2', '2', '2M', '2.5L', '-2L']) expect(parseBoard(bad)).toBeNull();
    for (let i = 1; i <= BOARDS; i += 1) expect(boardIndex(parseBoard(formatBoard(boardFromIndex(i))) as BoardCode)).toBe(i);
  });

  it('cover 39 − (a−1) − (b−1) boards', () => {
    const table: [string, string, number][] = [['2L', '2R', 37], ['5L', '5R', 31], ['8L', '8R', 25], ['10L', '10R', 21], ['11L', '11R', 19], ['15L', '15R', 11], ['2L', '12L', 11], ['9R', '2R', 8]];
    for (const [from, to, boards] of table) expect(boardsCovered(range(from, to))).toBe(boards);
    expect(boardsCovered(range('25L', '25R'))).toBe(0);
  });
});
