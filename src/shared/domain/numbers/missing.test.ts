import { expect, it } from 'vitest';
import { isMissing, missing } from './missing.ts';

it('tells a missing figure from every other result', () => {
  expect(isMissing(missing('no-frames'))).toBe(true);
  expect([{ value: null, low: 1 }, { value: 0 }, null, undefined, 0, { reason: 'x', value: 1 }].some(isMissing)).toBe(false);
});
