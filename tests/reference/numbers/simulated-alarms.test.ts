import { describe, expect, it, vi } from 'vitest';
import { dispersion, type Dispersion } from '#shared/domain/numbers/dispersion.ts';
import { poissonCdf } from '#shared/domain/numbers/distributions.ts';
import { ewmaChart } from '#shared/domain/numbers/ewma.ts';
import { laneFinding, trendFinding } from '#shared/domain/numbers/findings.ts';
import { funnel, type Funnel } from '#shared/domain/numbers/funnel.ts';
import { laplaceTest, type LaplaceTest } from '#shared/domain/numbers/laplace.ts';
import { militaryHandbookTest, type MilitaryHandbookTest } from '#shared/domain/numbers/military-handbook.ts';
import { framesNeeded } from '#shared/domain/numbers/power.ts';
import { reverseArrangements, type ReverseArrangements } from '#shared/domain/numbers/reverse-arrangements.ts';
import { beyondThreeSigma, fourOfFive, oneSide, twoOfThree, type RunRule } from '#shared/domain/numbers/run-rules.ts';
import { stratifiedRatio } from '#shared/domain/numbers/strata.ts';
import { compareRates } from '#shared/domain/numbers/two-rates.ts';
import { random, share, type Random } from './random.ts';

vi.setConfig({ testTimeout: 60_000 });

/** Mean number of points until the first signal, over independent standard normal values. */
function runLength(draw: Random, runs: number, signals: (z: number[]) => boolean[]): { mean: number; error: number } {
  let [sum, squares] = [0, 0];
  for (let run = 0; run < runs; run += 1) {
    let seen = 0;
    let tail: number[] = [];
    for (;;) {
      const fresh = Array.from({ length: 64 }, () => draw.normal());
      // Rules look back at most eight points here.
      const fired = signals([...tail, ...fresh]).slice(tail.length).indexOf(true);
      if (fired >= 0) {
        seen += fired + 1;
        break;
      }
      seen += fresh.length;
      tail = fresh.slice(-8);
    }
    sum += seen;
    squares += seen * seen;
  }
  const mean = sum / runs;
  return { mean, error: Math.sqrt((squares / runs - mean * mean) / runs) };
}

const firing = (...rules: RunRule[]) => (z: number[]): boolean[] => {
  const places = new Set(rules.flatMap((rule) => rule(z)));
  return z.map((_, i) => places.has(i));
};
const eight: RunRule = (z) => oneSide(z, 8);

describe('run rules: points between false alarms (C. W. Champ and W. H. Woodall, Technometrics 29 (1987) 393–399; from memory)', () => {
  it.each([
    ['three sigma', 370.4, [beyondThreeSigma]],
    ['with two of three', 225.44, [beyondThreeSigma, twoOfThree]],
    ['with four of five', 166.05, [beyondThreeSigma, fourOfFive]],
    ['with eight on one side', 152.73, [beyondThreeSigma, eight]],
    ['all four', 91.75, [beyondThreeSigma, twoOfThree, fourOfFive, eight]],
    ['eight on one side alone', 255, [eight]],
  ] as const)('%s: %d', (_, published, rules) => {
    const { mean, error } = runLength(random(31), 1500, firing(...rules));
    expect(Math.abs(mean - published)).toBeLessThan(3.5 * error);
  });
});

it('drift chart: 500 points between false alarms at weight 0.2, width 2.962 (J. M. Lucas and M. S. Saccucci, Technometrics 32 (1990) 1–12; from memory)', () => {
  const draw = random(37);
  let [sum, squares] = [0, 0];
  const runs = 400;
  for (let run = 0; run < runs; run += 1) {
    const values: number[] = [];
    let first = 0;
    while (first === 0) {
      for (let i = 0; i < 600; i += 1) values.push(draw.normal());
      first = ewmaChart(values, 0, 1, { weight: 0.2, width: 2.962 }).findIndex((point) => point.outside !== null) + 1;
    }
    sum += first;
    squares += first * first;
  }
  const mean = sum / runs;
  expect(Math.abs(mean - 500)).toBeLessThan(3.5 * Math.sqrt((squares / runs - mean * mean) / runs));
});

