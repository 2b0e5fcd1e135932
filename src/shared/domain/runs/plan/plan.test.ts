import { describe, expect, it } from 'vitest';
import { formBlocks, type LaneJob } from './cut.ts';
import type { Plan, PlanBlock, PlanInput, PlanMachine } from './model.ts';
import { gapMs, makePlan, planCost } from './plan.ts';
import { pairRelease } from './release.ts';
import { replanInput } from './replan.ts';

const MIN = 60_000;
const T0 = Date.UTC(2026, 9, 7, 16, 0);
const at = (minutes: number): number => T0 + minutes * MIN;

const machine = (id: string, change: Partial<PlanMachine> = {}): PlanMachine => ({
  id, availableFrom: T0, atLane: 1, loadedPattern: 'house', loadedProduct: 'x', travel: { fixedMs: MIN, perLaneMs: 0 },
  patternChangeMs: 3 * MIN, productChangeMs: 5 * MIN, services: [], stores: {}, ...change,
});
const block = (id: string, lanes: number[], release: number, warmUp: number, change: Partial<PlanBlock> = {}): PlanBlock => ({
  id, sessionId: `s-${id}`, lanes: lanes.map((lane) => ({ lane, release: at(release) })), warmUp: at(warmUp),
  pattern: 'house', product: 'x', perLaneMs: { M1: 2 * MIN, M2: 2 * MIN }, ...change,
});
const input = (blocks: PlanBlock[], change: Partial<PlanInput> = {}): PlanInput => ({ now: T0, marginMs: 5 * MIN, machines: [machine('M1')], blocks, ...change });
const planned = (plan: Plan, id: string) => plan.machines.flatMap((run) => run.blocks.map((b) => ({ ...b, machine: run.machine }))).find((b) => b.block === id)!;

