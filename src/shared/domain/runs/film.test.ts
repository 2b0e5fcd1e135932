import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { classifyRatio, exitBoard, filmDifference, filmRatio } from './film-facts.ts';
import { boardProfile, filmCells, filmMap, filmTotal, footProfile } from './film.ts';
import { boardFromIndex, BOARDS, mirrored, type Pass } from './pattern.ts';
import { cleanerVolume, patternVolume } from './volume.ts';

const anyPass: fc.Arbitrary<Pass> = fc
  .record({
    direction: fc.constantFrom('outbound', 'return'), product: fc.constantFrom('A', 'B'),
    loads: fc.integer({ min: 0, max: 8 }), ul: fc.integer({ min: 1, max: 90 }),
    left: fc.integer({ min: 1, max: BOARDS }), width: fc.integer({ min: 0, max: BOARDS }),
    from: fc.integer({ min: 0, max: 399 }), long: fc.integer({ min: 1, max: 400 }),
  })
  .map(({ left, width, from, long, direction, product, loads, ul }) => {
    const [near, far] = [from / 10, Math.min(400, from + long) / 10];
    const feet = direction === 'return' ? { fromFt: far, toFt: near } : { fromFt: near, toFt: far };
    return { direction, product, loads, ul, fromBoard: boardFromIndex(left), toBoard: boardFromIndex(Math.min(BOARDS, left + width)), ...feet };
  });
const anyPattern = fc.array(anyPass, { minLength: 1, maxLength: 12 }).map((passes) => ({ lengthFt: 40, passes }));

describe('film map', () => {
  it('holds exactly what the passes lay, whatever step and model', () => {
    fc.assert(
      fc.property(anyPattern, fc.constantFrom(0.1, 0.5, 1, 3, 7), fc.constantFrom('even', 'crossing'), (pattern, stepFt, model) => {
        const map = filmMap(pattern, { stepFt, model: model as 'even' });
        const volume = patternVolume(pattern);
        expect(filmTotal(map)).toBe(volume.totalUl * 1000);
        for (const product of ['A', 'B'] as const) expect(filmTotal(map, { product })).toBe(volume.byProduct[product] * 1000);
        for (const direction of ['outbound', 'return'] as const) expect(filmTotal(map, { direction })).toBe(volume.byDirection[direction] * 1000);
        expect(Math.min(...filmCells(map))).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 150 },
    );
  });

  it('gives each board the loads × µL of the passes that cover it, in both models', () => {
    fc.assert(
      fc.property(anyPattern, (pattern) => {
        const even = boardProfile(filmMap(pattern));
        expect(boardProfile(filmMap(pattern, { model: 'crossing' }))).toEqual(even);
        const mirror = boardProfile(filmMap({ ...pattern, passes: pattern.passes.map(mirrored) }));
        expect(mirror).toEqual([...even].reverse());
      }),
      { numRuns: 100 },
    );
  });

  it('spreads evenly over the feet, and by crossings where asked', () => {
    const pass: Pass = { direction: 'outbound', product: 'A', loads: 1, ul: 39, fromBoard: { side: 'L', n: 1 }, toBoard: { side: 'R', n: 1 }, fromFt: 0, toFt: 39 };
    const even = filmMap({ lengthFt: 40, passes: [pass] });
    expect(footProfile(even)).toEqual([...new Array<number>(39).fill(39_000), 0]);
    const crossing = filmCells(filmMap({ lengthFt: 40, passes: [pass] }, { model: 'crossing' }));
    for (let row = 0; row < 39; row += 1) for (let board = 0; board < BOARDS; board += 1) expect(crossing[row * BOARDS + board]).toBe(row === board ? 39_000 : 0);
    const back = filmCells(filmMap({ lengthFt: 40, passes: [{ ...pass, direction: 'return', fromFt: 39, toFt: 0 }] }, { model: 'crossing' }));
    expect(back[38 * BOARDS]).toBe(39_000);
  });

  it('adds nothing for a travel pass', () => {
    const travel: Pass = { direction: 'outbound', product: 'A', loads: 0, ul: 40, fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, fromFt: 10, toFt: 40 };
    expect(filmMap({ lengthFt: 40, passes: [travel] }).layers).toEqual([]);
  });
});

describe('facts of a film', () => {
  const flat = new Array<number>(BOARDS).fill(100);

  it('compares inside with each outside apart', () => {
    expect(filmRatio(flat)).toMatchObject({ left: 1, right: 1 });
    const house = flat.map((nl, i) => (i < 10 ? nl : i >= 29 ? nl * 2 : nl * 10));
    expect(filmRatio(house)).toEqual({ inside: 1000, outsideLeft: 100, outsideRight: 200, left: 10, right: 5 });
    expect(classifyRatio(filmRatio(house), 4)).toEqual({ kind: 'above', verified: false });
    expect(classifyRatio(filmRatio(flat), 3).kind).toBe('within');
    expect(classifyRatio(filmRatio(flat.map((nl, i) => (i < 10 ? 0 : nl))), 3).kind).toBe('dry-outside');
  });

  it('knows the rule of 31 inside its range only', () => {
    expect([34.9, 35, 41, 48, 48.1].map(exitBoard)).toEqual([null, 4, 10, 17, null]);
  });

  it('says what a second revision lays more', () => {
    const pass: Pass = { direction: 'outbound', product: 'A', loads: 1, ul: 40, fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, fromFt: 0, toFt: 40 };
    const second = { lengthFt: 42, passes: [pass, { ...pass, product: 'B' as const, fromBoard: { side: 'L' as const, n: 10 }, toBoard: { side: 'L' as const, n: 11 }, toFt: 20 }] };
    const difference = filmDifference({ lengthFt: 40, passes: [pass] }, second);
    expect(difference).toMatchObject({ lengthFt: 2, totalUl: 80, byProductUl: { A: 0, B: 80 } });
    expect(difference.boards.flatMap((nl, i) => (nl === 0 ? [] : [[i + 1, nl]]))).toEqual([[10, 40_000], [11, 40_000]]);
    expect(difference.feet.slice(0, 20).every((nl) => nl === 4000)).toBe(true);
    expect(difference.feet.slice(20).every((nl) => nl === 0)).toBe(true);
  });

  it('shares cleaner by its zones without losing a microlitre', () => {
    const zones = [{ fromFt: 0, toFt: 30, ulPerFt: 800, waterParts: 4 }, { fromFt: 30, toFt: 62.5, ulPerFt: 601, waterParts: 0 }];
    const volume = cleanerVolume({ cleanerZones: zones });
    expect(volume.byZone[0]).toEqual({ mixUl: 24_000, concentrateUl: 4_800, waterUl: 19_200 });
    expect(volume.mixUl).toBe(volume.concentrateUl + volume.waterUl);
    expect(volume.byZone[1]).toEqual({ mixUl: 19_533, concentrateUl: 19_533, waterUl: 0 });
  });
});
