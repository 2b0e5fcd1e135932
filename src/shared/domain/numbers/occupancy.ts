import { missing, type Missing } from './missing.ts';
import { cells, intersect, subtract, total, union, type Span } from './spans.ts';

export const QUARTER_HOUR = 15 * 60 * 1000;

/** What one lane was used for on a business day. Lists may overlap; every moment ends up in one class. */
export type LaneDay = {
  outOfService: readonly Span[];
  /** Dressing and maintenance. */
  serviced: readonly Span[];
  /** League play with its warm-up. */
  league: readonly Span[];
  paid: readonly Span[];
  unpaid: readonly Span[];
};

/** Milliseconds of opening time by class. `outOfService` is that part of `blocked` in which the lane wasn't in service. */
export type LaneUse = { league: number; paid: number; unpaid: number; blocked: number; idle: number; outOfService: number; open: number };

type Layered = { [Class in 'outOfService' | 'serviced' | 'league' | 'paid' | 'unpaid' | 'idle']: Span[] };

/** Order of precedence where lists overlap: out of service, dressing and maintenance, league, paid, unpaid; the rest is idle. */
function layers(lane: LaneDay, opening: readonly Span[]): Layered {
  let free = union(opening);
  const take = (wanted: readonly Span[]): Span[] => {
    const taken = intersect(free, wanted);
    free = subtract(free, taken);
    return taken;
  };
  const outOfService = take(lane.outOfService);
  const serviced = take(lane.serviced);
  const league = take(lane.league);
  const paid = take(lane.paid);
  const unpaid = take(lane.unpaid);
  return { outOfService, serviced, league, paid, unpaid, idle: free };
}

function measure(layered: Layered, window: readonly Span[] | null): LaneUse {
  const inside = (spans: Span[]): number => total(window === null ? spans : intersect(spans, window));
  const outOfService = inside(layered.outOfService);
  const blocked = outOfService + inside(layered.serviced);
  const league = inside(layered.league);
  const paid = inside(layered.paid);
  const unpaid = inside(layered.unpaid);
  const idle = inside(layered.idle);
  return { league, paid, unpaid, blocked, idle, outOfService, open: league + paid + unpaid + blocked + idle };
}

/** Use of one lane within opening (or manned) time. The classes add up to `open` exactly. */
export function laneUse(lane: LaneDay, opening: readonly Span[]): LaneUse {
  return measure(layers(lane, opening), null);
}

/** Use of several lanes added up. */
export function addUse(uses: readonly LaneUse[]): LaneUse {
  const sum: LaneUse = { league: 0, paid: 0, unpaid: 0, blocked: 0, idle: 0, outOfService: 0, open: 0 };
  for (const use of uses) for (const key of Object.keys(sum) as (keyof LaneUse)[]) sum[key] += use[key];
  return sum;
}

export type Occupancy = {
  /** (league + paid + unpaid) ÷ opening time of all lanes, 0…1. */
  ofAll: number;
  /** The same ÷ opening time of lanes while in service; null if none was. */
  ofInService: number | null;
};

/** Occupancy as a share, or missing when nothing was open. */
export function occupancy(use: LaneUse): Occupancy | Missing<'not-open'> {
  if (use.open === 0) return missing('not-open');
  const played = use.league + use.paid + use.unpaid;
  const inService = use.open - use.outOfService;
  return { ofAll: played / use.open, ofInService: inService === 0 ? null : played / inService };
}

/**
 * Use of all lanes by quarter hour of a business day, from its start: 92, 96 or 100 cells for a day of 23, 24 or 25 h.
 * Cells add up to the whole day's use.
 */
export function useByQuarterHour(lanes: readonly LaneDay[], opening: readonly Span[], day: Span): { at: Span; use: LaneUse }[] {
  const layered = lanes.map((lane) => layers(lane, opening));
  return cells(day, QUARTER_HOUR).map((at) => ({ at, use: addUse(layered.map((lane) => measure(lane, [at]))) }));
}
