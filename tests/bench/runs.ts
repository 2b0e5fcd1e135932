import { performance } from 'node:perf_hooks';
import { filmMap } from '#shared/domain/runs/film.ts';
import { boardFromIndex, type PatternRevision } from '#shared/domain/runs/pattern.ts';
import { compile } from '#shared/domain/runs/plan/compile.ts';
import { evaluate } from '#shared/domain/runs/plan/evaluate.ts';
import type { Plan, PlanInput } from '#shared/domain/runs/plan/model.ts';
import { gapMs, makePlan } from '#shared/domain/runs/plan/plan.ts';
import { LATE_SESSION } from '#shared/domain/runs/plan/problem.ts';
import { bestByEnumeration } from '#tests/reference/runs/enumerate.ts';
import { smallNight } from '#tests/reference/runs/nights.ts';
import { houseNight } from './nights.ts';

export interface BenchFigure {
  name: string;
  value: number;
  denominator: number;
  ratio: number;
}

const NIGHTS = 200;
const figure = (name: string, value: number, denominator: number): BenchFigure => ({ name, value, denominator, ratio: denominator === 0 ? 0 : value / denominator });
const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

function timed(run: () => void): number {
  const from = performance.now();
  run();
  return performance.now() - from;
}

/** A long sheet: 20 passes out and back over 42 ft. */
function longPattern(): PatternRevision {
  const passes = Array.from({ length: 20 }, (_, i) => {
    const out = i < 12;
    const step = out ? i : i - 12;
    const [near, far] = [step * 3, step * 3 + 3.7];
    return {
      direction: out ? ('outbound' as const) : ('return' as const), product: 'A' as const, loads: 1 + (i % 3), ul: 40 + i,
      fromBoard: boardFromIndex(2 + step), toBoard: boardFromIndex(38 - step), ...(out ? { fromFt: near, toFt: far } : { fromFt: far, toFt: near }),
    };
  });
  return { lengthFt: 42, passes };
}

/** What an operator does without a plan: blocks in order of due, each to the machine with fewer lanes so far; null when pins forbid it. */
function earliestDueFirst(input: PlanInput): number {
  const orders: number[][] = input.machines.map(() => []);
  const lanes = input.machines.map(() => 0);
  const byDue = input.blocks.map((_, b) => b).sort((a, b) => (input.blocks[a]?.warmUp ?? 0) - (input.blocks[b]?.warmUp ?? 0) || a - b);
  for (const b of byDue) {
    const m = lanes.indexOf(Math.min(...lanes));
    orders[m]?.push(b);
    lanes[m] = (lanes[m] ?? 0) + (input.blocks[b]?.lanes.length ?? 0);
  }
  return (evaluate(compile(input), orders)?.primary ?? 0) % LATE_SESSION;
}

/** Sum over sessions of the minutes from now until they are to be ready: lateness is measured on this scale. */
function readyMs(input: PlanInput): number {
  const due = new Map(input.blocks.map((block) => [block.sessionId, block.warmUp - input.marginMs - input.now]));
  return [...due.values()].reduce((sum, ms) => sum + ms, 0);
}

interface Series {
  times: number[];
  plans: { input: PlanInput; plan: Plan }[];
}

function planSeries(nights: number, make: (seed: number) => PlanInput): Series {
  makePlan(make(nights + 1));
  const series: Series = { times: [], plans: [] };
  for (let seed = 1; seed <= nights; seed += 1) {
    const input = make(seed);
    let plan: Plan | undefined;
    series.times.push(timed(() => (plan = makePlan(input))));
    if (plan) series.plans.push({ input, plan });
  }
  return series;
}

/** Big nights lane by lane: time, and the gap in the ready instants (due + lateness) and in lateness alone. */
function bigNights(): BenchFigure[] {
  const big = planSeries(NIGHTS, (seed) => houseNight(seed, { lanes: 80, sessions: 9, machines: 2, lanesPerBlock: 1 }));
  const gaps = big.plans.map(({ input, plan }) => gapMs(plan) / (readyMs(input) + plan.bound.latenessMs));
  const mean = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / values.length;
  const proven = big.plans.filter(({ plan }) => plan.proven.lateness).length;
  const lateness = big.plans.reduce((sum, { plan }) => sum + plan.criteria.latenessMs / 60_000, 0);
  const naive = big.plans.reduce((sum, { input }) => sum + earliestDueFirst(input) / 60, 0);
  return [
    figure('plan: 80 single lanes, median ms against 100', median(big.times), 100),
    figure('plan: mean gap to the bound, % of ready instants, against 5', 100 * mean(gaps), 5),
    figure('plan: mean gap in minutes of lateness, against one lane', mean(big.plans.map(({ plan }) => gapMs(plan) / 60_000)), 2),
    figure('plan: nights proven best in lateness, of all', proven, big.plans.length),
    figure('plan: minutes late over all nights against earliest due first', lateness, naive),
  ];
}

/** Times and quality of the film and the plan; each figure beside what it is held against. */
export function benchRuns(): BenchFigure[] {
  const pattern = longPattern();
  const films = Array.from({ length: 60 }, () => timed(() => filmMap(pattern)));
  const exact = planSeries(60, (seed) => houseNight(seed, { lanes: 80, sessions: 12, machines: 2, lanesPerBlock: 7 }));
  const small = Array.from({ length: 40 }, (_, i) => smallNight(i + 1, { blocks: 5, machines: 2, extras: false }));
  const planned = small.reduce((sum, input) => sum + timed(() => makePlan(input)), 0);
  const enumerated = small.reduce((sum, input) => sum + timed(() => bestByEnumeration(input)), 0);
  const sorted = [...exact.times].sort((a, b) => a - b);
  return [
    figure('film map: 20 passes, median ms against 2', median(films), 2),
    figure('plan: 80 lanes in 12 blocks on 2 machines exact, median ms against 100', median(exact.times), 100),
    figure('plan: the same, 9 of 10 nights, ms against 100', sorted[Math.floor(sorted.length * 0.9)] ?? 0, 100),
    figure('plan: small nights, ms against enumeration', planned, enumerated),
    ...bigNights(),
    figure('plan: memory of the process, MB against 200', process.memoryUsage().rss / 2 ** 20, 200),
  ];
}
