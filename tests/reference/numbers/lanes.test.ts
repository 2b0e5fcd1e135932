import { describe, expect, it } from 'vitest';
import { cChart, individualsChart, uChart, type Chart } from '#shared/domain/numbers/charts.ts';
import { dispersion, type Dispersion } from '#shared/domain/numbers/dispersion.ts';
import { unclippedFunnelCount } from '#shared/domain/numbers/funnel.ts';
import { fitGammaPoisson, shrunkRanking, type GammaPoisson } from '#shared/domain/numbers/gamma-poisson.ts';
import { nelsonRules } from '#shared/domain/numbers/run-rules.ts';
import { aircraft, boards, cloth, flowrate, wafers } from './fixtures.ts';
import { near } from './near.ts';
import { secondOpinion } from './second-opinion.ts';

/** Samples outside, counted from 1 as the sources do. */
const outside = (chart: Chart): number[] => chart.points.flatMap((point, i) => (point?.outside ? [i + 1] : []));
const z = (chart: Chart): number[] => chart.points.map((point) => point!.z);

describe('c-chart', () => {
  it('wafers: centre 16, limits 4 and 28, only wafer 24 beyond (NIST/SEMATECH e-Handbook, section 6.3.3.1)', () => {
    const chart = cChart(wafers) as Chart;
    expect(chart.centre).toBe(16);
    expect(chart.points[0]).toMatchObject({ low: 4, high: 28 });
    expect(wafers[2]).toBe(28);
    expect(outside(chart)).toEqual([24]);
    const spread = dispersion(wafers, wafers.map(() => 1)) as Dispersion;
    near(spread.chisquare, 37.875);
    expect(spread.df).toBe(24);
    expect(spread.p).toBeCloseTo(0.035708, 6);
  });

  it('circuit boards, then revised without the two that are out (Montgomery, pp. 173–175)', () => {
    const chart = cChart(boards) as Chart;
    near(chart.centre, 19.846153846153847);
    near(chart.points[0]?.high, 33.210860525, 1e-10);
    near(chart.points[0]?.low, 6.481447167, 1e-9);
    expect(outside(chart)).toEqual([6, 20]);
    const revised = cChart(boards.filter((_, i) => i !== 5 && i !== 19)) as Chart;
    expect(revised.points[0]?.high).toBeCloseTo(32.970801, 6);
    expect(revised.points[0]?.low).toBeCloseTo(6.362532, 6);
    const next = [16, 18, 12, 15, 24, 21, 28, 20, 25, 19, 18, 21, 16, 22, 19, 12, 14, 9, 16, 21];
    expect(outside(cChart(next, { centre: revised.centre }) as Chart)).toEqual([]);
  });
});

describe('u-chart with varying size', () => {
  it('dyed cloth (Montgomery, pp. 183–184)', () => {
    const chart = uChart(cloth.defects, cloth.units) as Chart;
    near(chart.centre, 153 / 107.5);
    const rows = chart.points.map((point) => [point!.value, point!.low, point!.high].map((value) => value.toFixed(4)));
    expect(rows).toEqual([
      ['1.4000', '0.2915', '2.5550'],
      ['1.5000', '0.1579', '2.6886'],
      ['1.5385', '0.4306', '2.4159'],
      ['1.1000', '0.2915', '2.5550'],
      ['0.7368', '0.2621', '2.5844'],
      ['1.0000', '0.2915', '2.5550'],
      ['1.7500', '0.3901', '2.4564'],
      ['1.5238', '0.3187', '2.5278'],
      ['1.5833', '0.3901', '2.4564'],
      ['1.8400', '0.4110', '2.4356'],
    ]);
    expect(outside(chart)).toEqual([]);
    const spread = dispersion(cloth.defects, cloth.units) as Dispersion;
    expect(spread.chisquare).toBeCloseTo(8.012103, 6);
    expect(spread.df).toBe(9);
    expect(spread.p).toBeCloseTo(0.532927, 6);
    expect(spread.widen).toBe(1);
    const average = uChart([153], [10.75], { centre: chart.centre }) as Chart;
    expect(average.points[0]).toMatchObject({ low: expect.closeTo(0.331668, 6), high: expect.closeTo(2.514843, 6) });
  });
});

