import { expect, it } from 'vitest';
import { paceOf, USUAL_PACE_MS } from './pace.ts';

it('a machine’s own median, in whole milliseconds, the usual pace before it has any', () => {
  expect(paceOf({ paces: { heron: [100_000, 90_000, 103_001, 102_000] } }, 'heron')).toBe(101_000);
  expect(paceOf({ paces: { heron: [100_000, 100_001] } }, 'heron')).toBe(100_001);
  expect(paceOf({ paces: {} }, 'heron')).toBe(USUAL_PACE_MS);
  expect(paceOf({ paces: {} }, 'heron', 90_000)).toBe(90_000);
});
