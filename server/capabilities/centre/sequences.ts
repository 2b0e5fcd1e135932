/**
 * What a source's own numbering tells (CloudEvents extension `sequence`, integers as text): the highest number heard and
 * the ranges below it that were not. Pure.
 */
export interface SequenceState {
  seen: number;
  /** Inclusive ranges, ascending. */
  missing: [number, number][];
}

/** Ranges kept: beyond that the oldest are forgotten, as they will hardly come any more. */
const RANGES_KEPT = 50;

/** Takes in one number; a source that was never heard begins with it. */
export function heardNumber(state: SequenceState | undefined, number: number): SequenceState {
  if (!state) return { seen: number, missing: [] };
  if (number > state.seen) {
    const gap: [number, number][] = number > state.seen + 1 ? [[state.seen + 1, number - 1]] : [];
    return { seen: number, missing: [...state.missing, ...gap].slice(-RANGES_KEPT) };
  }
  const missing = state.missing.flatMap(([from, to]): [number, number][] => {
    if (number < from || number > to) return [[from, to]];
    const left: [number, number][] = number > from ? [[from, number - 1]] : [];
    return number < to ? [...left, [number + 1, to]] : left;
  });
  return { seen: state.seen, missing };
}
