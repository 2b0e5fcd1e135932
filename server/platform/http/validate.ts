import * as z from 'zod/mini';
import { Refusal, type FieldRefusal } from './refusal.ts';

type Part = NonNullable<FieldRefusal['in']>;
type Issue = z.core.$ZodIssue;
type Shown = Record<string, string | number>;

/** More fields than this help nobody, and a hostile body shall not buy a large answer. */
const FIELDS_MAX = 20;
/** A check of a contract may name its own code as its message: `range.crossed`. */
const OWN_CODE = /^[a-z][a-z0-9-]*(?:\.[a-z][a-z0-9-]*)+$/;

/** What the schema makes of each part of a request, or a 422 `input.invalid` that names every field. */
export function validate<T>(parts: { [K in keyof T]: { schema: z.ZodMiniType; value: unknown; part: Part } }): T {
  const fields: FieldRefusal[] = [];
  const parsed = {} as T;
  for (const name of Object.keys(parts) as (keyof T)[]) {
    const { schema, value, part } = parts[name];
    const result = z.safeParse(schema, value, { reportInput: true });
    if (result.success) parsed[name] = result.data as T[typeof name];
    else fields.push(...result.error.issues.map((issue) => fieldOf(issue, part)));
  }
  if (fields.length > 0) throw new Refusal(422, 'input.invalid', { fields: fields.length }, fields.slice(0, FIELDS_MAX));
  return parsed;
}

function fieldOf(issue: Issue, part: Part): FieldRefusal {
  return { pointer: pointerOf(issue.path), in: part, ...codeOf(issue) };
}

/** RFC 6901. */
function pointerOf(path: readonly PropertyKey[]): string {
  return path.map((step) => `/${String(step).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

function codeOf(issue: Issue): { code: string; params?: Shown } {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined ? { code: 'field.required' } : { code: 'field.type', params: { expected: String(issue.expected) } };
    case 'too_small':
      return tooSmall(issue);
    case 'too_big':
      return tooBig(issue);
    case 'invalid_value':
      return issue.input === undefined ? { code: 'field.required' } : { code: 'field.choice', params: { allowed: issue.values.map(String).join(', ') } };
    case 'invalid_format':
      return { code: 'field.format' };
    default:
      return { code: OWN_CODE.test(issue.message) ? issue.message : 'field.invalid' };
  }
}

function tooSmall({ origin, minimum }: z.core.$ZodIssueTooSmall): { code: string; params?: Shown } {
  if (origin === 'string') return Number(minimum) === 1 ? { code: 'field.required' } : { code: 'field.too-short', params: { min: Number(minimum) } };
  return { code: origin === 'array' ? 'field.too-few' : 'field.too-small', params: { min: Number(minimum) } };
}

function tooBig({ origin, maximum }: z.core.$ZodIssueTooBig): { code: string; params?: Shown } {
  if (origin === 'string') return { code: 'field.too-long', params: { max: Number(maximum) } };
  return { code: origin === 'array' ? 'field.too-many' : 'field.too-large', params: { max: Number(maximum) } };
}
