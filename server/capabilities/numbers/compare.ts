import { PAST_FIGURES, type NightView, type PastFigure } from '#shared/contracts/numbers.ts';
import { median } from '#shared/domain/numbers/percentiles.ts';
import type { Counts, LaneFigures, NightFigures } from '#shared/domain/numbers/night/figures.ts';

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

type Values = Record<string, number | null>;
type Difference = NightView['differs'][number];

/** Figures that came out otherwise since they were issued: the house's first, then lane by lane, then by kind of play. Rates follow from them. */
export function differences(issued: NightFigures, now: NightFigures): Difference[] {
  const lanes = both(issued.byLane, now.byLane, ({ lane }) => lane);
  const kinds = both(issued.byKind, now.byKind, ({ kind }) => kind);
  return [
    ...unlike({ lane: null, kind: null }, houseValues(issued), houseValues(now)),
    ...lanes.flatMap(({ of: lane, before, after }) => unlike({ lane, kind: null }, before && laneValues(before), after && laneValues(after))),
    ...kinds.flatMap(({ of: kind, before, after }) => unlike({ lane: null, kind }, before && kindValues(before), after && kindValues(after))),
  ];
}

/** What either side has of each lane or kind, in the order of the side that stands now. */
function both<T, K>(issued: readonly T[], now: readonly T[], of: (one: T) => K): { of: K; before: T | undefined; after: T | undefined }[] {
  const all = [...new Set([...now, ...issued].map(of))];
  return all.map((key) => ({ of: key, before: issued.find((one) => of(one) === key), after: now.find((one) => of(one) === key) }));
}

function unlike(place: Pick<Difference, 'lane' | 'kind'>, issued: Values = {}, now: Values = {}): Difference[] {
  const figures = [...new Set([...Object.keys(now), ...Object.keys(issued)])];
  return figures.map((figure) => ({ ...place, figure, issued: issued[figure] ?? null, now: now[figure] ?? null })).filter((one) => one.issued !== one.now);
}

const countValues = (c: Counts): Values => ({
  frames: c.frames, framesEstimated: c.framesEstimated, deliveries: c.deliveries, games: c.games, stops: c.stops, calls: c.calls, bowlerCalls: c.bowlerCalls, foreignCalls: c.foreignCalls,
});
const laneValues = (l: LaneFigures): Values => ({ ...countValues(l), occupancy: l.occupancy, downMs: l.downMs, wantedDownMs: l.wantedDownMs });
const kindValues = (k: NightFigures['byKind'][number]): Values => ({ ...countValues(k), playedMs: k.playedMs });
const houseValues = (f: NightFigures): Values => ({
  ...countValues(f.total), occupancy: f.total.occupancyOfAll, occupancyInService: f.total.occupancyInService, downMs: f.total.downMs, wantedDownMs: f.total.wantedDownMs,
  leagueLostMs: f.leagueLostMs, acknowledgedMs: f.acknowledged.median, onLaneMs: f.onLane.median, restoredMs: f.restored.median,
  ready: f.ready.ready, readyOf: f.ready.of, lanesDressed: f.dressed.lanes, dressedUl: f.dressed.ul,
});
