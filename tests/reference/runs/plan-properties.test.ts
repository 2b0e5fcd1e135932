import { Temporal } from 'temporal-polyfill';
import { describe, expect, it } from 'vitest';
import { formBlocks } from '#shared/domain/runs/plan/cut.ts';
import type { Criteria, PlanInput } from '#shared/domain/runs/plan/model.ts';
import { gapMs, makePlan } from '#shared/domain/runs/plan/plan.ts';
import { houseNight } from '#tests/bench/nights.ts';
import { MIN, repeatable, smallNight } from './nights.ts';
import { brokenPromises } from './promises.ts';

/** A night in which the way through a lane is never quicker than the way past it. */
function plainNight(seed: number, blocks: number, machines: number): PlanInput {
  const input = smallNight(seed, { blocks, machines, extras: true });
  const perLane = (times: Readonly<Record<string, number>>) => Object.fromEntries(input.machines.map((machine) => [machine.id, times[machine.id] ?? 2 * MIN]));
  return {
    ...input, pins: [],
    machines: input.machines.map((machine) => ({ ...machine, travel: { fixedMs: MIN, perLaneMs: 0 }, stores: {}, services: [] })),
    blocks: input.blocks.map((block) => ({ ...block, usePerLane: {}, perLaneMs: perLane(block.perLaneMs) })),
  };
}

const noWorse = (a: Criteria, b: Criteria): boolean => a.sessionsLate < b.sessionsLate || (a.sessionsLate === b.sessionsLate && a.latenessMs <= b.latenessMs);

describe('properties of the plan', () => {
  it('a lane more never lowers lateness, a looser due never raises it', () => {
    for (let seed = 1; seed <= 150; seed += 1) {
      const input = plainNight(seed, 2 + (seed % 6), 1 + (seed % 3));
      const whole = makePlan(input).criteria;
      const b = repeatable(seed)(input.blocks.length);
      const fewer = input.blocks.flatMap((block, i) => (i !== b ? [block] : block.lanes.length > 1 ? [{ ...block, lanes: block.lanes.slice(1) }] : []));
      expect([seed, noWorse(makePlan({ ...input, blocks: fewer }).criteria, whole)]).toEqual([seed, true]);
      const looser = input.blocks.map((block, i) => (i === b ? { ...block, warmUp: block.warmUp + 7 * MIN } : block));
      expect([seed, noWorse(makePlan({ ...input, blocks: looser }).criteria, whole)]).toEqual([seed, true]);
    }
  }, 60_000);

  it('what can’t matter changes nothing: the order of the input, a name, the clock', () => {
    for (let seed = 1; seed <= 60; seed += 1) {
      const input = smallNight(seed, { blocks: 6, machines: 2, extras: true });
      const plan = makePlan(input);
      expect(makePlan(input)).toEqual(plan);
      expect(makePlan({ ...input, blocks: [...input.blocks].reverse() }).criteria).toEqual(plan.criteria);
      const shift = 86_400_000 * 400;
      const spans = (list: readonly { from: number; to: number }[] = []) => list.map(({ from, to }) => ({ from: from + shift, to: to + shift }));
      const later: PlanInput = {
        ...input, now: input.now + shift,
        machines: input.machines.map((m) => ({ ...m, availableFrom: m.availableFrom + shift, away: spans(m.away) })),
        blocks: input.blocks.map((block) => ({ ...block, warmUp: block.warmUp + shift, closed: spans(block.closed), lanes: block.lanes.map((lane) => ({ ...lane, release: lane.release + shift })) })),
        pins: (input.pins ?? []).map((pin) => (pin.kind === 'start' ? { ...pin, at: pin.at + shift } : pin)),
      };
      expect(makePlan(later).criteria).toEqual(plan.criteria);
    }
  }, 60_000);

  it('keeps its promises on middling and big nights, with an honest gap', () => {
    for (let seed = 1; seed <= 40; seed += 1) {
      const middling = smallNight(seed + 5000, { blocks: 8, machines: 1 + (seed % 3), extras: true });
      const plan = makePlan(middling);
      if (plan.machines.some((run) => run.blocks.length > 0)) expect([seed, brokenPromises(middling, plan)]).toEqual([seed, []]);
    }
    for (let seed = 1; seed <= 12; seed += 1) {
      const big = houseNight(seed, { lanes: 80, sessions: 9, machines: 2, lanesPerBlock: 1 });
      const plan = makePlan(big);
      expect(plan.method).toBe('heuristic');
      expect([seed, brokenPromises(big, plan)]).toEqual([seed, []]);
      expect(gapMs(plan)).toBe(plan.criteria.latenessMs - plan.bound.latenessMs);
      expect(makePlan(big)).toEqual(plan);
    }
  }, 60_000);

  it('fourteen blocks on three machines are proven', () => {
    const plan = makePlan(houseNight(5, { lanes: 56, sessions: 14, machines: 3, lanesPerBlock: 4 }));
    expect(plan.machines.flatMap((run) => run.blocks)).toHaveLength(14);
    expect(plan.proven).toEqual({ sessionsLate: true, lateness: true, freshness: true, travel: true });
  }, 30_000);
});

describe('nights over midnight and over the change of clocks', () => {
  // Europe/Berlin: 2026-10-25 03:00 becomes 02:00, 2026-03-29 02:00 becomes 03:00 (IANA time zone data).
  it.each([['2026-10-25', '23:30', '03:30', 5], ['2026-03-29', '23:30', '03:30', 3], ['2026-06-14', '23:30', '03:30', 4]])('%s', (day, free, warmUp, hours) => {
    const wall = (date: Temporal.PlainDate, time: string): number => date.toZonedDateTime({ timeZone: 'Europe/Berlin', plainTime: time }).epochMilliseconds;
    const date = Temporal.PlainDate.from(day);
    const release = wall(date.subtract({ days: 1 }), free);
    const due = wall(date, warmUp);
    expect((due - release) / 3_600_000).toBe(hours);
    const machine = smallNight(1, { blocks: 1, machines: 1, extras: false }).machines[0]!;
    const jobs = [1, 2, 3, 4].map((lane) => ({ lane, sessionId: 's', warmUp: due, release, pattern: 'p1', product: 'x', perLaneMs: { M1: 2 * MIN } }));
    const input: PlanInput = { now: release - 60 * MIN, marginMs: 5 * MIN, machines: [{ ...machine, availableFrom: release }], blocks: formBlocks(jobs, [machine]) };
    const plan = makePlan(input);
    expect(plan.machines[0]?.blocks[0]).toMatchObject({ start: due - 13 * MIN, end: due - 5 * MIN, latestStart: due - 8 * MIN });
    expect(brokenPromises(input, plan)).toEqual([]);
  });
});
