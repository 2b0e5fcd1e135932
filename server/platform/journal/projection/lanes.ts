import type { House } from '#shared/domain/house/state.ts';
import type { LaneState, Use } from '#shared/domain/floor/state.ts';
import { json, type Projection, time, unshared } from './rows.ts';

/** Lanes that changed, each with itself in the other house. */
function changed(house: House, other: House | null): [LaneState, LaneState | null][] {
  return house.floor.flatMap((lane, i) => {
    const before = other?.floor[i] ?? null;
    return lane === before ? [] : [[lane, before]];
  });
}

export const laneStates: Projection = {
  table: 'lane_state',
  key: ['lane'],
  columns: [
    'use_now', 'progress', 'power', 'stop', 'bumpers', 'out_of_service', 'dressed', 'broken_off', 'deliveries_since', 'deliveries_since_by',
    'frames_ever', 'stop_marks', 'hears', 'source', 'last_at',
  ],
  rows: (house, other) => changed(house, other).map(([lane]) => ({
    lane: lane.lane, use_now: json(lane.use), progress: json(lane.progress), power: lane.power, stop: json(lane.stop), bumpers: lane.bumpers,
    out_of_service: json(lane.outOfService), dressed: json(lane.dressed), broken_off: json(lane.brokenOff), deliveries_since: lane.deliveriesSince,
    deliveries_since_by: json(lane.deliveriesSinceBy), frames_ever: lane.framesEver, stop_marks: json(lane.stopMarks), hears: json(lane.hears),
    source: lane.source, last_at: lane.lastAt,
  })),
};

const usesOf = (lane: LaneState | null): Use[] => (lane ? [...lane.uses, ...(lane.use ? [lane.use] : [])] : []);

export const laneUses: Projection = {
  table: 'lane_use',
  key: ['lane', 'from_at'],
  columns: ['kind', 'to_at', 'last_delivery_at', 'bowlers', 'label', 'until_at', 'games', 'opened_by'],
  rows: (house, other) => changed(house, other).flatMap(([lane, before]) => unshared(usesOf(lane), usesOf(before)).map((use) => ({
    lane: lane.lane, from_at: new Date(use.from), kind: use.kind, to_at: time(use.to), last_delivery_at: time(use.lastDeliveryAt), bowlers: use.bowlers,
    label: use.label, until_at: time(use.until), games: use.games, opened_by: use.by,
  }))),
};

const outsOf = (lane: LaneState | null): { from: number; to: number | null; reason: string }[] =>
  lane ? [...lane.outs, ...(lane.outOfService ? [{ from: lane.outOfService.since, to: null, reason: lane.outOfService.reason }] : [])] : [];

export const laneOuts: Projection = {
  table: 'lane_out',
  key: ['lane', 'from_at'],
  columns: ['to_at', 'reason'],
  rows: (house, other) => changed(house, other).flatMap(([lane, before]) => {
    if (lane.outs === before?.outs && lane.outOfService === before.outOfService) return [];
    return outsOf(lane).map((out) => ({ lane: lane.lane, from_at: new Date(out.from), to_at: time(out.to), reason: out.reason }));
  }),
};

export const quarterCounters: Projection = {
  table: 'quarter_counter',
  key: ['quarter_at', 'lane', 'kind', 'opened'],
  columns: ['deliveries', 'cycles', 'frames', 'frames_estimated', 'games'],
  rows: (house, other) => changed(house, other).flatMap(([lane, before]) => unshared(lane.counts, before?.counts ?? []).map((count) => ({
    quarter_at: new Date(count.quarter), lane: lane.lane, kind: count.kind, opened: count.opened, deliveries: count.deliveries, cycles: count.cycles,
    frames: count.frames, frames_estimated: count.framesEstimated, games: count.games,
  }))),
};