describe('the run plan', () => {
  it('begins as late as is safe, and says until when it may still begin', () => {
    const plan = makePlan(input([block('a', [1, 2, 3, 4], 0, 60)]));
    expect(planned(plan, 'a')).toMatchObject({ start: at(47), end: at(55), due: at(55), latestStart: at(52), breaksFirst: 's-a' });
    expect(plan.criteria).toEqual({ sessionsLate: 0, latenessMs: 0, freshnessLostMs: (6 + 4 + 2) * MIN, travelMs: 0, changes: 0 });
    expect(plan.proven).toEqual({ sessionsLate: true, lateness: true, freshness: true, travel: true });
  });

  it('names what breaks first when a block is held up by the next one', () => {
    const plan = makePlan(input([block('a', [1, 2], 0, 58), block('b', [3, 4], 0, 60)]));
    expect(planned(plan, 'a')).toMatchObject({ start: at(47), end: at(51), latestStart: at(52), breaksFirst: 's-b' });
    expect(planned(plan, 'b')).toMatchObject({ start: at(51), latestStart: at(56), breaksFirst: 's-b' });
  });

  it('explains a late session back to its root', () => {
    const plan = makePlan(input([block('early', [1, 2, 3, 4, 5, 6, 7, 8], 30, 60), block('late', [21, 22, 23, 24], 30, 62, { pattern: 'sport' })]));
    expect(plan.criteria.sessionsLate).toBe(1);
    const [late] = plan.late;
    expect(late?.because.map((e) => e.code)).toEqual(['late.pattern-change', 'late.travel', 'late.waits-for-block', 'late.lanes-free-at']);
    expect(late?.because.at(-1)?.params).toEqual({ block: 'early', lane: 1, at: at(30) });
    const alone = makePlan(input([block('a', [1, 2, 3, 4], 50, 60)]));
    expect(alone.late).toEqual([{ session: 's-a', byMs: 3 * MIN, because: [{ code: 'late.even-alone', params: { session: 's-a' } }, { code: 'late.lanes-free-at', params: { block: 'a', lane: 1, at: at(50) } }] }]);
  });

  it('waits for the lane that frees in the middle, the machine that is away, and play in between', () => {
    const lanes = [1, 2, 3].map((lane) => ({ lane, release: at(lane === 2 ? 20 : 0) }));
    const middle = makePlan(input([{ ...block('a', [1], 0, 15), lanes }]));
    expect(middle.late[0]).toMatchObject({ byMs: 14 * MIN, because: [{ code: 'late.even-alone' }, { code: 'late.lanes-free-at', params: { lane: 2 } }] });
    const away = makePlan(input([block('a', [1, 2], 0, 20)], { machines: [machine('M1', { away: [{ from: at(1), to: at(30) }] })] }));
    expect(planned(away, 'a')).toMatchObject({ start: at(30), end: at(34) });
    expect(away.late[0]?.because.at(-1)?.code).toBe('late.machine-away');
    const closed = makePlan(input([block('a', [1, 2], 0, 20, { closed: [{ from: at(3), to: at(25) }] })]));
    expect(planned(closed, 'a').lanes.map((lane) => lane.end)).toEqual([at(3), at(27)]);
    expect(closed.late[0]?.because.at(-1)).toEqual({ code: 'late.lanes-closed', params: { block: 'a', lane: 2, until: at(25) } });
  });

  it('refills where it costs the films least, and refuses what no tank holds', () => {
    const tank = machine('M1', { services: [{ id: 'refill', ms: 6 * MIN, restores: ['tankA'] }], stores: { tankA: { level: 50, capacity: 100 } } });
    const use = { usePerLane: { M1: { tankA: 20 } } };
    const plan = makePlan(input([block('a', [1, 2], 0, 60, use), block('b', [3, 4], 0, 60, use)], { machines: [tank] }));
    expect(plan.machines[0]?.blocks.map((b) => b.services)).toEqual([['refill'], []]);
    const full = { ...tank, stores: { tankA: { level: 50, capacity: 70 } } };
    const between = makePlan(input([block('a', [1, 2], 0, 60, use), block('b', [3, 4], 0, 60, use)], { machines: [full] }));
    expect(between.machines[0]?.blocks.map((b) => [b.services, b.setupMs])).toEqual([[[], 0], [['refill'], 6 * MIN]]);
    const big = makePlan(input([block('a', [1, 2, 3, 4, 5, 6], 0, 60, use)], { machines: [tank] }));
    expect(big.unplanned).toEqual([{ block: 'a', session: 's-a', because: [{ code: 'block.exceeds-store', params: { machine: 'M1', store: 'tankA', need: 120, holds: 100 } }] }]);
    const none = makePlan(input([block('a', [1], 0, 60, { perLaneMs: { M9: MIN } })]));
    expect(none.unplanned[0]?.because[0]?.code).toBe('block.no-machine');
    const dry = machine('M1', { stores: { tankA: { level: 10, capacity: 100 } } });
    expect(makePlan(input([block('a', [1], 0, 60, use)], { machines: [dry] })).unplanned[0]?.because[0]?.code).toBe('stores.run-out');
  });

  it('keeps what a person holds fast and shows its price', () => {
    const blocks = [block('a', [1, 2], 0, 60), block('b', [3, 4], 0, 70), block('c', [5, 6], 0, 80)];
    const free = makePlan(input(blocks));
    const pinned = makePlan(input(blocks, { pins: [{ kind: 'order', before: 'c', after: 'a' }] }));
    expect(pinned.machines[0]?.blocks.map((b) => b.block)).toEqual(['c', 'a', 'b']);
    expect(planCost(free, pinned).freshnessLostMs).toBeGreaterThan(0);
    const started = makePlan(input(blocks, { pins: [{ kind: 'start', block: 'b', at: at(40) }] }));
    expect(planned(started, 'b').start).toBe(at(40));
    const impossible = makePlan(input(blocks, { pins: [{ kind: 'start', block: 'a', at: at(40) }, { kind: 'start', block: 'b', at: at(41) }] }));
    expect(impossible.unplanned.map((u) => u.because[0]?.code)).toEqual(['pins.conflict', 'pins.conflict', 'pins.conflict']);
  });

  it('refuses no machine and more than three, and plans an empty night', () => {
    expect(() => makePlan(input([], { machines: [] }))).toThrow(RangeError);
    expect(makePlan(input([])).machines).toEqual([{ machine: 'M1', blocks: [] }]);
    expect(gapMs(makePlan(input([])))).toBe(0);
  });
});

