import type { Call } from '../../calls/state.ts';
import { type CountKind, LANE_USES } from '../../equipment.ts';
import { downtime } from '../downtime.ts';
import { lineage } from '../lineage.ts';
import { isMissing } from '../missing.ts';
import { addUse, type LaneDay, laneUse, type LaneUse, occupancy } from '../occupancy.ts';
import { median, percentile } from '../percentiles.ts';
import { framesPerStop, perThousand } from '../rates.ts';
import { clip, type Span, union } from '../spans.ts';
import { kindAt, type LaneNight, type NightInput, spanOf } from './input.ts';
import { counting, downOf, leagueLost, timesOf } from './stops.ts';

export interface Rate {
  perThousand: number;
  low: number;
  high: number;
}

/** Counts of a lane, a kind of play or the house. Scored and estimated frames are never added up; rates are of scored frames. */
export interface Counts {
  deliveries: number;
  frames: number;
  framesEstimated: number;
  games: number;
  /** Games' worth of scored frames. */
  lineage: number;
  /** Machine stops: one for an incident. */
  stops: number;
  /** Every call of whatever kind. */
  calls: number;
  bowlerCalls: number;
  foreignCalls: number;
  /** Machine stops a thousand scored frames, exact 95 % limits; null without frames. */
  rate: Rate | null;
  /** Every call a thousand frames. */
  grossRate: Rate | null;
  framesPerStop: { value: number | null; low: number; high: number | null } | null;
}

export interface Spread {
  median: number | null;
  p90: number | null;
  n: number;
}

export interface LaneFigures extends Counts {
  lane: number;
  /** Opening time by class, ms. */
  use: LaneUse;
  occupancy: number | null;
  downMs: number;
  wantedDownMs: number;
}

export interface NightFigures {
  total: Counts & { use: LaneUse; occupancyOfAll: number | null; occupancyInService: number | null; downMs: number; wantedDownMs: number };
  byKind: (Counts & { kind: CountKind; playedMs: number })[];
  byLane: LaneFigures[];
  leagueLostMs: number;
  /** From the raising of a call, ms. */
  acknowledged: Spread;
  onLane: Spread;
  restored: Spread;
  ready: { ready: number; of: number };
  dressed: { lanes: number; ul: number; told: number };
}

const KINDS: readonly CountKind[] = [...LANE_USES, 'unassigned'];

/** The figures of one business day, from counters, uses, calls and runs. Pure: the same input gives the same figures. */
export function nightFigures(input: NightInput): NightFigures {
  const raised = input.calls.filter((c) => input.day.from <= c.raisedAt && c.raisedAt < input.day.to);
  const down = new Map(input.lanes.map((l) => [l.lane, downOf(l.lane, input)]));
  const byLane = input.lanes.map((lane) => laneFigures(lane, input, raised, down.get(lane.lane) ?? []));
  const use = addUse(byLane.map((l) => l.use));
  const share = occupancy(use);
  const times = timesOf(raised.filter((c) => c.equipment !== 'power'));
  const dressings = input.lanes.flatMap((l) => l.dressings);
  return {
    total: {
      ...countsOf(input.lanes, input, raised, () => true), use,
      occupancyOfAll: isMissing(share) ? null : share.ofAll, occupancyInService: isMissing(share) ? null : share.ofInService,
      downMs: sum(byLane, (l) => l.downMs), wantedDownMs: sum(byLane, (l) => l.wantedDownMs),
    },
    byKind: KINDS.map((kind) => kindFigures(kind, input, raised)).filter((k) => k.deliveries + k.frames + k.framesEstimated + k.calls + k.playedMs > 0),
    byLane,
    leagueLostMs: leagueLost(input, down),
    acknowledged: spread(times.acknowledged), onLane: spread(times.onLane), restored: spread(times.restored),
    ready: input.ready,
    dressed: { lanes: dressings.length, ul: sum(dressings, (d) => d.ul ?? 0), told: dressings.filter((d) => d.ul !== null).length },
  };
}

const sum = <T>(list: readonly T[], of: (item: T) => number): number => list.reduce((all, item) => all + of(item), 0);

function spread(values: readonly number[]): Spread {
  const middle = median(values);
  const high = percentile(values, 0.9);
  return { median: middle.value, p90: high.value, n: values.length };
}

