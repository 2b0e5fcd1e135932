import { describe, expect, it } from 'vitest';
import { type BoardLayout, DESK, deskFace, heightsOf, layoutBoard, numberSize, spanIn, WALL, wallFace } from './board-layout.ts';

/** Width left for the plan at each screen, and lanes of a house. */
const CASES = [8, 16, 24, 32, 33, 40, 48, 64].flatMap((lanes) => [560, 1084, 1536, 1860].map((width) => [lanes, width] as const));

function marks(bank: BoardLayout['banks'][number]): { from: number; to: number }[] {
  return [...bank.strips, ...bank.returns].map((m) => ({ from: m.x, to: m.x + m.width })).sort((a, b) => a.from - b.from);
}

describe.each(CASES)('%i lanes in %i px', (lanes, width) => {
  const layout = layoutBoard(lanes, width);
  it('draws each lane once, in order', () => {
    expect(layout.banks.flatMap((b) => b.strips.map((s) => s.lane))).toEqual(Array.from({ length: lanes }, (_, i) => i + 1));
  });
  it('no two strips or ball returns overlap, and all stay inside', () => {
    for (const bank of layout.banks) {
      const placed = marks(bank);
      for (let i = 1; i < placed.length; i++) expect(placed[i]!.from).toBeGreaterThanOrEqual(placed[i - 1]!.to);
      expect(placed.at(-1)!.to).toBeLessThanOrEqual(width);
    }
  });
  it('keeps the least width, and lanes of a pair in one bank', () => {
    expect(layout.strip).toBeGreaterThanOrEqual(DESK.minStrip);
    for (const bank of layout.banks) expect(bank.strips[0]!.lane % 2).toBe(1);
  });
});

describe('banks', () => {
  it('32 lanes stand in one bank on a 1440 desk, 64 in two', () => {
    expect([layoutBoard(32, 1084).banks.length, layoutBoard(64, 1084).banks.length, layoutBoard(64, 1536).banks.length]).toEqual([1, 2, 2]);
  });
  it('banks differ by a pair at most', () => {
    expect(layoutBoard(64, 770).banks.map((b) => b.strips.length)).toEqual([22, 22, 20]);
  });
  it('on the wall a strip takes figures of 79 px: 16 lanes a bank at 1080p', () => {
    const wall = layoutBoard(32, 1872, WALL);
    expect([wall.banks.map((b) => b.strips.length), wall.strip >= 96]).toEqual([[16, 16], true]);
  });
  it('an odd house ends with a lane that has no neighbour', () => {
    const last = layoutBoard(33, 1536).banks.at(-1)!;
    expect(last.strips.at(-1)!.lane).toBe(33);
    expect(last.returns.some((r) => r.pair === 33)).toBe(false);
  });
});

describe('heights and bars', () => {
  it('the parts fill the bank, and the lane never vanishes', () => {
    const h = heightsOf(640, deskFace(27, numberSize(27)));
    expect(h.cap + h.deck + h.lane + h.approach + 2 * (h.bar + h.barGap) + 4).toBe(640);
    expect(heightsOf(120, wallFace(113, 1)).lane).toBe(60);
    expect(heightsOf(200, wallFace(113, 4)).bank).toBeLessThanOrEqual(205);
  });
  it('a bar spans its lanes in this bank only', () => {
    const [one, two] = layoutBoard(64, 1084).banks;
    expect(spanIn(one!, 31, 34)!.x).toBe(one!.strips[30]!.x);
    expect(spanIn(two!, 31, 34)!.x).toBe(0);
    expect(spanIn(one!, 40, 44)).toBeNull();
  });
});