describe('release and cutting', () => {
  it('frees a lane with its pair, or alone where the centre allows it', () => {
    const free = new Map([[5, at(10)], [6, at(30)]]);
    expect([pairRelease(5, free, T0, false), pairRelease(6, free, T0, false), pairRelease(5, free, T0, true), pairRelease(7, free, T0, false)]).toEqual([at(30), at(30), at(10), T0]);
  });

  const job = (lane: number, change: Partial<LaneJob> = {}): LaneJob => ({ lane, sessionId: 's', warmUp: at(60), release: at(0), pattern: 'house', product: 'x', perLaneMs: { M1: MIN, M2: MIN }, ...change });

  it('makes blocks of lanes that share release, due and pattern', () => {
    const odd = formBlocks([4, 3, 2, 1].map((lane) => job(lane, { pattern: lane % 2 ? 'odd' : 'even' })), [machine('M1')]);
    expect(odd.map((b) => [b.pattern, b.lanes.map((l) => l.lane)])).toEqual([['odd', [1, 3]], ['even', [2, 4]]]);
    const freed = formBlocks([job(1), job(2), job(3, { release: at(9) }), job(4, { release: at(9) })], [machine('M1')]);
    expect(freed.map((b) => b.lanes.length)).toEqual([2, 2]);
  });

  it('halves long blocks for two machines without parting a pair, and by the tank', () => {
    const jobs = Array.from({ length: 12 }, (_, i) => job(i + 1));
    const two = formBlocks(jobs, [machine('M1'), machine('M2')]);
    expect(two.every((b) => b.lanes.length <= 3 && (b.lanes[0]?.lane ?? 0) % 2 === 1)).toBe(true);
    expect(two.flatMap((b) => b.lanes.map((l) => l.lane))).toEqual(jobs.map((j) => j.lane));
    const tank = machine('M1', { stores: { tankA: { level: 100, capacity: 100 } } });
    const cut = formBlocks(jobs.map((j) => ({ ...j, usePerLane: { M1: { tankA: 20 } } })), [tank]);
    expect(cut.map((b) => b.lanes.length)).toEqual([5, 5, 2]);
  });
});

describe('replanning', () => {
  const blocks = [block('a', [1, 2, 3, 4], 0, 40), block('b', [11, 12, 13, 14], 0, 60)];
  const both = input(blocks, { machines: [machine('M1'), machine('M2', { atLane: 11 })] });

  it('keeps what is under way where it is', () => {
    const first = makePlan(both);
    const on = planned(first, 'a').machine;
    const next = replanInput(both, first, { now: at(30), redoMs: 4 * MIN, machines: [{ machine: on, done: [1], on: { lane: 2, endsAt: at(31) } }] });
    const plan = makePlan(next);
    expect(planned(plan, 'a')).toMatchObject({ machine: on, start: at(31), lanes: [{ lane: 3 }, { lane: 4 }] });
    expect(plan.criteria).toMatchObject({ sessionsLate: 0, changes: 0 });
  });

  it('changes nothing when nothing has happened', () => {
    const twins = input([block('a', [1, 2], 0, 60), block('b', [1, 2], 0, 60), block('c', [1, 2], 0, 60)]);
    const first = makePlan(twins);
    const forced = { ...first, machines: [{ machine: 'M1', blocks: ['c', 'a', 'b'].map((id) => planned(first, id)) }] };
    const again = makePlan(replanInput(twins, forced, { now: at(1), redoMs: 0, machines: [] }));
    expect(again.machines[0]?.blocks.map((b) => b.block)).toEqual(['c', 'a', 'b']);
  });

  it('gives a broken machine’s lanes to the other one, its last lane cleaned and redone', () => {
    const first = makePlan(both);
    const on = planned(first, 'a').machine;
    const next = replanInput(both, first, { now: at(30), redoMs: 4 * MIN, machines: [{ machine: on, done: [1], on: null, broken: { until: null, lane: 2 } }] });
    const plan = makePlan(next);
    const other = on === 'M1' ? 'M2' : 'M1';
    expect(planned(plan, 'a')).toMatchObject({ machine: other, lanes: [{ lane: 2 }, { lane: 3 }, { lane: 4 }] });
    const [redone] = planned(plan, 'a').lanes;
    expect(redone!.end - redone!.start).toBe(6 * MIN);
    const back = makePlan(replanInput(both, first, { now: at(30), redoMs: 0, machines: [{ machine: on, done: [], on: null, broken: { until: at(500), lane: null } }] }));
    expect(back.machines.find((run) => run.machine === on)?.blocks).toEqual([]);
  });
});
