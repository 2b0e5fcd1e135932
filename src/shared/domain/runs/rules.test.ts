import { describe, expect, it } from 'vitest';
import type { Pass, PatternRevision } from './pattern.ts';
import { DEFAULT_PATTERN_LIMITS, validatePattern } from './rules.ts';

const pass: Pass = { direction: 'outbound', fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'R', n: 2 }, loads: 2, ul: 50, product: 'A', fromFt: 0, toFt: 20.5 };
const back: Pass = { ...pass, direction: 'return', fromFt: 36, toFt: 4 };
const revision = (change: Partial<PatternRevision> = {}): PatternRevision => ({ lengthFt: 41, passes: [pass, back], ...change });
const withPass = (change: Partial<Pass>) => validatePattern(revision({ passes: [pass, { ...pass, ...change }] }));

describe('rules of a pattern', () => {
  it('accepts what can be laid, travel passes and one-sided ranges too', () => {
    const buff: Pass = { ...pass, loads: 0, ul: 0, fromFt: 20.5, toFt: 41 };
    const oneSided: Pass = { ...pass, fromBoard: { side: 'L', n: 2 }, toBoard: { side: 'L', n: 12 } };
    expect(validatePattern(revision({ passes: [pass, oneSided, buff, back] }))).toEqual([]);
  });

  it('names each contradiction with its place', () => {
    const cases: [Partial<Pass>, string, string][] = [
      [{ toBoard: { side: 'R', n: 40 } }, 'pass.board-out-of-range', 'toBoard'],
      [{ fromBoard: { side: 'L', n: 0 } }, 'pass.board-out-of-range', 'fromBoard'],
      [{ fromBoard: { side: 'L', n: 25 }, toBoard: { side: 'R', n: 25 } }, 'pass.boards-crossed', 'toBoard'],
      [{ toFt: 42 }, 'pass.feet-beyond-length', 'toFt'],
      [{ fromFt: -1 }, 'pass.feet-out-of-range', 'fromFt'],
      [{ toFt: 10.25 }, 'pass.feet-out-of-range', 'toFt'],
      [{ fromFt: 20, toFt: 10 }, 'pass.feet-against-direction', 'toFt'],
      [{ fromFt: 20, toFt: 20 }, 'pass.feet-empty', 'toFt'],
      [{ loads: -1 }, 'pass.loads-out-of-range', 'loads'],
      [{ loads: 1.5 }, 'pass.loads-out-of-range', 'loads'],
      [{ ul: 0 }, 'pass.load-volume-out-of-range', 'ul'],
      [{ ul: 301 }, 'pass.load-volume-out-of-range', 'ul'],
      [{ product: '' as 'A' }, 'pass.product-missing', 'product'],
      [{ speed: 5 }, 'pass.speed-out-of-range', 'speed'],
      [{ rpm: 5 }, 'pass.rpm-out-of-range', 'rpm'],
      [{ direction: 'sideways' as 'return' }, 'pass.direction-unknown', 'direction'],
    ];
    for (const [change, code, field] of cases) {
      expect(withPass(change).map((p) => [p.code, p.place])).toContainEqual([code, { pass: 2, field }]);
    }
  });

  it('refuses 70 ft, no pass, an outbound pass after the way back, oil in the tail-off', () => {
    expect(validatePattern(revision({ lengthFt: 70 }))).toEqual([{ code: 'pattern.length-out-of-range', place: { field: 'lengthFt' }, params: { min: 10, max: 60 } }]);
    expect(validatePattern(revision({ lengthFt: Number.NaN })).map((p) => p.code)).toContain('pattern.length-out-of-range');
    expect(validatePattern(revision({ passes: [] }))[0]?.code).toBe('pattern.no-passes');
    expect(validatePattern(revision({ passes: [back, pass] }))[0]).toMatchObject({ code: 'pass.outbound-after-return', place: { pass: 2 } });
    const limits = { ...DEFAULT_PATTERN_LIMITS, tailOffFt: 6 };
    expect(validatePattern(revision(), limits)).toEqual([{ code: 'pass.into-tail-off', place: { pass: 2, field: 'fromFt' }, params: { min: 0, max: 35 } }]);
  });

  it('checks cleaner zones', () => {
    const codes = (...cleanerZones: NonNullable<PatternRevision['cleanerZones']>) => validatePattern(revision({ cleanerZones })).map((p) => p.code);
    const zone = { fromFt: 0, toFt: 30, ulPerFt: 800, waterParts: 4 };
    expect(codes(zone, { ...zone, fromFt: 30, toFt: 60 })).toEqual([]);
    expect(codes(zone, { ...zone, fromFt: 29, toFt: 60 })).toEqual(['zone.overlap']);
    expect(codes({ ...zone, fromFt: 30, toFt: 0 })).toEqual(['zone.feet-reversed']);
    expect(codes({ ...zone, toFt: 90 })).toEqual(['zone.feet-out-of-range']);
    expect(codes({ ...zone, waterParts: -1, ulPerFt: 0 })).toEqual(['zone.ratio-out-of-range', 'zone.volume-out-of-range']);
  });
});
