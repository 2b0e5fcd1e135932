import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits: nothing to guess, so a plain SHA-256 keeps it. */
const KEY_BYTES = 32;

/** A new gateway key. The prefix lets people and scanners see what it is. */
export const newKey = (): string => `lwg_${randomBytes(KEY_BYTES).toString('base64url')}`;

export const hashOfKey = (key: string): Buffer => createHash('sha256').update(key).digest();
