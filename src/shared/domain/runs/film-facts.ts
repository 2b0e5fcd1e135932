import { BOARDS } from './pattern.ts';
import { boardProfile, filmMap, footProfile, type FilmMap } from './film.ts';
import type { PatternRevision } from './pattern.ts';
import { patternVolume } from './volume.ts';

/** Outside is channel to board 10; inside lies between the second arrows (boards 11 to 29). */
export const OUTSIDE_BOARDS = 10;

export interface FilmRatio {
  /** Mean nL a board. */
  inside: number;
  outsideLeft: number;
  outsideRight: number;
  /** Inside ÷ outside of that side; null where the outside is dry. */
  left: number | null;
  right: number | null;
}

const mean = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / Math.max(1, values.length);
const over = (inside: number, outside: number): number | null => (outside === 0 ? null : inside / outside);

/** Inside-to-outside ratio, each side apart, over the whole length ("10:1" = ten times as much in the middle). */
export function filmRatio(profile: readonly number[]): FilmRatio {
  const inside = mean(profile.slice(OUTSIDE_BOARDS, BOARDS - OUTSIDE_BOARDS));
  const outsideLeft = mean(profile.slice(0, OUTSIDE_BOARDS));
  const outsideRight = mean(profile.slice(BOARDS - OUTSIDE_BOARDS));
  return { inside, outsideLeft, outsideRight, left: over(inside, outsideLeft), right: over(inside, outsideRight) };
}

export interface RatioClass {
  kind: 'within' | 'above' | 'dry-outside';
  /** Published limits differ (3:1, 4:1): the limit is a centre's setting, never a certificate. */
  verified: false;
}

/** Both sides against a sport ratio set by the centre. */
export function classifyRatio(ratio: FilmRatio, sportRatio: number): RatioClass {
  if (ratio.left === null || ratio.right === null) return { kind: 'dry-outside', verified: false };
  return { kind: Math.max(ratio.left, ratio.right) <= sportRatio ? 'within' : 'above', verified: false };
}

/** Rule of 31 (common practice): exit board ≈ length − 31; null outside 35–48 ft, where it isn't used. */
export function exitBoard(lengthFt: number): number | null {
  return lengthFt >= 35 && lengthFt <= 48 ? lengthFt - 31 : null;
}

/** µL on a board-foot of a map's cell, for units.ts. */
export const ulPerBoardFoot = (map: FilmMap, nl: number): number => nl / 1000 / map.stepFt;

export interface FilmDifference {
  lengthFt: number;
  /** µL, second less first. */
  totalUl: number;
  byProductUl: { A: number; B: number };
  /** nL per board 1–39 and per foot, second less first. */
  boards: number[];
  feet: number[];
}

/** What the second revision lays more (+) or less (−) than the first. */
export function filmDifference(first: PatternRevision, second: PatternRevision): FilmDifference {
  const [mapA, mapB] = [filmMap(first), filmMap(second)];
  const [volA, volB] = [patternVolume(first), patternVolume(second)];
  const [feetA, feetB] = [footProfile(mapA), footProfile(mapB)];
  const boardsA = boardProfile(mapA);
  return {
    lengthFt: second.lengthFt - first.lengthFt,
    totalUl: volB.totalUl - volA.totalUl,
    byProductUl: { A: volB.byProduct.A - volA.byProduct.A, B: volB.byProduct.B - volA.byProduct.B },
    boards: boardProfile(mapB).map((nl, i) => nl - (boardsA[i] ?? 0)),
    feet: Array.from({ length: Math.max(feetA.length, feetB.length) }, (_, i) => (feetB[i] ?? 0) - (feetA[i] ?? 0)),
  };
}
