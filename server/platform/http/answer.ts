import { isDeepStrictEqual } from 'node:util';
import * as z from 'zod/mini';
import type { Contract } from '#shared/contracts/contract.ts';

/**
 * What goes out: the result as its contract describes it. Fields that the contract doesn't name never leave; where `strict` (tests)
 * they are an error, as is an answer that doesn't fit, always.
 */
export function answerOf(contract: Contract, result: unknown, strict: boolean): string | null {
  const parsed = z.safeParse(contract.response, result ?? null);
  if (!parsed.success) throw new Error(`${contract.id}: the answer doesn't fit its contract: ${JSON.stringify(parsed.error.issues)}`);
  const json = parsed.data === null ? null : JSON.stringify(parsed.data);
  if (strict && !isDeepStrictEqual(JSON.parse(json ?? 'null'), JSON.parse(JSON.stringify(result ?? null)))) {
    throw new Error(`${contract.id}: the answer has fields that its contract doesn't name: ${surplus(parsed.data, result).join(', ')}`);
  }
  return json;
}

function surplus(kept: unknown, given: unknown, at = ''): string[] {
  if (typeof given !== 'object' || given === null) return [];
  const known = (typeof kept === 'object' && kept !== null ? kept : {}) as Record<string, unknown>;
  return Object.entries(given).flatMap(([name, value]) => (name in known ? surplus(known[name], value, `${at}/${name}`) : [`${at}/${name}`]));
}
