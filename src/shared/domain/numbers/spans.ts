/** A stretch of time [from, to) in UTC epoch milliseconds. One whose end isn't after its start is empty. */
export type Span = { from: number; to: number };

/**
 * The moments covered by any of the spans: sorted, apart from each other, none empty. Spans that touch become one.
 * @throws RangeError if an end isn't a number.
 */
export function union(...lists: (readonly Span[])[]): Span[] {
  const sorted: Span[] = [];
  for (const list of lists) {
    for (const span of list) {
      if (Number.isNaN(span.from) || Number.isNaN(span.to)) throw new RangeError('a span must have a start and an end');
      if (span.to > span.from) sorted.push(span);
    }
  }
  sorted.sort((a, b) => a.from - b.from);
  const merged: Span[] = [];
  let last: Span | undefined;
  for (const span of sorted) {
    if (last !== undefined && span.from <= last.to) {
      if (span.to > last.to) last.to = span.to;
    } else {
      last = { from: span.from, to: span.to };
      merged.push(last);
    }
  }
  return merged;
}

/** The list itself when it is sorted, disjoint and without empty spans already, else its union. */
function tidy(list: readonly Span[]): readonly Span[] {
  let end = Number.NEGATIVE_INFINITY;
  for (const { from, to } of list) {
    if (!(from > end && to > from)) return union(list);
    end = to;
  }
  return list;
}

/** The moments covered by both. */
export function intersect(left: readonly Span[], right: readonly Span[]): Span[] {
  const a = tidy(left);
  const b = tidy(right);
  const common: Span[] = [];
  for (let i = 0, j = 0; i < a.length && j < b.length; ) {
    const one = a[i] as Span;
    const two = b[j] as Span;
    const from = Math.max(one.from, two.from);
    const to = Math.min(one.to, two.to);
    if (to > from) common.push({ from, to });
    if (one.to < two.to) i += 1;
    else j += 1;
  }
  return common;
}

/** The moments covered by the first and not by the second. */
export function subtract(spans: readonly Span[], holes: readonly Span[]): Span[] {
  const cut = tidy(holes);
  const left: Span[] = [];
  let next = 0;
  for (const span of tidy(spans)) {
    let from = span.from;
    while (next < cut.length && (cut[next] as Span).to <= from) next += 1;
    for (let k = next; k < cut.length && (cut[k] as Span).from < span.to; k += 1) {
      const hole = cut[k] as Span;
      if (hole.from > from) left.push({ from, to: hole.from });
      from = Math.max(from, hole.to);
    }
    if (span.to > from) left.push({ from, to: span.to });
  }
  return left;
}

/** The part of the spans inside one window. */
export function clip(spans: readonly Span[], window: Span): Span[] {
  return intersect(spans, [window]);
}

/** Milliseconds covered: of the union, so that overlaps count once. */
export function total(spans: readonly Span[]): number {
  return tidy(spans).reduce((sum, span) => sum + (span.to - span.from), 0);
}

/** The window cut into cells of `step` milliseconds from its start; the last may be shorter. */
export function cells(window: Span, step: number): Span[] {
  if (!(step > 0)) throw new RangeError(`step must be above 0, got ${step}`);
  const parts: Span[] = [];
  for (let from = window.from; from < window.to; from += step) parts.push({ from, to: Math.min(from + step, window.to) });
  return parts;
}
