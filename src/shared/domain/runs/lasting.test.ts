import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { willItLast, type LaneUse } from './lasting.ts';

const lanes = (n: number, use: LaneUse['use']): LaneUse[] => Array.from({ length: n }, (_, i) => ({ lane: i + 1, use }));

describe('will it last', () => {
  it('names the lane before which each store runs out, and one stop for all', () => {
    const result = willItLast(
      { tankA: { level: 100_000, capacity: 500_000, reserve: 10_000 }, battery: { level: 10_000, capacity: 10_000, reserve: 2_000 }, waste: { level: 900_000, capacity: 900_000 } },
      lanes(16, { tankA: 20_000, battery: 700, waste: 40_000 }),
    );
    expect(result.runsOut).toEqual({ tankA: { lane: 5, at: 4, short: 10_000 }, battery: { lane: 12, at: 11, short: 400 } });
    expect(result.refills).toEqual([{ lane: 5, at: 4, because: ['tankA'] }, { lane: 16, at: 15, because: ['battery'] }]);
    expect(result.levelsAfter).toEqual({ tankA: 480_000, battery: 9_300, waste: 860_000 });
  });

  it('says what no refill cures', () => {
    const result = willItLast({ tankA: { level: 5, capacity: 10 } }, lanes(2, { tankA: 12 }));
    expect(result.impossible).toEqual([{ lane: 1, store: 'tankA', need: 12, holds: 10 }, { lane: 2, store: 'tankA', need: 12, holds: 10 }]);
    expect(result.refills).toEqual([]);
  });

  it('never stops more often than the best of all ways to stop', () => {
    const uses = fc.array(fc.tuple(fc.integer({ min: 0, max: 6 }), fc.integer({ min: 0, max: 6 })), { minLength: 1, maxLength: 9 });
    fc.assert(
      fc.property(uses, fc.integer({ min: 0, max: 10 }), (list, level) => {
        const order = list.map(([a, b], i) => ({ lane: i + 1, use: { tankA: a, cleaner: b } }));
        const stores = { tankA: { level, capacity: 10 }, cleaner: { level: 8, capacity: 12 } };
        let fewest = Infinity;
        for (let mask = 0; mask < 1 << order.length; mask += 1) {
          let [a, b, stops, fine] = [level, 8, 0, true];
          order.forEach(({ use }, i) => {
            if (mask & (1 << i)) [a, b, stops] = [10, 12, stops + 1];
            a -= use.tankA;
            b -= use.cleaner;
            fine &&= a >= 0 && b >= 0;
          });
          if (fine) fewest = Math.min(fewest, stops);
        }
        expect(willItLast(stores, order).refills.length).toBe(fewest);
      }),
      { numRuns: 150 },
    );
  });
});
