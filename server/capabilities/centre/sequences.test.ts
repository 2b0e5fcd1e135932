import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { heardNumber, type SequenceState } from './sequences.ts';

const heard = (...numbers: number[]): SequenceState | undefined => numbers.reduce<SequenceState | undefined>(heardNumber, undefined);

describe('numbers of a source', () => {
  it('names what was skipped', () => {
    expect(heard(1040, 1044)).toEqual({ seen: 1044, missing: [[1041, 1043]] });
  });

  it('takes a late one out of its gap', () => {
    expect(heard(1, 6, 3)).toEqual({ seen: 6, missing: [[2, 2], [4, 5]] });
    expect(heard(1, 3, 2)).toEqual({ seen: 3, missing: [] });
  });

  it('takes no notice of one heard before', () => {
    expect(heard(1, 2, 2, 1)).toEqual({ seen: 2, missing: [] });
  });

  it('misses nothing once all have come, in any order after the first', () => {
    fc.assert(fc.property(fc.shuffledSubarray([2, 3, 4, 5, 6, 7, 8, 9], { minLength: 8 }), (rest) => {
      expect(heard(1, ...rest)).toEqual({ seen: 9, missing: [] });
    }));
  });
});
