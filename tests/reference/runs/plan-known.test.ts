import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { makePlan } from '#shared/domain/runs/plan/plan.ts';
import type { PlanInput } from '#shared/domain/runs/plan/model.ts';

interface Job {
  r: number;
  p: number;
  d: number;
}

const MIN = 60_000;

/** A textbook instance as a night: one machine, no travel, a job is a lane of a session of its own; `slack` loosens every due. */
function night(jobs: readonly Job[], slack = 0): PlanInput {
  return {
    now: 0, marginMs: 0,
    machines: [{ id: 'M', availableFrom: 0, atLane: null, loadedPattern: 'p', loadedProduct: 'x', travel: { fixedMs: 0, perLaneMs: 0 }, patternChangeMs: 0, productChangeMs: 0, services: [], stores: {} }],
    blocks: jobs.map(({ r, p, d }, j) => ({ id: `${j + 1}`, sessionId: `${j + 1}`, lanes: [{ lane: 1, release: r * MIN }], warmUp: (d + slack) * MIN, pattern: 'p', product: 'x', perLaneMs: { M: p * MIN } })),
  };
}

const jobs = (r: number[], p: number[], d: number[]): Job[] => p.map((time, j) => ({ r: r[j] ?? 0, p: time, d: d[j]! }));
const late = (list: readonly Job[], slack = 0) => {
  const { sessionsLate, latenessMs } = makePlan(night(list, slack)).criteria;
  return [sessionsLate, latenessMs / MIN];
};
/** Least Lmax: with that much slack nobody is late, with one less somebody is. */
const isLmax = (list: readonly Job[], lmax: number): void => {
  expect(late(list, lmax)).toEqual([0, 0]);
  expect(late(list, lmax - 1)[0]).toBeGreaterThan(0);
};

describe('one-machine instances with a known optimum', () => {
  // Carlier 1982, EJOR 11: 42–47, heads and tails; optimum 50, in due dates (50 − q) Lmax 0.
  it('Carlier: 50 in heads and tails', () => {
    const tails = [7, 26, 24, 21, 8, 17, 0];
    isLmax(jobs([10, 13, 11, 20, 30, 0, 30], [5, 6, 7, 4, 3, 6, 2], tails.map((q) => 50 - q)), 0);
  });

  // Pinedo, Scheduling, branch and bound for 1|r|Lmax: optimum 5, order 1-3-4-2 alone reaches it.
  it('Pinedo: Lmax 5', () => {
    const list = jobs([0, 1, 3, 5], [4, 2, 6, 5], [8, 12, 11, 10]);
    isLmax(list, 5);
    expect(makePlan(night(list, 5)).machines[0]?.blocks.map((b) => b.block)).toEqual(['1', '3', '4', '2']);
  });

  // Moore and Hodgson's rule, Pinedo's example (data from memory): two late jobs at least.
  it('Moore and Hodgson: two late', () => {
    expect(late(jobs([], [7, 8, 4, 6, 6], [9, 17, 18, 19, 21]))[0]).toBe(2);
  });

  // Total tardiness, Pinedo's example (data from memory): optimum 370, with two late, the fewest possible.
  it('total tardiness: 370', () => {
    expect(late(jobs([], [121, 79, 147, 83, 130], [260, 266, 266, 336, 337]))).toEqual([2, 370]);
  });

  // Jackson's rule: without releases the order of due dates has the least Lmax.
  it('Jackson: earliest due first', () => {
    isLmax(jobs([], [4, 2, 6, 3, 5], [9, 5, 22, 12, 16]), -2);
    const job = fc.record({ r: fc.constant(0), p: fc.integer({ min: 1, max: 9 }), d: fc.integer({ min: 10, max: 40 }) });
    fc.assert(
      fc.property(fc.array(job, { minLength: 1, maxLength: 7 }), (list) => {
        let [end, lmax] = [0, -Infinity];
        for (const { p, d } of [...list].sort((a, b) => a.d - b.d)) lmax = Math.max(lmax, (end += p) - d);
        isLmax(list, lmax);
      }),
      { numRuns: 40 },
    );
  }, 30_000);
});
