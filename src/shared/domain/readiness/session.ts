import { pairOf } from '../equipment.ts';
import type { Session } from '../leagues/session.ts';
import { type CheckResult, type LaneMark, markOf, rankOf, worstOf } from './check.ts';
import { type LaneReadiness, laneReadiness, situationOf } from './lane.ts';
import { occupantsOf } from './occupancy.ts';
import { forecastRuns } from './run-forecast.ts';
import type { RunOnLane, Surroundings } from './situation.ts';

export const SESSION_VERDICTS = ['planned', 'at-risk', 'held', 'ready'] as const;
export type SessionVerdict = (typeof SESSION_VERDICTS)[number];

export interface SessionReadiness {
  session: string;
  at: number;
  verdict: SessionVerdict;
  lanes: LaneReadiness[];
}

const OF_MARK: Record<LaneMark, SessionVerdict> = { ok: 'ready', waits: 'planned', 'at-risk': 'at-risk', holds: 'held' };

/** From warm-up on readiness is frozen: stops during play are calls. */
export const isFrozen = (session: Pick<Session, 'warmUpAt'>, now: number): boolean => now >= session.warmUpAt;

/** Readiness of a session, now and as forecast at its warm-up: its worst lane. */
export function sessionReadiness(session: Session, around: Surroundings): SessionReadiness {
  const runs = runsAround(session, around);
  const lanes = session.lanes.flatMap((number) => {
    const at = situationOf(number, session, around, runs);
    return at ? [laneReadiness(at)] : [];
  });
  return { session: session.id, at: around.now, verdict: OF_MARK[worstOf(lanes.map((lane) => lane.mark))], lanes };
}

/** Runs with their times, held back by whoever has a pair until this session comes. */
export function runsAround(session: Session, around: Surroundings): RunOnLane[] {
  const free = new Map<number, number>();
  const visited = Object.values(around.runs.active).flatMap((run) => run.lanes ?? []);
  for (const number of new Set([...session.lanes, ...visited])) {
    for (const { freeAt } of occupantsOf(number, session, around.sessions, around.floor, around.now)) {
      const pair = pairOf(number);
      free.set(pair, Math.max(free.get(pair) ?? 0, freeAt ?? 0));
    }
  }
  return forecastRuns(around.runs, free, around.now, around.settings);
}

/** Lanes with the same thing outstanding, worst first: what the sentence about the session speaks of. */
export interface Outstanding {
  lanes: number[];
  check: CheckResult;
}

export function outstanding(readiness: Pick<SessionReadiness, 'lanes'>): Outstanding[] {
  const groups = new Map<string, Outstanding>();
  for (const lane of readiness.lanes) {
    const check = [...lane.checks].sort((a, b) => rankOf(markOf(b)) - rankOf(markOf(a)))[0];
    if (!check || markOf(check) === 'ok') continue;
    const key = check.code === 'pattern.run-planned' || check.code === 'pattern.being-dressed' ? `run:${check.params['run'] ?? ''}` : `${check.code}:${JSON.stringify(check.params)}`;
    const group = groups.get(key);
    if (!group) groups.set(key, { lanes: [lane.lane], check });
    else {
      group.lanes.push(lane.lane);
      if ((check.settles?.by ?? 0) > (group.check.settles?.by ?? 0)) group.check = check;
    }
  }
  return [...groups.values()].sort((a, b) => rankOf(markOf(b.check)) - rankOf(markOf(a.check)) || (a.lanes[0] ?? 0) - (b.lanes[0] ?? 0));
}

/** Instants that matter until warm-up, in order, each with its lanes. */
export interface Moment {
  at: number;
  kind: 'settles' | 'latest';
  lanes: number[];
  mark: LaneMark;
}

export function moments(readiness: Pick<SessionReadiness, 'lanes'>): Moment[] {
  return outstanding(readiness).flatMap(({ lanes, check }) => {
    if (!check.settles) return [];
    const mark = markOf(check);
    return [{ at: check.settles.by, kind: mark === 'holds' ? 'latest' as const : 'settles' as const, lanes, mark }];
  }).sort((a, b) => a.at - b.at);
}
