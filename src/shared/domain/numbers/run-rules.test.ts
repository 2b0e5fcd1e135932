import { describe, expect, it } from 'vitest';
import { nelsonRules, oneSide, westernElectricRules } from './run-rules.ts';

/** Each series fires exactly the rule it is named after, at its last point. */
const minimal: Record<keyof typeof nelsonRules, number[]> = {
  1: [0.5, -0.5, 3.2],
  2: [0.5, 0.4, 0.6, 0.3, 0.7, 0.2, 0.8, 0.4, 0.5],
  3: [-0.8, -0.5, -0.2, 0.1, 0.4, 0.7],
  4: [0.5, -0.5, 0.6, -0.4, 0.5, -0.6, 0.4, -0.5, 0.5, -0.3, 0.6, -0.5, 0.4, -0.4],
  5: [2.3, 0.1, 2.4],
  6: [1.2, 1.3, 0.2, 1.4, 1.5],
  7: [0.2, 0.3, -0.4, -0.1, 0.5, 0.1, -0.6, -0.2, 0.3, 0.4, -0.5, -0.3, 0.6, 0.2, -0.1],
  8: [1.5, -1.5, 1.2, -1.3, -1.6, 1.4, 1.1, -1.2],
};
const numbers = [1, 2, 3, 4, 5, 6, 7, 8] as const;

describe('Nelson’s rules', () => {
  it.each(numbers)('rule %i fires on its own series only, at the last point, and on its mirror image', (rule) => {
    for (const z of [minimal[rule], minimal[rule].map((value) => -value)]) {
      const fired = numbers.filter((other) => nelsonRules[other](z).length > 0);
      expect(fired).toEqual([rule]);
      expect(nelsonRules[rule](z)).toEqual([z.length - 1]);
      expect(nelsonRules[rule](z.slice(0, -1))).toEqual([]);
      expect(nelsonRules[rule](z.slice(1))).toEqual(rule === 1 ? [z.length - 2] : []);
    }
  });

  it('take a limit itself as not beyond', () => {
    expect(nelsonRules[1]([3, -3, 3.0001])).toEqual([2]);
    expect(nelsonRules[5]([2, 2, 2])).toEqual([]);
    expect(nelsonRules[6]([1, 1, 1, 1, 1])).toEqual([]);
    expect(nelsonRules[7](minimal[7].map((value, i) => (i === 4 ? 1 : value)))).toEqual([]);
    expect(nelsonRules[8](minimal[8].map((value, i) => (i === 4 ? -1 : value)))).toEqual([]);
    expect(nelsonRules[2]([1, 1, 1, 1, 0, 1, 1, 1, 1])).toEqual([]);
    expect(nelsonRules[3]([1, 2, 3, 3, 4, 5, 6])).toEqual([]);
  });

  it('go on firing while the run lasts', () => {
    expect(oneSide([1, 1, 1, 1, 1, -1, -1, -1], 3)).toEqual([2, 3, 4, 7]);
    expect(nelsonRules[3]([7, 6, 5, 4, 3, 2, 1, 2])).toEqual([5, 6]);
  });

  it('do not take eight points on one side for avoiding the centre', () => {
    expect(nelsonRules[8]([1.5, 1.5, 1.5, 1.5, 1.5, 1.5, 1.5, 1.5])).toEqual([]);
  });
});

describe('Western Electric rules', () => {
  it('want eight on one side where Nelson wants nine', () => {
    const eight = minimal[2].slice(0, 8);
    expect(westernElectricRules[4](eight)).toEqual([7]);
    expect(nelsonRules[2](eight)).toEqual([]);
  });
});
