import { PAST_FIGURES, type NightView, type PastFigure } from '#shared/contracts/numbers.ts';
import { median } from '#shared/domain/numbers/percentiles.ts';
import type { NightFigures } from '#shared/domain/numbers/night/figures.ts';

const OF: Record<PastFigure, (figures: NightFigures) => number | null> = {
  occupancy: (f) => f.total.occupancyOfAll,
  frames: (f) => f.total.frames,
  rate: (f) => f.total.rate?.perThousand ?? null,
  onLaneMs: (f) => f.onLane.median,
  leagueLostMs: (f) => f.leagueLostMs,
  readyShare: (f) => (f.ready.of === 0 ? null : f.ready.ready / f.ready.of),
  ulPerLane: (f) => (f.dressed.told === 0 ? null : f.dressed.ul / f.dressed.told),
  downMs: (f) => f.total.downMs,
};

/** Median, least and greatest of each figure over earlier nights; null where none of them has it. */
export function pastOf(nights: readonly NightFigures[]): NightView['past'] {
  const over = (figure: PastFigure): NightView['past'][PastFigure] => {
    const values = nights.map(OF[figure]).filter((value) => value !== null);
    return { median: median(values).value, low: values.length > 0 ? Math.min(...values) : null, high: values.length > 0 ? Math.max(...values) : null, n: values.length };
  };
  return Object.fromEntries(PAST_FIGURES.map((figure) => [figure, over(figure)])) as NightView['past'];
}

/** Figures of the house that came out otherwise since they were issued. */
export function differences(issued: NightFigures, now: NightFigures): NightView['differs'] {
  const flat = (f: NightFigures): Record<string, number | null> => ({
    frames: f.total.frames, framesEstimated: f.total.framesEstimated, deliveries: f.total.deliveries, games: f.total.games,
    stops: f.total.stops, calls: f.total.calls, bowlerCalls: f.total.bowlerCalls, foreignCalls: f.total.foreignCalls,
    occupancy: f.total.occupancyOfAll, occupancyInService: f.total.occupancyInService, downMs: f.total.downMs, wantedDownMs: f.total.wantedDownMs,
    leagueLostMs: f.leagueLostMs, acknowledgedMs: f.acknowledged.median, onLaneMs: f.onLane.median, restoredMs: f.restored.median,
    ready: f.ready.ready, readyOf: f.ready.of, lanesDressed: f.dressed.lanes, dressedUl: f.dressed.ul,
  });
  const before = flat(issued);
  return Object.entries(flat(now)).flatMap(([figure, value]) => (value === before[figure] ? [] : [{ figure, issued: before[figure] ?? null, now: value }]));
}
