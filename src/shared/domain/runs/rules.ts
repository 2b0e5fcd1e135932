import { BOARDS, boardIndex, type BoardCode, type CleanerZone, type Pass, type PatternRevision } from './pattern.ts';

/** Bounds that every pattern keeps; a machine may be narrower (capability.ts). */
export interface PatternLimits {
  minLengthFt: number;
  maxLengthFt: number;
  maxPasses: number;
  maxLoads: number;
  /** µL a board of one load. */
  maxUl: number;
  /** Tenths of in/s. */
  minSpeed: number;
  maxSpeed: number;
  minRpm: number;
  maxRpm: number;
  maxWaterParts: number;
  maxCleanerUlPerFt: number;
  /** Last feet of the pattern in which the machine only buffs: no load may reach into them. */
  tailOffFt: number;
}

/** 60 ft is the head pin: nothing is oiled beyond it. The rest is wider than common practice on purpose. */
export const DEFAULT_PATTERN_LIMITS: PatternLimits = {
  minLengthFt: 10, maxLengthFt: 60, maxPasses: 60, maxLoads: 30, maxUl: 300,
  minSpeed: 20, maxSpeed: 600, minRpm: 50, maxRpm: 1000, maxWaterParts: 50, maxCleanerUlPerFt: 20_000, tailOffFt: 0,
};

export type PatternProblemCode =
  | 'pattern.length-out-of-range' | 'pattern.no-passes' | 'pattern.too-many-passes'
  | 'pass.direction-unknown' | 'pass.outbound-after-return' | 'pass.product-missing'
  | 'pass.board-out-of-range' | 'pass.boards-crossed'
  | 'pass.feet-out-of-range' | 'pass.feet-beyond-length' | 'pass.feet-against-direction' | 'pass.feet-empty' | 'pass.into-tail-off'
  | 'pass.loads-out-of-range' | 'pass.load-volume-out-of-range' | 'pass.speed-out-of-range' | 'pass.rpm-out-of-range'
  | 'zone.feet-out-of-range' | 'zone.feet-reversed' | 'zone.overlap' | 'zone.ratio-out-of-range' | 'zone.volume-out-of-range';

export interface PatternProblem {
  code: PatternProblemCode;
  /** `pass` and `zone` count from 1, as people do. */
  place: { pass?: number; zone?: number; field: string };
  params?: { min?: number; max?: number };
}

type Found = Omit<PatternProblem, 'place'> & { field: string };

const within = (value: number, min: number, max: number) => value >= min && value <= max;
const whole = (value: number, min: number, max: number) => Number.isInteger(value) && within(value, min, max);
const tenths = (ft: number) => Number.isFinite(ft) && Math.abs(ft * 10 - Math.round(ft * 10)) < 1e-9;
const ranged = (code: PatternProblemCode, field: string, min: number, max: number): Found => ({ code, field, params: { min, max } });

const boardProblem = (code: BoardCode, field: string): Found[] =>
  whole(code.n, 1, BOARDS) && (code.side === 'L' || code.side === 'R') ? [] : [ranged('pass.board-out-of-range', field, 1, BOARDS)];

function boardProblems(pass: Pass): Found[] {
  const outside = [...boardProblem(pass.fromBoard, 'fromBoard'), ...boardProblem(pass.toBoard, 'toBoard')];
  if (outside.length > 0) return outside;
  return boardIndex(pass.fromBoard) > boardIndex(pass.toBoard) ? [{ code: 'pass.boards-crossed', field: 'toBoard' }] : [];
}

function feetProblems(pass: Pass, lengthFt: number, limits: PatternLimits): Found[] {
  const found: Found[] = [];
  const max = Math.min(limits.maxLengthFt, lengthFt);
  for (const field of ['fromFt', 'toFt'] as const) {
    const ft = pass[field];
    if (!tenths(ft) || !within(ft, 0, limits.maxLengthFt)) found.push(ranged('pass.feet-out-of-range', field, 0, limits.maxLengthFt));
    else if (ft > max) found.push(ranged('pass.feet-beyond-length', field, 0, max));
  }
  if (found.length > 0) return found;
  const ahead = pass.direction === 'return' ? pass.fromFt - pass.toFt : pass.toFt - pass.fromFt;
  if (ahead < 0) return [{ code: 'pass.feet-against-direction', field: 'toFt' }];
  if (ahead === 0) return [{ code: 'pass.feet-empty', field: 'toFt' }];
  const free = lengthFt - limits.tailOffFt;
  if (pass.loads > 0 && Math.max(pass.fromFt, pass.toFt) > free + 1e-9) {
    return [ranged('pass.into-tail-off', pass.direction === 'return' ? 'fromFt' : 'toFt', 0, free)];
  }
  return [];
}

