import { describe, expect, it } from 'vitest';
import { lowerBound } from '#shared/domain/runs/plan/bound.ts';
import { compile } from '#shared/domain/runs/plan/compile.ts';
import { firstSolution, improve } from '#shared/domain/runs/plan/improve.ts';
import { LATE_SESSION } from '#shared/domain/runs/plan/problem.ts';
import { makePlan } from '#shared/domain/runs/plan/plan.ts';
import { bestByEnumeration } from './enumerate.ts';
import { MIN, smallNight } from './nights.ts';
import { brokenPromises } from './promises.ts';

const SIZES = [[1, 1], [2, 1], [2, 2], [3, 1], [3, 2], [3, 3], [4, 1], [4, 2], [4, 3], [5, 1], [5, 2], [4, 2]] as const;
const shapeOf = (night: number) => {
  const [blocks, machines] = SIZES[night % SIZES.length]!;
  return { blocks, machines, extras: Math.floor(night / SIZES.length) % 2 === 0 };
};

// Every order, sharing and choice of stops is played minute by minute by code of its own (enumerate.ts).
describe('2,000 small nights against enumeration', () => {
  it.each([0, 1, 2, 3])('quarter %i: all five criteria equal, the bound below, every promise kept', (quarter) => {
    let [late, impossible] = [0, 0];
    for (let night = quarter * 500 + 1; night <= (quarter + 1) * 500; night += 1) {
      const input = smallNight(night, shapeOf(night));
      const best = bestByEnumeration(input);
      const plan = makePlan(input);
      if (!best) {
        impossible += 1;
        expect([night, plan.unplanned.length > 0]).toEqual([night, true]);
        continue;
      }
      if (plan.unplanned.length > 0) throw new Error(`night ${night}: a plan exists, none was found`);
      const { sessionsLate, latenessMs, freshnessLostMs, travelMs, changes } = plan.criteria;
      expect([night, { sessionsLate, lateness: latenessMs / MIN, freshness: freshnessLostMs / MIN, travel: travelMs / MIN, changes }]).toEqual([night, best]);
      expect([night, brokenPromises(input, plan)]).toEqual([night, []]);
      const bound = lowerBound(compile(input));
      expect(bound.sessionsLate * LATE_SESSION + bound.lateness).toBeLessThanOrEqual(sessionsLate * LATE_SESSION + latenessMs / 1000);
      expect(bound.latenessOfAny).toBeLessThanOrEqual(latenessMs / 1000);
      late += sessionsLate > 0 ? 1 : 0;
    }
    expect(late).toBeGreaterThan(100);
    expect(impossible).toBeLessThan(30);
  }, 60_000);

  it('the search for big nights never claims less than the best, and reaches it on most small ones', () => {
    let reached = 0;
    for (let night = 1; night <= 240; night += 1) {
      const input = smallNight(night, { ...shapeOf(night), extras: false });
      const problem = compile(input);
      const bound = lowerBound(problem);
      const found = improve(problem, firstSolution(problem, bound)!, 2000);
      const { sessionsLate, latenessMs } = makePlan(input).criteria;
      const best = sessionsLate * LATE_SESSION + latenessMs / 1000;
      expect(found.primary).toBeGreaterThanOrEqual(best);
      if (found.primary === best) reached += 1;
    }
    expect(reached).toBeGreaterThan(220);
  }, 60_000);
});
