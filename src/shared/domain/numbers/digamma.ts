import { demandPositive } from './demand.ts';

/**
 * ψ(x) = d ln Γ(x)/dx for x > 0: recurrence up to 12, then the asymptotic series
 * (Abramowitz and Stegun, Handbook of Mathematical Functions, 6.3.5 and 6.3.18).
 */
export function digamma(x: number): number {
  demandPositive('x', x);
  let shift = 0;
  let y = x;
  while (y < 12) {
    shift -= 1 / y;
    y += 1;
  }
  const q = 1 / (y * y);
  const series = q * (1 / 12 - q * (1 / 120 - q * (1 / 252 - q * (1 / 240 - q * (1 / 132 - q * (691 / 32760))))));
  return shift + Math.log(y) - 1 / (2 * y) - series;
}
