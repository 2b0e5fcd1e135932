import gammaln from '@stdlib/math-base-special-gammaln';
import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';

/**
 * Above this argument the library's incomplete gamma function (0.3.1) sums too few terms of one of its series and can be
 * off in the second digit; below it agrees with R to 1e-12. Houses count thousands of stops, so the range matters.
 */
export const LIBRARY_HOLDS_UP_TO = 1000;

/** x^a·e^(−x) ÷ Γ(a + 1), through Stirling's series where a is large, so that huge logarithms don't cancel. */
function leading(a: number, x: number): number {
  if (a < 50) return Math.exp(a * Math.log(x) - x - gammaln(a + 1));
  const away = (x - a) / a;
  const stirling = (1 / 12 - (1 / 360 - 1 / (1260 * a * a)) / (a * a)) / a;
  return Math.exp(-a * (away - Math.log1p(away)) - stirling) / Math.sqrt(2 * Math.PI * a);
}

/** P(X ≤ x) and P(X > x) of a gamma variable with shape a and rate 1, each with its own digits in its own tail. */
export function largeGamma(a: number, x: number): { lower: number; upper: number } {
  const first = leading(a, x);
  let sum = 0;
  if (x < a) {
    // P = leading·Σ xⁿ/((a+1)…(a+n)); the terms fall from the start.
    for (let n = 0, term = 1; term > sum * Number.EPSILON * 0.1; ) {
      sum += term;
      n += 1;
      term *= x / (a + n);
    }
    const lower = Math.min(1, first * sum);
    return { lower, upper: 1 - lower };
  }
  // Q = leading·Σ a(a−1)…(a−n)/xⁿ⁺¹, ended by a whole a, and below e^(−x) before a fraction changes sign.
  for (let n = 0, term = a / x; term > sum * Number.EPSILON * 0.1; ) {
    sum += term;
    n += 1;
    term *= (a - n) / x;
  }
  const upper = Math.min(1, first * sum);
  return { lower: 1 - upper, upper };
}

/**
 * Quantile of that variable: Newton's method on the nearer tail from E. B. Wilson and M. M. Hilferty's cube root
 * (Proceedings of the National Academy of Sciences 17 (1931) 684–688), which is close when a is large.
 */
export function largeGammaQuantile(p: number, a: number): number {
  const z = normalQuantile(p, 0, 1);
  let x = a * (1 - 1 / (9 * a) + z / (3 * Math.sqrt(a))) ** 3;
  for (let step = 0; step < 50; step += 1) {
    const { lower, upper } = largeGamma(a, x);
    const gap = p < 0.5 ? lower - p : 1 - p - upper;
    const move = (gap * x) / (a * leading(a, x));
    x -= move;
    if (Math.abs(move) <= 1e-14 * x) break;
  }
  return x;
}
