import { expect } from 'vitest';

/** Equal within a relative error, 1e-9 unless the source printed fewer digits. */
export function near(actual: number | null | undefined, expected: number, relative = 1e-9): void {
  expect(typeof actual).toBe('number');
  const error = Math.abs((actual as number) - expected) / Math.max(Math.abs(expected), 1e-300);
  expect(error, `${actual} against ${expected}`).toBeLessThanOrEqual(relative);
}
