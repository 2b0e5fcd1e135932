import { fieldSentence, refusalSentence } from '#shared/text/en/refusals.ts';
import { Problem } from './api.ts';

/** What happened and what to do, for whatever a `call` threw; null stays null. */
export function sentenceOf(error: unknown): string | null {
  if (error === null || error === undefined) return null;
  if (!(error instanceof Problem)) return refusalSentence('unexpected', { request: '–' });
  if (error.code.startsWith('http.')) return refusalSentence('network.away');
  return refusalSentence(error.code, error.retryAfter === null ? error.params : { retryAfterS: error.retryAfter, ...error.params });
}

/** What stands beside the field `name` of a form (its path in the body: `to`, `passes/0/length`). */
export function fieldSentenceOf(error: unknown, name: string): string | null {
  const field = error instanceof Problem ? error.field(name) : null;
  return field ? fieldSentence(field.code, field.params) : null;
}
