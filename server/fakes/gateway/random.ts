/** A stream of numbers that is the same for the same words: demo nights repeat exactly. */
export interface Random {
  /** Uniform in [0, 1). */
  next(): number;
  /** Whole number from `low` to `high`, both included. */
  whole(low: number, high: number): number;
  /** True with this probability. */
  chance(probability: number): boolean;
  pick<T>(list: readonly T[]): T;
  /** Log-normal by its median and spread (σ of the logarithm). */
  around(median: number, spread: number): number;
}

/** Seeded by FNV-1a of the words, drawn by mulberry32 (both public domain; quality is ample for a demo). */
export function random(...words: (string | number)[]): Random {
  let state = 0x811c9dc5;
  for (const char of words.join('/')) state = Math.imul(state ^ char.charCodeAt(0), 0x01000193) >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const normal = (): number => Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next());
  return {
    next,
    whole: (low, high) => low + Math.floor(next() * (high - low + 1)),
    chance: (probability) => next() < probability,
    pick: (list) => list[Math.floor(next() * list.length)] as (typeof list)[number],
    around: (median, spread) => median * Math.exp(spread * normal()),
  };
}
