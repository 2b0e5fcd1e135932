/**
 * Splits an integer total by integer weights: floor of each share, then one more to the largest
 * remainders, the first of equals first (Hamilton's method). The parts always add up to the total.
 * Exact while total × weight stays below 2^53: 90 mL in nL over 60 ft fits 1,000 times.
 */
export function splitByWeights(total: number, weights: readonly number[]): number[] {
  const sum = weights.reduce((a, b) => a + b, 0);
  if (sum <= 0) throw new RangeError('weights must add up to more than 0');
  const remainders: { at: number; rest: number }[] = [];
  let given = 0;
  const parts = weights.map((weight, at) => {
    if (weight === 0) return 0;
    const rest = (total * weight) % sum;
    const share = (total * weight - rest) / sum;
    remainders.push({ at, rest });
    given += share;
    return share;
  });
  remainders.sort((a, b) => b.rest - a.rest || a.at - b.at);
  for (const { at } of remainders.slice(0, total - given)) parts[at] = (parts[at] ?? 0) + 1;
  return parts;
}