it('aircraft: failure rates of thirteen planes differ (Pearson test, recomputed)', () => {
  const spread = dispersion(
    aircraft.map((plane) => plane.intervals.length),
    aircraft.map((plane) => plane.intervals.reduce((sum, hours) => sum + hours, 0)),
  ) as Dispersion;
  expect(spread.chisquare).toBeCloseTo(23.047581, 6);
  expect(spread.df).toBe(12);
  expect(spread.p).toBeCloseTo(0.027325, 6);
});

it('individuals chart: flow rate (NIST/SEMATECH e-Handbook, section 6.3.2.2)', () => {
  const chart = individualsChart(flowrate);
  if (!('movingRange' in chart)) throw new Error(chart.reason);
  near(chart.centre, 50.81);
  expect(chart.movingRange).toBeCloseTo(1.87778, 5);
  expect(chart.points[0]).toMatchObject({ low: expect.closeTo(45.81591, 5), high: expect.closeTo(55.80409, 5) });
  expect(chart.rangeHigh).toBeCloseTo(6.1347, 4);
});

describe('run rules on published data', () => {
  it('wafers: rule 1 at 24 and nothing else', () => {
    const series = z(cChart(wafers) as Chart);
    expect(nelsonRules[1](series).map((place) => place + 1)).toEqual([24]);
  });

  it('circuit boards: rule 1 at 6 and 20, rule 5 at 21 and 22', () => {
    const series = z(cChart(boards) as Chart);
    expect(nelsonRules[1](series).map((place) => place + 1)).toEqual([6, 20]);
    expect(nelsonRules[5](series).map((place) => place + 1)).toEqual([21, 22]);
  });
});

describe('funnel limits', () => {
  // D. J. Spiegelhalter, Statistics in Medicine 24 (2005) 1185–1202: formula from memory, digits by an independent program.
  it.each([
    [1, -0.9973, -0.932, 2.9019, 4.8676],
    [2, -0.9926, -0.8153, 4.7662, 7.1126],
    [5, -0.8516, 0.5421, 9.3766, 12.7714],
    [10, 1.2205, 3.7752, 16.16, 20.662],
    [20, 7.1692, 11.205, 28.7458, 34.7135],
    [50, 29.1228, 36.1217, 63.8305, 72.7514],
    [100, 70.0653, 80.3663, 119.5809, 131.8048],
  ])('for %i expected', (mean, ...limits) => {
    [0.001, 0.025, 0.975, 0.999].forEach((p, i) => expect(unclippedFunnelCount(mean, p)).toBeCloseTo(limits[i] as number, 3.9));
  });

  it.each(secondOpinion.funnelCounts)(`agree with ${secondOpinion.versions}: %d at %d`, (mean, p, limit) => {
    near(unclippedFunnelCount(mean, p), limit);
  });
});

describe(`Gamma–Poisson against ${secondOpinion.versions}`, () => {
  // Ten pumps of a power station: D. P. Gaver and I. G. O'Muircheartaigh, Technometrics 29 (1987) 1–15.
  const { counts, exposures, shape, mean, logLikelihood } = secondOpinion.pumps;
  const model = fitGammaPoisson(counts, exposures) as GammaPoisson;

  it('maximum likelihood', () => {
    near(model.shape, shape, 1e-7);
    near(model.mean, mean, 1e-7);
    near(model.logLikelihood, logLikelihood);
  });

  it('shrunk rates and their intervals', () => {
    const ranking = shrunkRanking(counts, exposures, model);
    secondOpinion.pumpRates.forEach(([rate, low, high], index) => {
      const one = ranking.find((other) => other.index === index);
      near(one?.rate, rate as number, 1e-7);
      near(one?.low, low as number, 1e-7);
      near(one?.high, high as number, 1e-7);
    });
  });
});
