/**
 * A root of a continuous function between two points at which its signs differ, to the last digits of a double:
 * Ridders' method (IEEE Transactions on Circuits and Systems 26 (1979) 979–980), which never leaves the bracket.
 * @throws RangeError if the signs don't differ.
 */
export function findRoot(f: (x: number) => number, from: number, to: number): number {
  let [a, b] = [from, to];
  let [fa, fb] = [f(a), f(b)];
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (!(fa * fb < 0)) throw new RangeError('the signs at both ends must differ');
  let last = Number.NaN;
  for (let step = 0; step < 200; step += 1) {
    const middle = a + (b - a) / 2;
    const fm = f(middle);
    const root = Math.sqrt(fm * fm - fa * fb);
    if (fm === 0 || root === 0) return middle;
    const x = middle + ((middle - a) * Math.sign(fa - fb) * fm) / root;
    const fx = f(x);
    if (fx === 0 || Math.abs(x - last) <= 2 * Number.EPSILON * Math.abs(x)) return x;
    last = x;
    const before = b - a;
    if (fm * fx < 0) [a, fa, b, fb] = middle < x ? [middle, fm, x, fx] : [x, fx, middle, fm];
    else if (fa * fx < 0) [b, fb] = [x, fx];
    else [a, fa] = [x, fx];
    if (b - a <= 4 * Number.EPSILON * Math.max(Math.abs(a), Math.abs(b)) || b - a === before) return x;
  }
  return a + (b - a) / 2;
}
