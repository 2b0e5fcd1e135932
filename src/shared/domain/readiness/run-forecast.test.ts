import { describe, expect, it } from 'vitest';
import { anEvening, aRun, MIN, WARM_UP } from '#tests/support/evening.ts';
import { forecastRuns, lanesLeft, runFor } from './run-forecast.ts';
import { DEFAULT_READINESS } from './settings.ts';

const now = WARM_UP - 60 * MIN;
const times = (runs: ReturnType<typeof aRun>[], free = new Map<number, number>()) =>
  forecastRuns(anEvening({ runs }).runs, free, now, DEFAULT_READINESS).map((r) => [r.lane, (r.startAt - now) / MIN, (r.doneAt - now) / MIN]);

describe('forecast of runs', () => {
  it('goes lane by lane at the median pace of its machine', () => {
    expect(times([aRun({ plannedStart: now + 10 * MIN })])).toEqual([[5, 10, 12], [6, 12, 14], [7, 14, 16], [8, 16, 18]]);
  });

  it('waits for the pair to be free', () => {
    expect(times([aRun({ plannedStart: now })], new Map([[7, now + 20 * MIN]]))).toEqual([[5, 0, 2], [6, 2, 4], [7, 20, 22], [8, 22, 24]]);
  });

  it('under way it goes on from the last lane done, and a second run of the machine after it', () => {
    const dressed = { lane: 5, outcome: 'dressed' as const, startedAt: now - 2 * MIN, finishedAt: now - MIN, aUl: null, bUl: null, cleanerUl: null, measured: false, reason: null };
    const under = aRun({ status: 'under-way', startedAt: now - 3 * MIN, lanes: [5, 6], done: [dressed] });
    const next = aRun({ key: 'M1/119', run: '119', lanes: [7], plannedStart: now - 30 * MIN });
    expect(times([next, under])).toEqual([[6, -1, 1], [7, 1, 3]]);
    expect(lanesLeft(under)).toEqual([6]);
  });

  it('chooses the film that lies there at warm-up: the last run that ends in time', () => {
    const first = aRun({ key: 'M1/1', run: '1', lanes: [5], plannedStart: now });
    const second = aRun({ key: 'M1/2', run: '2', lanes: [5], plannedStart: now + 30 * MIN });
    const late = aRun({ key: 'M1/3', run: '3', lanes: [5], plannedStart: WARM_UP });
    const all = (runs: ReturnType<typeof aRun>[]) => forecastRuns(anEvening({ runs }).runs, new Map(), now, DEFAULT_READINESS);
    expect(runFor(5, all([first, second, late]), WARM_UP)?.run).toBe('2');
    expect(runFor(5, all([late]), WARM_UP)?.run).toBe('3');
    expect(runFor(6, all([late]), WARM_UP)).toBeNull();
  });
});
