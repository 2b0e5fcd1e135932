import { createHash } from 'node:crypto';

/** Deeper than any event of ours; a body that nests further is not worth a stack. */
const DEPTH_MAX = 64;

/** JSON with the keys of every object in order, so that the same content gives the same text. Throws RangeError when nested too deep. */
export function canonicalJson(value: unknown, depth = 0): string {
  if (depth > DEPTH_MAX) throw new RangeError('nested too deep');
  if (Array.isArray(value)) return `[${value.map((item) => canonicalJson(item, depth + 1)).join(',')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const object = value as Record<string, unknown>;
  return `{${Object.keys(object).sort().map((key) => `${JSON.stringify(key)}:${canonicalJson(object[key], depth + 1)}`).join(',')}}`;
}

export const contentHash = (value: unknown): Buffer => createHash('sha256').update(canonicalJson(value)).digest();
