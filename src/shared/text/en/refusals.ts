import { refusals as accounts } from './accounts.ts';
import { refusals as calls } from './calls.ts';
import { refusals as centre } from './centre.ts';
import { refusals as floor } from './floor.ts';
import { fields, refusals as http } from './http.ts';
import { refusals as ingest } from './ingest.ts';
import { refusals as leagues } from './leagues.ts';
import { refusals as numbers } from './numbers.ts';
import { refusals as readiness } from './readiness.ts';
import { refusals as runs } from './runs.ts';
import type { CodeParams, Sentences } from './sentences.ts';

/** Every code and its sentence. Each slice's text file adds its own `refusals`. */
const ALL: readonly Sentences[] = [http, accounts, calls, centre, floor, ingest, leagues, numbers, readiness, runs];

const sentences: Sentences = Object.assign({}, ...ALL) as Sentences;

export const knowsRefusal = (code: string): boolean => Object.hasOwn(sentences, code);

/** What to tell people about a code. A code without a sentence is said as it is; a test sees to it that there is none. */
export function refusalSentence(code: string, params: CodeParams = {}): string {
  return Object.hasOwn(sentences, code) ? (sentences[code]?.(params) ?? code) : code;
}

/** What to say beside a field: a general rule, or the code of a slice. */
export function fieldSentence(code: string, params: CodeParams = {}): string {
  return Object.hasOwn(fields, code) ? (fields[code]?.(params) ?? code) : refusalSentence(code, params);
}
