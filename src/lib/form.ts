import { zodResolver } from '@hookform/resolvers/zod';
import type { FieldValues, Path, Resolver, UseFormSetError } from 'react-hook-form';
import type * as z from 'zod/mini';
import { fieldSentence } from '#shared/text/en/refusals.ts';
import { Problem } from './api.ts';

/** Checks a form by the schema of its contract; zod's own words become ours, field by field. */
export function formResolver<In extends FieldValues, Out>(schema: z.ZodMiniType<Out, In>): Resolver<In, unknown, Out> {
  return zodResolver(schema, { error: (issue) => sentenceOf(issue) });
}

type Raw = { code?: string; input?: unknown; minimum?: unknown; maximum?: unknown; origin?: unknown };

/** What stands beside a field before anything is sent; the server says the same about what it gets. */
function sentenceOf({ code, input, minimum, maximum, origin }: Raw): string {
  const empty = input === undefined || input === null || input === '' || Number.isNaN(input);
  if (empty && code !== 'invalid_union') return fieldSentence('field.required');
  if (code === 'too_small') return fieldSentence(origin === 'string' ? 'field.too-short' : origin === 'array' ? 'field.too-few' : 'field.too-small', { min: String(minimum) });
  if (code === 'too_big') return fieldSentence(origin === 'string' ? 'field.too-long' : origin === 'array' ? 'field.too-many' : 'field.too-large', { max: String(maximum) });
  return fieldSentence(code === 'invalid_format' ? 'field.format' : 'field.invalid');
}

/** Puts the fields that the server refused beside their controls; false when it named none that the form has. */
export function showRefusedFields<In extends FieldValues>(error: unknown, names: readonly Path<In>[], setError: UseFormSetError<In>): boolean {
  if (!(error instanceof Problem)) return false;
  const shown = names.filter((name) => {
    const field = error.field(name.replaceAll('.', '/'));
    if (field) setError(name, { type: 'server', message: fieldSentence(field.code, field.params) }, { shouldFocus: true });
    return field !== null;
  });
  return shown.length > 0;
}
