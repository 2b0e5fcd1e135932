import type { CountKind } from '../equipment.ts';
import type { FactOf } from '../journal/fact.ts';
import { changeLane } from './lane-change.ts';
import type { FloorState, LaneState, QuarterCount } from './state.ts';

export const QUARTER_MS = 15 * 60_000;
export const quarterOf = (instant: number): number => Math.floor(instant / QUARTER_MS) * QUARTER_MS;

/** Counts always count: deliveries wear the film, cycles the machine, frames are the base of rates; on a closed lane as unassigned. */
export function count(floor: FloorState, fact: FactOf<'lane.counted'>): FloorState {
  return changeLane(floor, fact.data.lane, fact, (lane) => {
    const said = fact.data;
    const deliveries = said.deliveries ?? 0;
    const frames = said.frames ?? 0;
    const opened = lane.use?.from ?? 0;
    const bowled = deliveries > 0 || frames > 0;
    return {
      use: lane.use && bowled ? { ...lane.use, lastDeliveryAt: fact.time } : lane.use,
      deliveriesSince: lane.deliveriesSince + deliveries,
      deliveriesSinceBy: deliveries > 0 ? addTo(lane.deliveriesSinceBy, String(opened), deliveries) : lane.deliveriesSinceBy,
      framesEver: lane.framesEver + frames,
      hears: {
        ...lane.hears,
        deliveries: lane.hears.deliveries || said.deliveries !== undefined,
        frames: lane.hears.frames || said.frames !== undefined,
      },
      counts: added(lane, fact, lane.use?.kind ?? 'unassigned', opened),
    };
  });
}

const addTo = (sums: Record<string, number>, key: string, amount: number): Record<string, number> => ({ ...sums, [key]: (sums[key] ?? 0) + amount });

function added(lane: LaneState, fact: FactOf<'lane.counted'>, kind: CountKind, opened: number): QuarterCount[] {
  const quarter = quarterOf(fact.time);
  const last = lane.counts.findLastIndex((c) => c.quarter === quarter && c.kind === kind && c.opened === opened);
  const base = lane.counts[last] ?? { quarter, kind, opened, deliveries: 0, cycles: 0, frames: 0, framesEstimated: 0, games: 0 };
  const estimated = fact.data.basis === 'estimated';
  const frames = fact.data.frames ?? 0;
  const next: QuarterCount = {
    ...base,
    deliveries: base.deliveries + (fact.data.deliveries ?? 0),
    cycles: base.cycles + (fact.data.cycles ?? 0),
    frames: base.frames + (estimated ? 0 : frames),
    framesEstimated: base.framesEstimated + (estimated ? frames : 0),
    games: base.games + (fact.data.games ?? 0),
  };
  return last < 0 ? [...lane.counts, next] : lane.counts.with(last, next);
}