/** Kind of play that was on a lane when its call was raised. */
function kindOfCall(call: Call, input: NightInput): CountKind {
  const use = input.lanes.find((l) => l.lane === call.lane)?.uses.find((u) => u.from <= call.raisedAt && call.raisedAt < (u.to ?? input.now));
  return use ? kindAt(use.kind, call.lane, call.raisedAt, input.sessions) : 'unassigned';
}

function countsOf(lanes: readonly LaneNight[], input: NightInput, calls: readonly Call[], ofKind: (kind: CountKind) => boolean): Counts {
  const counts = lanes.flatMap((l) => l.counts.filter((c) => ofKind(kindAt(c.kind, l.lane, Math.max(c.opened, c.quarter), input.sessions))));
  const frames = sum(counts, (c) => (c.kind === 'warmup' ? 0 : c.frames));
  const ways = calls.map(counting);
  const many = (way: ReturnType<typeof counting>): number => ways.filter((w) => w === way).length;
  const per = framesPerStop(many('machine-stop'), frames);
  return {
    deliveries: sum(counts, (c) => c.deliveries), frames, framesEstimated: sum(counts, (c) => c.framesEstimated), games: sum(counts, (c) => c.games),
    lineage: lineage(frames), stops: many('machine-stop'), calls: calls.length, bowlerCalls: many('bowler'), foreignCalls: many('foreign-object'),
    rate: rateOf(many('machine-stop'), frames), grossRate: rateOf(calls.length, frames), framesPerStop: isMissing(per) ? null : per,
  };
}

/** Machine stops a thousand frames; null without frames: there is no rate, not a rate of 0. */
export function rateOf(count: number, frames: number): Rate | null {
  const rate = perThousand(count, frames);
  return isMissing(rate) ? null : { perThousand: rate.rate, low: rate.low, high: rate.high };
}

function kindFigures(kind: CountKind, input: NightInput, raised: readonly Call[]): NightFigures['byKind'][number] {
  // Lane by lane: two lanes that are played on at once are twice the time.
  const played = input.lanes.flatMap((l) => clip(l.uses.filter((u) => kindAt(u.kind, l.lane, u.from, input.sessions) === kind).map((u) => spanOf(u, input.now)), input.day));
  return {
    ...countsOf(input.lanes, input, raised.filter((c) => kindOfCall(c, input) === kind), (k) => k === kind), kind,
    playedMs: sum(played, (s) => s.to - s.from),
  };
}

function laneFigures(lane: LaneNight, input: NightInput, raised: readonly Call[], down: readonly Span[]): LaneFigures {
  const opening = clip(input.opening, { from: input.day.from, to: Math.min(input.day.to, input.now) });
  const day = laneDay(lane, input);
  const use = laneUse(day, opening);
  const share = occupancy(use);
  const booked = input.sessions.filter((s) => s.lanes.includes(lane.lane)).map((s) => ({ from: s.warmUpAt, to: s.endAt }));
  const lost = downtime({ down, opening, wanted: union(booked, [...day.league, ...day.paid, ...day.unpaid]) });
  return {
    lane: lane.lane, ...countsOf([lane], input, raised.filter((c) => c.lane === lane.lane), () => true), use,
    occupancy: isMissing(share) ? null : share.ofAll, downMs: lost.total, wantedDownMs: lost.wanted,
  };
}

/** Each minute of a lane in one class: warm-up belongs to its league, coaching counts as unpaid (no till is asked). */
export function laneDay(lane: LaneNight, input: Pick<NightInput, 'sessions' | 'now'>): LaneDay {
  const of = (...kinds: CountKind[]): Span[] =>
    lane.uses.filter((u) => kinds.includes(kindAt(u.kind, lane.lane, u.from, input.sessions))).map((u) => spanOf(u, input.now)).filter((s) => s.to > s.from);
  return {
    outOfService: lane.outs.map((o) => ({ from: o.from, to: Math.min(o.to ?? input.now, input.now) })).filter((s) => s.to > s.from),
    serviced: [...of('maintenance'), ...lane.dressings.map(({ from, to }) => ({ from, to: Math.min(to, input.now) })).filter((s) => s.to > s.from)],
    league: of('league', 'tournament', 'warmup'),
    paid: of('open', 'party', 'unknown'),
    unpaid: of('coaching'),
  };
}
