import { countsAs } from '../../calls/causes.ts';
import type { Call } from '../../calls/state.ts';
import { neighbourOf, pairOf } from '../../equipment.ts';
import { leagueTimeLost } from '../downtime.ts';
import { clip, intersect, type Span, total, union } from '../spans.ts';
import type { NightInput } from './input.ts';

/** How a call counts: a machine stop makes the rate; bowlers and foreign objects stand apart; the rest is only gross. */
export type Counting = 'machine-stop' | 'bowler' | 'foreign-object' | 'other';

/** One incident is one call, however many stops joined it. Without a cause yet, what stopped the pinsetter counts as its own. */
export function counting(call: Call): Counting {
  if (call.equipment !== 'pinsetter' || call.safety) return 'other';
  if (call.cleared) return countsAs(call.cleared.cause);
  return call.origin === 'bowler' ? 'bowler' : 'machine-stop';
}

/** Stop → restart, restored or clear, and out of service → back, of calls that hold a lane. */
export function downOf(lane: number, input: Pick<NightInput, 'calls' | 'lanes' | 'now' | 'day'>): Span[] {
  const held = input.calls.filter((c) => c.lanesHeld.includes(lane));
  const ended = ({ from, to }: { from: number; to: number | null }): Span => ({ from, to: Math.min(to ?? input.now, input.now) });
  const stops = held.flatMap((c) => c.stops.map(ended));
  const outs = input.lanes.find((l) => l.lane === lane)?.outs.map(ended) ?? [];
  return clip(union(stops, outs), input.day);
}

/** A ball rolled at an instant says that the lane was bowled on in the minute and a half before. */
const BALL_MS = 90_000;

/** League minutes lost, ms: on each pair of a league, once for the pair, and none while they bowl on the other lane. */
export function leagueLost(input: NightInput, down: ReadonlyMap<number, Span[]>): number {
  let lost = 0;
  for (const session of input.sessions.filter((s) => s.kind === 'league' || s.kind === 'tournament')) {
    const league = clip([{ from: session.startAt, to: Math.min(session.endAt, input.now) }], input.day);
    for (const pair of new Set(session.lanes.map(pairOf))) {
      const lanes = [pair, pair + 1].filter((lane) => session.lanes.includes(lane));
      const played = lanes.flatMap((lane) => usesOf(input, lane));
      const [left = [], right = []] = lanes.map((lane) => down.get(lane) ?? []);
      lost += leagueTimeLost({ left, right, league: intersect(league, played), bowledOn: lanes.flatMap((lane) => bowledOn(input, lane)) });
    }
  }
  return lost;
}

function usesOf(input: NightInput, lane: number): Span[] {
  const uses = input.lanes.find((l) => l.lane === lane)?.uses ?? [];
  return union(uses.map((u) => ({ from: u.from, to: Math.min(u.to ?? input.now, input.now) })));
}

function bowledOn(input: NightInput, lane: number): Span[] {
  return union(input.bowled.filter((b) => b.lane === lane || b.lane === neighbourOf(lane)).map((b) => ({ from: b.at - BALL_MS, to: b.at })));
}

/** Times of the mechanics, ms, each from the raising; a missing tap stays missing. */
export function timesOf(calls: readonly Call[]): { acknowledged: number[]; onLane: number[]; restored: number[] } {
  const since = (at: number | null | undefined, call: Call): number[] => (at === null || at === undefined ? [] : [Math.max(0, at - call.raisedAt)]);
  return {
    acknowledged: calls.flatMap((c) => since(c.acknowledged?.at, c)),
    onLane: calls.flatMap((c) => since(c.onLane?.at, c)),
    restored: calls.flatMap((c) => since(c.outOfService?.backAt ?? c.stops.at(-1)?.to ?? c.cleared?.at, c)),
  };
}

export const lengthOf = (spans: readonly Span[]): number => total(union(spans));
