import { expect, it } from 'vitest';
import { lineage } from './lineage.ts';

it('is frames by ten, parts of a game kept', () => {
  expect(lineage(65)).toBe(6.5);
  expect(() => lineage(-1)).toThrow(RangeError);
});
