import { createHash, randomBytes } from 'node:crypto';

/** 32 random bytes as text for URLs and cookies: 256 bits, so that a plain hash of it is enough at rest. */
export const newToken = (): string => randomBytes(32).toString('base64url');

/** What the database keeps of a secret: whoever reads the database can't use it. */
export const hashSecret = (secret: string): Buffer => createHash('sha256').update(secret, 'utf8').digest();
