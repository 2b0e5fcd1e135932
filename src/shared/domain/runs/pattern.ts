/** Boards of a lane, numbered 1 (leftmost) to 39 (rightmost) inside the program. */
export const BOARDS = 39;

export type Side = 'L' | 'R';
export type Direction = 'outbound' | 'return';
export type Product = 'A' | 'B';

export const DIRECTIONS: readonly Direction[] = ['outbound', 'return'];
export const PRODUCTS: readonly Product[] = ['A', 'B'];

/** A board as the trade names it: counted from the left (`2L`) or the right channel (`2R`). */
export interface BoardCode {
  side: Side;
  n: number;
}

/**
 * One travel of the machine over part of the lane.
 * Board ranges run from left to right. Feet are in the order of travel: an outbound pass has
 * `fromFt < toFt`, a return pass `fromFt > toFt`; feet may have tenths.
 */
export interface Pass {
  direction: Direction;
  fromBoard: BoardCode;
  toBoard: BoardCode;
  /** Crossings of the oil head; 0 means travel or buff only. */
  loads: number;
  /** Conditioner a board and load, µL, integer. */
  ul: number;
  product: Product;
  fromFt: number;
  toFt: number;
  /** Travel speed in tenths of an inch a second, integer (180 = 18 in/s): the trade speaks of in/s. */
  speed?: number;
  /** Buffer speed, revolutions a minute. */
  rpm?: number;
}

/** Cleaner over part of the lane, foul line first. */
export interface CleanerZone {
  fromFt: number;
  toFt: number;
  /** Ready-mixed cleaner, µL a foot of lane, integer. */
  ulPerFt: number;
  /** Parts of water to one part of concentrate, integer; 0 is undiluted or pre-mixed. */
  waterParts: number;
}

/** What a revision of a pattern says; it never changes once a run has used it. */
export interface PatternRevision {
  lengthFt: number;
  passes: readonly Pass[];
  cleanerZones?: readonly CleanerZone[];
}

/** Board number 1–39 from the left; a code outside the lane gives a number outside 1–39. */
export function boardIndex(code: BoardCode): number {
  return code.side === 'L' ? code.n : BOARDS + 1 - code.n;
}

/** Reads `2L`, `12r`; null when it isn't a board code. Whether the board exists is a rule (rules.ts). */
export function parseBoard(text: string): BoardCode | null {
  const match = /^\s*(\d{1,3})\s*([LRlr])\s*$/.exec(text);
  if (!match?.[1] || !match[2]) return null;
  return { n: Number(match[1]), side: match[2].toUpperCase() === 'L' ? 'L' : 'R' };
}

export function formatBoard(code: BoardCode): string {
  return `${code.n}${code.side}`;
}

/** The code of board 1–39, from the nearer channel; the middle board is `20L`. */
export function boardFromIndex(index: number): BoardCode {
  return index <= (BOARDS + 1) / 2 ? { side: 'L', n: index } : { side: 'R', n: BOARDS + 1 - index };
}

/** Boards from aL to bR: 39 − (a−1) − (b−1); one-sided ranges too. 0 when the range crosses itself. */
export function boardsCovered(pass: Pick<Pass, 'fromBoard' | 'toBoard'>): number {
  return Math.max(0, boardIndex(pass.toBoard) - boardIndex(pass.fromBoard) + 1);
}

/** The same pass seen in a mirror: left and right exchanged. */
export function mirrored(pass: Pass): Pass {
  const turn = (code: BoardCode): BoardCode => ({ n: code.n, side: code.side === 'L' ? 'R' : 'L' });
  return { ...pass, fromBoard: turn(pass.toBoard), toBoard: turn(pass.fromBoard) };
}
