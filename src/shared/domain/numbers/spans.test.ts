import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cells, clip, intersect, subtract, total, union, type Span } from './spans.ts';

const spans = fc.array(fc.record({ from: fc.integer({ min: 0, max: 60 }), to: fc.integer({ min: 0, max: 60 }) }), { maxLength: 12 });
const moments = Array.from({ length: 60 }, (_, i) => i);
const covers = (list: readonly Span[], t: number): boolean => list.some((span) => span.from <= t && t < span.to);

describe('union', () => {
  it('joins what overlaps or touches and drops what is empty or inverted', () => {
    expect(union([{ from: 5, to: 8 }, { from: 1, to: 3 }, { from: 3, to: 4 }, { from: 9, to: 9 }, { from: 12, to: 10 }])).toEqual([
      { from: 1, to: 4 },
      { from: 5, to: 8 },
    ]);
  });

  it('is idempotent, free of order, and covers exactly what was covered', () => {
    fc.assert(
      fc.property(spans, (list) => {
        const once = union(list);
        expect(union(once)).toEqual(once);
        expect(union([...list].reverse())).toEqual(once);
        expect(moments.filter((t) => covers(once, t))).toEqual(moments.filter((t) => covers(list, t)));
        for (let i = 1; i < once.length; i += 1) expect(once[i]!.from).toBeGreaterThan(once[i - 1]!.to);
      }),
    );
  });

  it('leaves its input alone and refuses a span without an end', () => {
    const input = [{ from: 0, to: 2 }, { from: 1, to: 5 }];
    union(input);
    expect(input).toEqual([{ from: 0, to: 2 }, { from: 1, to: 5 }]);
    expect(() => union([{ from: 0, to: Number.NaN }])).toThrow(RangeError);
  });
});

describe('intersect, subtract, clip, total', () => {
  it('agree with a count moment by moment', () => {
    fc.assert(
      fc.property(spans, spans, (a, b) => {
        const both = intersect(a, b);
        const rest = subtract(a, b);
        expect(moments.filter((t) => covers(both, t))).toEqual(moments.filter((t) => covers(a, t) && covers(b, t)));
        expect(moments.filter((t) => covers(rest, t))).toEqual(moments.filter((t) => covers(a, t) && !covers(b, t)));
        expect(total(both) + total(rest)).toBe(total(a));
        expect(total(a)).toBe(moments.filter((t) => covers(a, t)).length);
        expect(union(both)).toEqual(both);
        expect(union(rest)).toEqual(rest);
      }),
    );
  });

  it('clips to a half-open window', () => {
    expect(clip([{ from: 0, to: 10 }], { from: 10, to: 20 })).toEqual([]);
    expect(clip([{ from: 0, to: 12 }, { from: 18, to: 40 }], { from: 10, to: 20 })).toEqual([
      { from: 10, to: 12 },
      { from: 18, to: 20 },
    ]);
  });
});

describe('cells', () => {
  it('tile the window', () => {
    expect(cells({ from: 0, to: 25 }, 10)).toEqual([{ from: 0, to: 10 }, { from: 10, to: 20 }, { from: 20, to: 25 }]);
    expect(() => cells({ from: 0, to: 25 }, 0)).toThrow(RangeError);
  });
});
