import { parse, stringify, v7, version } from 'uuid';

/** A new UUIDv7 as text. `at` (epoch ms) places it in time; without it, now, in order even within a millisecond. */
export function newId(at?: number): string {
  return at === undefined ? v7() : v7({ msecs: at });
}

/** Text to the 16 bytes of a `binaryId` column; throws a TypeError when it isn't a UUID. */
export function toBinary(id: string): Buffer {
  return Buffer.from(parse(id));
}

/** The 16 bytes of a `binaryId` column to lower-case text. */
export function fromBinary(bytes: Uint8Array): string {
  return stringify(bytes);
}

/** Is this the text of one of our ids? Ask before `toBinary` when the text comes from outside. */
export function isId(text: string): boolean {
  try {
    return version(text) === 7;
  } catch {
    return false;
  }
}