function amountProblems(pass: Pass, limits: PatternLimits): Found[] {
  const found: Found[] = [];
  if (!whole(pass.loads, 0, limits.maxLoads)) found.push(ranged('pass.loads-out-of-range', 'loads', 0, limits.maxLoads));
  const least = pass.loads > 0 ? 1 : 0;
  if (!whole(pass.ul, least, limits.maxUl)) found.push(ranged('pass.load-volume-out-of-range', 'ul', least, limits.maxUl));
  if (pass.product !== 'A' && pass.product !== 'B') found.push({ code: 'pass.product-missing', field: 'product' });
  if (pass.speed !== undefined && !whole(pass.speed, limits.minSpeed, limits.maxSpeed)) {
    found.push(ranged('pass.speed-out-of-range', 'speed', limits.minSpeed, limits.maxSpeed));
  }
  if (pass.rpm !== undefined && !whole(pass.rpm, limits.minRpm, limits.maxRpm)) {
    found.push(ranged('pass.rpm-out-of-range', 'rpm', limits.minRpm, limits.maxRpm));
  }
  return found;
}

function orderProblems(pass: Pass, before: readonly Pass[]): Found[] {
  if (pass.direction !== 'outbound' && pass.direction !== 'return') return [{ code: 'pass.direction-unknown', field: 'direction' }];
  const late = pass.direction === 'outbound' && before.some((earlier) => earlier.direction === 'return');
  return late ? [{ code: 'pass.outbound-after-return', field: 'direction' }] : [];
}

function zoneProblems(zone: CleanerZone, before: CleanerZone | undefined, limits: PatternLimits): Found[] {
  const found: Found[] = [];
  for (const field of ['fromFt', 'toFt'] as const) {
    if (!tenths(zone[field]) || !within(zone[field], 0, limits.maxLengthFt + 3)) {
      found.push(ranged('zone.feet-out-of-range', field, 0, limits.maxLengthFt + 3));
    }
  }
  if (found.length === 0 && zone.fromFt >= zone.toFt) found.push({ code: 'zone.feet-reversed', field: 'toFt' });
  if (before && zone.fromFt < before.toFt) found.push({ code: 'zone.overlap', field: 'fromFt' });
  if (!whole(zone.waterParts, 0, limits.maxWaterParts)) found.push(ranged('zone.ratio-out-of-range', 'waterParts', 0, limits.maxWaterParts));
  if (!whole(zone.ulPerFt, 1, limits.maxCleanerUlPerFt)) found.push(ranged('zone.volume-out-of-range', 'ulPerFt', 1, limits.maxCleanerUlPerFt));
  return found;
}

function wholeProblems(revision: PatternRevision, limits: PatternLimits): Found[] {
  const found: Found[] = [];
  const { lengthFt, passes } = revision;
  if (!tenths(lengthFt) || !within(lengthFt, limits.minLengthFt, limits.maxLengthFt)) {
    found.push(ranged('pattern.length-out-of-range', 'lengthFt', limits.minLengthFt, limits.maxLengthFt));
  }
  if (passes.length === 0) found.push({ code: 'pattern.no-passes', field: 'passes' });
  if (passes.length > limits.maxPasses) found.push(ranged('pattern.too-many-passes', 'passes', 1, limits.maxPasses));
  return found;
}

/**
 * Every contradiction of a revision, each with a code and its place; empty means it may be saved.
 * Cleaner may run to the end of the pin deck (about 63 ft), conditioner never beyond the pattern's length.
 */
export function validatePattern(revision: PatternRevision, limits: PatternLimits = DEFAULT_PATTERN_LIMITS): PatternProblem[] {
  const problems: PatternProblem[] = [];
  const add = (found: Found[], where: { pass?: number; zone?: number }) => {
    for (const { field, ...rest } of found) problems.push({ ...rest, place: { ...where, field } });
  };
  add(wholeProblems(revision, limits), {});
  revision.passes.forEach((pass, i) => {
    const found = [
      ...orderProblems(pass, revision.passes.slice(0, i)),
      ...boardProblems(pass),
      ...feetProblems(pass, revision.lengthFt, limits),
      ...amountProblems(pass, limits),
    ];
    add(found, { pass: i + 1 });
  });
  const zones = revision.cleanerZones ?? [];
  zones.forEach((zone, i) => add(zoneProblems(zone, zones[i - 1], limits), { zone: i + 1 }));
  return problems;
}
