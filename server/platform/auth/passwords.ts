import { hash, verify } from '@node-rs/argon2';
import { randomInt } from 'node:crypto';

/** Argon2id (the package's default) with OWASP's first choice for it: 19 MiB, two passes, one lane (Password Storage Cheat Sheet). */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const PASSWORD_MIN = 12;
/** Hashing is bounded by memory, not by length; this only keeps a body from being a burden. */
export const PASSWORD_MAX = 200;

export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'), COST);

let nobodysHash: Promise<string> | undefined;

/**
 * Does the password fit? Without a hash (no such account) it works as long and says no, so that the time of the answer doesn't tell
 * which accounts exist.
 */
export async function verifyPassword(stored: string | null, password: string): Promise<boolean> {
  nobodysHash ??= hashPassword('nobody has this password');
  const fits = await verify(stored ?? (await nobodysHash), password.normalize('NFKC'));
  return fits && stored !== null;
}

/** No characters that are taken for one another: passwords are read off a screen once. */
const ALPHABET = 'abcdefghjkmnpqrstuvwxyz23456789';
const GROUPS = 4;
const GROUP_LENGTH = 5;

/** Four groups of five out of 31 characters: 99 bits. */
export function randomPassword(): string {
  const group = () => Array.from({ length: GROUP_LENGTH }, () => ALPHABET[randomInt(ALPHABET.length)]).join('');
  return Array.from({ length: GROUPS }, group).join('-');
}

/** Beginnings of the long passwords that every list of leaked ones has (from memory of such lists), letters and digits only. */
const COMMON = ['password', 'passw0rd', 'qwerty', 'qwertz', 'azerty', '123456', '111111', '000000', 'abc123', 'iloveyou', 'letmein', 'welcome', 'admin', 'monkey', 'dragon', 'football', 'baseball', 'sunshine', 'princess', 'trustno1', 'changeme', 'superman', 'bowling', 'lanewright'];
/** Such words are forgiven when at least this much is left beside them. */
const REST_MIN = 8;
const DIFFERENT_MIN = 5;

/** What makes a password too easy to guess, or null. `about`: the person's name and address, which guessers try first. */
export function weaknessOf(password: string, about: readonly string[]): 'password.too-short' | 'password.too-common' | 'password.about-you' | null {
  if ([...password].length < PASSWORD_MIN) return 'password.too-short';
  const plain = password.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
  if (new Set(plain).size < DIFFERENT_MIN || isRun(plain)) return 'password.too-common';
  if (isMadeOf(plain, COMMON)) return 'password.too-common';
  const words = about.flatMap((text) => text.toLowerCase().split(/[^\p{L}\p{N}]+/u)).filter((word) => word.length >= 4);
  return isMadeOf(plain, words) ? 'password.about-you' : null;
}

function isMadeOf(plain: string, words: readonly string[]): boolean {
  const rest = words.reduce((left, word) => left.replaceAll(word, ''), plain);
  return rest !== plain && rest.length < REST_MIN;
}

/** 123456789012, abcdefghijkl: every character follows the one before. */
function isRun(text: string): boolean {
  const steps = [...text].slice(1).map((c, at) => (c.codePointAt(0) ?? 0) - (text.codePointAt(at) ?? 0));
  return steps.filter((step) => Math.abs(step) <= 1).length > steps.length * 0.8;
}
