import fc from 'fast-check';
import { expect, it } from 'vitest';
import { digamma } from './digamma.ts';
import { logGamma } from './distributions.ts';

it('satisfies ψ(x + 1) = ψ(x) + 1/x and is the slope of ln Γ', () => {
  fc.assert(
    fc.property(fc.double({ min: 0.05, max: 400, noNaN: true }), (x) => {
      expect(digamma(x + 1)).toBeCloseTo(digamma(x) + 1 / x, 11);
      const h = 1e-5 * x;
      expect((logGamma(x + h) - logGamma(x - h)) / (2 * h)).toBeCloseTo(digamma(x), 4);
    }),
  );
  expect(() => digamma(0)).toThrow(RangeError);
});
