import type { FloorSnapshot } from '#shared/contracts/floor.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import type { House } from '#shared/domain/house/state.ts';
import { nightFigures } from '#shared/domain/numbers/night/figures.ts';
import { spanOf } from '#shared/domain/numbers/night/input.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { openingWithin } from './night.ts';
import type { NumbersSources } from './sources.ts';

/** The few figures of the running night that the floor shows, from the folded house: the same functions as the report. */
export async function tonight(sources: NumbersSources, centre: CentreRef, house: House, now: number): Promise<FloorSnapshot['tonight']> {
  const day = businessDayAt(now, centre.zone, centre.cut);
  const [sessions, hours] = await Promise.all([sources.sessions(centre, day.from, day.to), sources.opening(centre)]);
  const dressed = [...house.runs.ended, ...Object.values(house.runs.active)].flatMap((r) => r.done.filter((d) => d.outcome === 'dressed' && (d.finishedAt ?? 0) > day.from));
  const lanes = house.floor.map((lane) => ({
    lane: lane.lane,
    uses: lane.use ? [...lane.uses, lane.use] : lane.uses,
    outs: lane.outOfService ? [...lane.outs, { from: lane.outOfService.since, to: null }] : lane.outs,
    counts: lane.counts.filter((c) => c.quarter >= day.from),
    dressings: dressed.filter((d) => d.lane === lane.lane).map((d) => ({ from: d.startedAt ?? d.finishedAt ?? 0, to: d.finishedAt ?? 0, ul: d.aUl })),
  }));
  const calls = [...house.calls.closed, ...Object.values(house.calls.open)];
  const figures = nightFigures({
    day, now, opening: openingWithin(day, hours, centre.zone), lanes, sessions, calls, bowled: [], ready: { ready: 0, of: 0 },
  });
  const { total } = figures;
  return {
    lanes: house.floor.length,
    inUse: house.floor.filter((lane) => lane.use && spanOf(lane.use, now).to >= now).length,
    occupancyPct: total.occupancyOfAll === null ? null : Math.round(total.occupancyOfAll * 1000) / 10,
    frames: total.frames, framesEstimated: total.framesEstimated, deliveries: total.deliveries, stops: total.stops, rate: total.rate,
  };
}
