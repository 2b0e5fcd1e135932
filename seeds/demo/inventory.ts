import type { MachineCapability } from '#shared/domain/runs/capability.ts';
import { type Direction, parseBoard, type Pass, type PatternRevision, type Product } from '#shared/domain/runs/pattern.ts';

/** Machines and patterns of the demo's house. All figures are invented. */

const common = {
  oils: true, cleans: true, deckTreatment: false, headBoards: { first: 2, last: 38 }, maxLengthFt: 52, tailOffFt: 2, maxPasses: 30, maxLoads: 9,
  buffer: { minRpm: 100, maxRpm: 700 }, travel: { speeds: [100, 140, 180, 220, 260] }, patterns: 'hand' as const,
};

export const CAPABILITIES: Record<string, MachineCapability> = {
  heron: { ...common, products: ['A', 'B'], volume: { kind: 'per-load', minUl: 30, maxUl: 60, stepUl: 5 }, cleaner: { kind: 'on-board', maxWaterParts: 10, maxZones: 3 }, moves: 'walks', battery: true },
  wren: { ...common, products: ['A'], volume: { kind: 'fixed', ul: 50 }, cleaner: { kind: 'premixed', waterParts: 5 }, moves: 'is-moved', battery: false },
};

type Line = readonly [boards: string, loads: number, from: number, to: number, product?: Product, ul?: number];

function passes(direction: Direction, ul: number, lines: readonly Line[]): Pass[] {
  return lines.map(([boards, loads, fromFt, toFt, product = 'A', own = ul]) => {
    const [left, right] = boards.split(' ').map((text) => parseBoard(text));
    if (!left || !right) throw new Error(`no boards: ${boards}`);
    return { direction, fromBoard: left, toBoard: right, loads, ul: own, product, fromFt, toFt, speed: loads > 2 ? 140 : 180, rpm: 500 };
  });
}

/** Revisions of each pattern, oldest first; the last one is in use. */
export interface InventedPattern {
  code: string;
  name: string;
  revisions: PatternRevision[];
}

const revised = (lengthFt: number, out: (step: number) => Line[], back: (step: number) => Line[], ul = 50): PatternRevision[] =>
  [2, 1, 0].map((step) => ({ lengthFt, passes: [...passes('outbound', ul, out(step)), ...passes('return', ul, back(step))] }));

export const PATTERNS: InventedPattern[] = [
  {
    code: 'house', name: 'House', revisions: revised(41,
      (s) => [['2L 2R', 2, 0, 4], ['5L 5R', 2, 4, 9], ['8L 8R', 3 + (s % 2), 9, 16], ['10L 10R', 4, 16, 24], ['2L 2R', 0, 24, 41]],
      (s) => [['2L 2R', 0, 41, 34], ['10L 10R', 3, 34, 26], ['11L 11R', 4 - (s > 1 ? 1 : 0), 26, 17], ['12L 12R', 3, 17, 9], ['2L 2R', 0, 9, 0]]),
  },
  {
    code: 'millrace', name: 'Millrace', revisions: revised(43,
      (s) => [['2L 2R', 3, 0, 8], ['3L 3R', 2, 8, 14], ['5L 5R', 2, 14, 21, 'B', 40], ['2L 2R', 1 + (s % 2), 21, 28], ['2L 2R', 0, 28, 43]],
      (s) => [['2L 2R', 0, 43, 36], ['4L 4R', 2, 36, 27], ['6L 6R', 2, 27, 18, 'B', 40], ['9L 9R', 2 + (s > 1 ? 1 : 0), 18, 8], ['2L 2R', 0, 8, 0]], 45),
  },
  {
    code: 'night-owls', name: 'Night Owls', revisions: revised(40,
      (s) => [['2L 2R', 2, 0, 6], ['4L 4R', 3, 6, 13], ['7L 7R', 3, 13, 20, 'B', 45], ['9L 9R', 3 + (s % 2), 20, 27], ['2L 2R', 0, 27, 40]],
      (s) => [['2L 2R', 0, 40, 33], ['9L 9R', 3, 33, 24], ['11L 11R', 3 - (s > 1 ? 1 : 0), 24, 12, 'B', 45], ['2L 2R', 0, 12, 0]]),
  },
  {
    code: 'lock-gate', name: 'Lock Gate', revisions: revised(38,
      (s) => [['2L 2R', 2, 0, 5], ['6L 6R', 3, 5, 12], ['8L 8R', 3, 12, 19], ['2L 2R', 0 + (s % 2), 19, 24], ['2L 2R', 0, 24, 38]],
      (s) => [['2L 2R', 0, 38, 31], ['8L 8R', 3, 31, 22], ['10L 10R', 4 - (s > 1 ? 1 : 0), 22, 12], ['2L 2R', 0, 12, 0]]),
  },
];
