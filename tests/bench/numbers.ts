import { performance } from 'node:perf_hooks';
import { availability } from '#shared/domain/numbers/availability.ts';
import { cChart, individualsChart, uChart, type Chart } from '#shared/domain/numbers/charts.ts';
import { dispersion } from '#shared/domain/numbers/dispersion.ts';
import { downtime } from '#shared/domain/numbers/downtime.ts';
import { answeredWithin, serversNeeded, waitQuantile } from '#shared/domain/numbers/erlang.ts';
import { ewmaRateChart } from '#shared/domain/numbers/ewma.ts';
import { finiteAnsweredWithin, finiteQueue } from '#shared/domain/numbers/finite-queue.ts';
import { funnel } from '#shared/domain/numbers/funnel.ts';
import { fitGammaPoisson, shrunkRanking } from '#shared/domain/numbers/gamma-poisson.ts';
import { kaplanMeier } from '#shared/domain/numbers/kaplan-meier.ts';
import { laplaceTest } from '#shared/domain/numbers/laplace.ts';
import { militaryHandbookTest } from '#shared/domain/numbers/military-handbook.ts';
import { mtbf } from '#shared/domain/numbers/mtbf.ts';
import { nelsonAalen } from '#shared/domain/numbers/nelson-aalen.ts';
import { laneUse } from '#shared/domain/numbers/occupancy.ts';
import { median, percentile } from '#shared/domain/numbers/percentiles.ts';
import { fitGroupedPowerLaw } from '#shared/domain/numbers/power-law-grouped.ts';
import { fitPowerLaw, powerLawDistance } from '#shared/domain/numbers/power-law.ts';
import { framesNeeded } from '#shared/domain/numbers/power.ts';
import { framesPerStop, perThousand } from '#shared/domain/numbers/rates.ts';
import { bestReplacementAge } from '#shared/domain/numbers/replacement-age.ts';
import { reverseArrangements } from '#shared/domain/numbers/reverse-arrangements.ts';
import { nelsonRules, westernElectricRules } from '#shared/domain/numbers/run-rules.ts';
import { singleServer } from '#shared/domain/numbers/single-server.ts';
import type { Span } from '#shared/domain/numbers/spans.ts';
import { stratifiedRatio } from '#shared/domain/numbers/strata.ts';
import type { Life } from '#shared/domain/numbers/survival-data.ts';
import { compareRates } from '#shared/domain/numbers/two-rates.ts';
import { fitWeibull } from '#shared/domain/numbers/weibull.ts';
import { random } from '#tests/reference/numbers/random.ts';

const LANES = 64;
const WEEKS = 260;
const WEEK = 7 * 86_400_000;

/** One lane, five years: stops and frames a week, minutes to restore and the stretch it was down, parts' lives. */
type LaneYears = { lane: number; stops: number[]; frames: number[]; minutes: number[]; down: Span[]; lives: Life[] };

function house(): LaneYears[] {
  const draw = random(71);
  return Array.from({ length: LANES }, (_, i) => {
    const rate = draw.gamma(6, 2.4);
    const frames = Array.from({ length: WEEKS }, () => 600 + Math.floor(900 * draw.uniform()));
    const minutes = frames.map(() => 2 + draw.exponential(6));
    return {
      lane: i + 1,
      frames,
      stops: frames.map((count) => draw.poisson((rate * count) / 1000)),
      minutes,
      down: minutes.map((length, week) => ({ from: week * WEEK, to: week * WEEK + length * 60_000 })),
      lives: Array.from({ length: 6 }, () => {
        const life = draw.weibull(1.8, 90_000);
        return { time: Math.min(life, 120_000), failed: life <= 120_000 };
      }),
    };
  });
}

const sum = (values: readonly number[]): number => {
  let all = 0;
  for (const value of values) all += value;
  return all;
};