describe('tests reject what is true no more often than they say', () => {
  it('trend tests on a constant rate', () => {
    const draw = random(41);
    const times = (): number[] => Array.from({ length: 18 }, () => draw.uniform()).sort((a, b) => a - b);
    const laplace = share(2000, 0.05, () => (laplaceTest({ times: times(), end: 1 }) as LaplaceTest).twoSided < 0.05);
    const military = share(2000, 0.05, () => (militaryHandbookTest({ times: times(), end: 1 }) as MilitaryHandbookTest).twoSided < 0.05);
    const reverse = share(1000, 0.05, () => (reverseArrangements(Array.from({ length: 15 }, () => draw.exponential(1))) as ReverseArrangements).improving < 0.05);
    for (const result of [laplace, military, reverse]) expect(result.share).toBeLessThan(0.05 + 3 * result.error);
    for (const result of [laplace, military]) expect(result.share).toBeGreaterThan(0.05 - 3 * result.error);
  });

  it('two equal rates, and strata with one common ratio', () => {
    const draw = random(43);
    const equal = share(1500, 0.05, () => {
      const found = compareRates({ count: draw.poisson(12), frames: 3 }, { count: draw.poisson(20), frames: 5 });
      return 'twoSided' in found && found.twoSided < 0.05;
    });
    expect(equal.share).toBeLessThan(0.05 + 3 * equal.error);
    const agree = share(1500, 0.05, () => {
      const found = stratifiedRatio([15, 25, 40].map((mean) => ({ first: { count: draw.poisson(mean), frames: 1 }, second: { count: draw.poisson(mean), frames: 1 } })));
      return 'homogeneity' in found && found.homogeneity !== null && found.homogeneity.p < 0.05;
    });
    expect(Math.abs(agree.share - 0.05)).toBeLessThan(3 * agree.error);
  });

  it('dispersion of Poisson counts', () => {
    const draw = random(47);
    const sizes = Array.from({ length: 32 }, (_, i) => 1 + (i % 4));
    const result = share(2000, 0.05, () => (dispersion(sizes.map((size) => draw.poisson(6 * size)), sizes) as Dispersion).p < 0.05);
    expect(Math.abs(result.share - 0.05)).toBeLessThan(3 * result.error);
  });

  it('funnel: as many lanes outside as it says that chance brings', () => {
    const draw = random(53);
    const runs = 400;
    const seen = { above: 0, below: 0, far: 0, any: 0 };
    const said = { above: 0, below: 0, far: 0, any: 0 };
    for (let run = 0; run < runs; run += 1) {
      const result = funnel(Array.from({ length: 32 }, (_, i) => ({ lane: i + 1, frames: 500 + 100 * (i % 7), count: draw.poisson(4 + 0.8 * (i % 7)) }))) as Funnel;
      const at = (...positions: string[]): number => result.lanes.filter((one) => positions.includes(one.position)).length;
      const far = at('above-outer', 'below-outer');
      seen.above += at('above-inner', 'above-outer');
      seen.below += at('below-inner', 'below-outer');
      seen.far += far;
      seen.any += far > 0 ? 1 : 0;
      said.above += result.byChance.inner.above;
      said.below += result.byChance.inner.below;
      said.far += result.byChance.outer.above + result.byChance.outer.below;
      said.any += result.byChance.outer.any;
    }
    for (const key of ['above', 'below', 'far', 'any'] as const) expect(Math.abs(seen[key] - said[key]), key).toBeLessThan(3.5 * Math.sqrt(said[key]));
  });
});

describe('what is planted is found', () => {
  it('a bad lane, as often as its own tail says, and nothing else is named more often than chance', () => {
    const draw = random(59);
    const runs = 500;
    let [found, others] = [0, 0];
    for (let run = 0; run < runs; run += 1) {
      const house = Array.from({ length: 32 }, (_, i) => ({ lane: i + 1, frames: 2000, count: draw.poisson(i === 8 ? 20 : 8) }));
      const spread = dispersion(house.map((one) => one.count), house.map((one) => one.frames));
      const finding = laneFinding(funnel(house), spread);
      const named = finding.code === 'lanes.watch' ? finding.lanes : [];
      if (named.includes(9)) found += 1;
      others += named.filter((lane) => lane !== 9).length;
    }
    // Pooled, 8.375 are expected; the 99.9 % limit lies between 18 and 19, so 19 and more stand out.
    const power = 1 - poissonCdf(18, 20);
    expect(Math.abs(found / runs - power)).toBeLessThan(3 * Math.sqrt((power * (1 - power)) / runs) + 0.03);
    expect(others / runs).toBeLessThan(0.12);
  });

  it.each([
    [40, 0.5],
    [60, 1.8],
  ])('a change after %i stops before, true ratio %d, in the frames that framesNeeded asks for', (count, ratio) => {
    const before = { count, frames: 10_000 };
    const plan = framesNeeded({ before, ratio });
    if (!('frames' in plan)) throw new Error(plan.reason);
    const draw = random(61 + count);
    const result = share(1200, plan.power, () => {
      const after = { count: draw.poisson((count / 10_000) * ratio * plan.frames), frames: plan.frames };
      const p = compareRates(after, { count: draw.poisson(count), frames: before.frames }) as { lower: number; higher: number };
      return (ratio < 1 ? p.lower : p.higher) <= 0.025;
    });
    expect(Math.abs(result.share - plan.power)).toBeLessThan(3 * result.error);
    expect(result.share).toBeGreaterThan(0.8 - 3 * result.error);
  });

  it('a wearing machine, nearly always; a steady one, seldom', () => {
    const draw = random(67);
    const named = (shape: number): number =>
      share(500, 0.5, () => {
        const times = Array.from({ length: 60 }, () => draw.uniform() ** (1 / shape)).sort((a, b) => a - b);
        return trendFinding(laplaceTest({ times, end: 1 })).code === 'trend.worsening';
      }).share;
    expect(named(2)).toBeGreaterThan(0.9);
    expect(named(1)).toBeLessThan(0.02);
  });
});
