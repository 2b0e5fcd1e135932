import type { Fact } from './fact.ts';

export type FactKey = Pick<Fact, 'time' | 'source' | 'id'>;

/**
 * Order of two strings by their UTF-8 bytes. JavaScript's `<` compares UTF-16 units and puts
 * U+E000–U+FFFF after the astral planes; code points compare as UTF-8 bytes do (RFC 3629 §1).
 */
export function compareUtf8(a: string, b: string): number {
  const shorter = Math.min(a.length, b.length);
  for (let i = 0; i < shorter; i++) {
    if (a.charCodeAt(i) !== b.charCodeAt(i)) {
      const start = i > 0 && isLow(a.charCodeAt(i)) && isLow(b.charCodeAt(i)) ? i - 1 : i;
      return (a.codePointAt(start) ?? 0) - (b.codePointAt(start) ?? 0);
    }
  }
  return a.length - b.length;
}

const isLow = (unit: number): boolean => unit >= 0xdc00 && unit <= 0xdfff;

/** The one order of facts: time to the millisecond, then source, then id, both as UTF-8 bytes. */
export function compareFacts(a: FactKey, b: FactKey): number {
  return a.time - b.time || compareUtf8(a.source, b.source) || compareUtf8(a.id, b.id);
}
