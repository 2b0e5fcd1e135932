import { demandCount } from './demand.ts';
import { binomialTail } from './distributions.ts';

function demandShare(outside: number): void {
  if (!(outside >= 0 && outside <= 1)) throw new RangeError(`the share outside must lie within 0 and 1, got ${outside}`);
}

/** Of n lanes that are all alike, how many are expected outside limits that leave the given share outside. */
export function expectedOutside(n: number, outside: number): number {
  demandCount('n', n);
  demandShare(outside);
  return n * outside;
}

/** Probability that at least k of n lanes that are all alike lie outside such limits (binomial). */
export function probabilityOfOutside(n: number, outside: number, k = 1): number {
  demandCount('n', n);
  demandCount('k', k);
  demandShare(outside);
  return k === 0 ? 1 : binomialTail(k, n, outside);
}
