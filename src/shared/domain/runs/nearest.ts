import { BOARDS, boardIndex, boardsCovered, type Pass, type PatternRevision } from './pattern.ts';
import { searchNearest } from './nearest-search.ts';
import { passVolume } from './volume.ts';

export interface NearestOptions {
  maxLoads: number;
  /** Search nodes before the best so far is returned unproven. */
  maxNodes?: number;
}

export interface NearestPattern {
  revision: PatternRevision;
  /** Per board 1–39, µL: laid by the nearest less asked. */
  differenceUl: number[];
  /** Sum of the squared differences, µL². */
  squaredError: number;
  /** False when the search was cut off: a closer one may exist. */
  proven: boolean;
}

const covers = (pass: Pass, board: number): boolean => boardIndex(pass.fromBoard) <= board && board <= boardIndex(pass.toBoard);

/** µL per board 1–39 of some passes. */
export function askedPerBoard(passes: readonly Pass[]): number[] {
  return Array.from({ length: BOARDS }, (_, i) => passes.reduce((sum, pass) => sum + (covers(pass, i + 1) ? pass.loads * pass.ul : 0), 0));
}

/**
 * The nearest pattern that a machine with one volume (`machineUl` µL a board and load) can lay: every
 * pass keeps its boards, feet and direction, and gets the whole number of loads that together bring
 * the per-board profile closest in the least-squares sense. Among equals: each pass nearest to its
 * own volume. Passes that lay nothing stay as they are.
 */
export function nearestPattern(revision: PatternRevision, machineUl: number, options: NearestOptions): NearestPattern {
  const oiling = revision.passes.filter((pass) => passVolume(pass) > 0);
  const asked = askedPerBoard(oiling);
  const found = searchNearest({
    columns: oiling.map((pass) => Array.from({ length: BOARDS }, (_, i) => (covers(pass, i + 1) ? 1 : 0))),
    target: asked,
    own: oiling.map((pass) => pass.loads * pass.ul),
    unit: machineUl,
    max: options.maxLoads,
    maxNodes: options.maxNodes ?? 200_000,
  });
  let next = 0;
  const passes = revision.passes.map((pass) => {
    if (boardsCovered(pass) === 0 || passVolume(pass) === 0) return pass;
    const loads = found.loads[next] ?? 0;
    next += 1;
    return { ...pass, loads, ul: machineUl };
  });
  const laid = askedPerBoard(passes);
  const differenceUl = laid.map((ul, i) => ul - (asked[i] ?? 0));
  return { revision: { ...revision, passes }, differenceUl, squaredError: differenceUl.reduce((sum, d) => sum + d * d, 0), proven: found.proven };
}
