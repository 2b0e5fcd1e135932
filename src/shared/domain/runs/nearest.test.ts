import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { askedPerBoard, nearestPattern } from './nearest.ts';
import { boardFromIndex, BOARDS, boardIndex, type Pass } from './pattern.ts';

const passOf = (left: number, right: number, loads: number, ul: number): Pass => ({
  direction: 'outbound', product: 'A', loads, ul, fromBoard: boardFromIndex(left), toBoard: boardFromIndex(right), fromFt: 0, toFt: 30,
});
const somePass = fc
  .tuple(fc.integer({ min: 1, max: 30 }), fc.integer({ min: 0, max: 20 }), fc.integer({ min: 1, max: 3 }), fc.integer({ min: 20, max: 70 }))
  .map(([left, width, loads, ul]) => passOf(left, Math.min(BOARDS, left + width), loads, ul));

/** Every combination of loads, by counting. */
function exhaustive(passes: readonly Pass[], unit: number, max: number): number {
  const asked = askedPerBoard(passes);
  const loads = new Array<number>(passes.length).fill(0);
  let best = Infinity;
  for (;;) {
    const error = asked.reduce((sum, ul, board) => {
      const laid = passes.reduce((a, p, j) => a + (boardIndex(p.fromBoard) <= board + 1 && board + 1 <= boardIndex(p.toBoard) ? (loads[j] ?? 0) * unit : 0), 0);
      return sum + (laid - ul) ** 2;
    }, 0);
    best = Math.min(best, error);
    let j = 0;
    while (j < loads.length && loads[j] === max) loads[j++] = 0;
    if (j === loads.length) return best;
    loads[j] = (loads[j] ?? 0) + 1;
  }
}

describe('the nearest pattern for a machine with one volume', () => {
  it('is as near as trying every combination of loads finds', () => {
    fc.assert(
      fc.property(fc.array(somePass, { minLength: 1, maxLength: 4 }), fc.integer({ min: 25, max: 60 }), (passes, unit) => {
        const nearest = nearestPattern({ lengthFt: 40, passes }, unit, { maxLoads: 4 });
        expect(nearest.proven).toBe(true);
        expect(nearest.squaredError).toBe(exhaustive(passes, unit, 4));
        expect(nearest.revision.passes.every((pass) => pass.ul === unit && pass.loads <= 4)).toBe(true);
      }),
      { numRuns: 120 },
    );
  });

  it('keeps each of two equal ranges near its own volume', () => {
    const { revision, squaredError } = nearestPattern({ lengthFt: 40, passes: [passOf(5, 35, 1, 40), passOf(5, 35, 3, 40)] }, 40, { maxLoads: 9 });
    expect(revision.passes.map((pass) => pass.loads)).toEqual([1, 3]);
    expect(squaredError).toBe(0);
  });

  it('leaves travel passes alone and shows the difference per board', () => {
    const travel = passOf(2, 38, 0, 0);
    const { revision, differenceUl } = nearestPattern({ lengthFt: 40, passes: [passOf(2, 38, 2, 45), travel] }, 50, { maxLoads: 9 });
    expect(revision.passes).toEqual([passOf(2, 38, 2, 50), travel]);
    expect(differenceUl[0]).toBe(0);
    expect(differenceUl[1]).toBe(10);
  });

  it('handles a long sheet of nested ranges, proven', () => {
    const passes = Array.from({ length: 14 }, (_, i) => passOf(2 + i, 38 - i, 1 + (i % 3), 38 + i));
    expect(nearestPattern({ lengthFt: 40, passes }, 50, { maxLoads: 9 }).proven).toBe(true);
    expect(nearestPattern({ lengthFt: 40, passes }, 50, { maxLoads: 9, maxNodes: 20 }).proven).toBe(false);
  });
});