/** Each method once for the lane. */
function oneLane({ stops, frames, minutes, down, lane }: LaneYears): unknown[] {
  const [count, all] = [sum(stops), sum(frames)];
  const thousands = frames.map((one) => one / 1000);
  const chart = uChart(stops, thousands) as Chart;
  const z = chart.points.map((point) => point?.z ?? 0);
  const eventful = stops.flatMap((one, week) => (one > 0 ? [week + 1] : []));
  const series = { times: eventful, end: WEEKS + 1 };
  const before = { count: sum(stops.slice(0, 130)), frames: sum(frames.slice(0, 130)) };
  const opening = [{ from: 0, to: WEEKS * WEEK }];
  return [
    perThousand(count, all),
    framesPerStop(count, all),
    mtbf(count, all),
    availability(WEEKS * WEEK, down.map((span) => ({ down: span.to - span.from, waiting: 0 }))),
    compareRates({ count: count - before.count, frames: all - before.frames }, before),
    cChart(stops),
    individualsChart(minutes),
    Object.values(nelsonRules).map((rule) => rule(z)),
    Object.values(westernElectricRules).map((rule) => rule(z)),
    ewmaRateChart(stops, thousands, count / (all / 1000)),
    dispersion(stops, frames),
    laplaceTest(series),
    militaryHandbookTest(series),
    reverseArrangements(minutes),
    fitPowerLaw(series),
    powerLawDistance(series),
    fitGroupedPowerLaw(stops.map((_, week) => week + 1), stops),
    downtime({ down, opening, wanted: opening }),
    laneUse({ outOfService: down, serviced: [], league: opening, paid: [], unpaid: [] }, opening),
    median(minutes),
    percentile(minutes, 0.9),
    lane,
  ];
}

/** Each method that looks at all lanes together. */
function wholeHouse(lanes: readonly LaneYears[]): unknown[] {
  const counts = lanes.map((lane) => sum(lane.stops));
  const frames = lanes.map((lane) => sum(lane.frames));
  const thousands = frames.map((one) => one / 1000);
  const model = fitGammaPoisson(counts, thousands);
  const lives = lanes.flatMap((lane) => lane.lives);
  const life = fitWeibull(lives);
  const strata = lanes.map(({ stops, frames: own }) => ({
    first: { count: sum(stops.slice(0, 130)), frames: sum(own.slice(0, 130)) },
    second: { count: sum(stops.slice(130)), frames: sum(own.slice(130)) },
  }));
  const calls = { arrivals: 20, service: 8, servers: 4 };
  return [
    funnel(lanes.map(({ lane }, i) => ({ lane, count: counts[i] as number, frames: frames[i] as number }))),
    dispersion(counts, frames, 0.1),
    'shape' in model ? shrunkRanking(counts, thousands, model) : model,
    stratifiedRatio(strata),
    framesNeeded({ before: { count: 40, frames: 10_000 }, ratio: 0.5 }),
    kaplanMeier(lives),
    nelsonAalen(lives),
    'shape' in life ? bestReplacementAge(life, { planned: 4000, failure: 16_000 }) : life,
    answeredWithin(calls, 0.05),
    waitQuantile(calls, 0.9),
    serversNeeded(20, 8, 0.05, 0.9),
    singleServer(5, 0.12, 0.01),
    finiteQueue({ machines: LANES, servers: 2, calls: 0.3, service: 8 }),
    finiteAnsweredWithin({ machines: LANES, servers: 2, calls: 0.3, service: 8 }, 0.05),
  ];
}

/** Milliseconds of one call: the best of several after warm-up, so that other work on the machine counts little. */
function time(runs: number, work: () => void): number {
  for (let i = 0; i < 4; i += 1) work();
  return Math.min(...Array.from({ length: runs }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  }));
}

export type BenchRow = { name: string; value: number; denominator: number; ratio: number };

/**
 * Every method over 64 lanes and five years of weeks, in milliseconds, as a ratio to summing the same arrays
 * in the same run.
 */
export function benchNumbers(): BenchRow[] {
  const lanes = house();
  let sink = 0;
  const denominator = time(101, () => {
    for (const lane of lanes) sink += sum(lane.stops) + sum(lane.frames) + sum(lane.minutes);
  });
  const value = time(15, () => {
    for (const lane of lanes) sink += oneLane(lane).length;
    sink += wholeHouse(lanes).length;
  });
  if (!(sink > 0)) throw new Error('nothing was computed');
  return [{ name: 'numbers: every method, 64 lanes, 260 weeks (ms; against summing the same arrays)', value, denominator, ratio: value / denominator }];
}
