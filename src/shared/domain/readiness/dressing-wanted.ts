import type { Session } from '../leagues/session.ts';
import { WATCHED_KINDS } from '../leagues/session-kinds.ts';
import { neighbourOf } from '../equipment.ts';
import { pairRelease } from '../runs/plan/release.ts';
import type { DressingWant, WantedLane } from '../runs/tonight.ts';
import { runFits } from './checks/by-run.ts';
import { laneReadiness, situationOf } from './lane.ts';
import { occupantsOf } from './occupancy.ts';
import { isFrozen, runsAround } from './session.ts';
import type { Surroundings } from './situation.ts';

/** When the last of those who have a lane before this session has left it; null: nobody knows. */
function freeAt(lane: number, session: Session, around: Surroundings): number | null {
  const ends = occupantsOf(lane, session, around.sessions, around.floor, around.now).map((one) => one.freeAt);
  return ends.includes(null) ? null : Math.max(around.now, ...ends.map((end) => end ?? 0));
}

/** Lanes that sessions between now and `until` still want dressed, with the run that will do it, if it lays what is wanted. */
export function dressingWanted(around: Surroundings, until: number): DressingWant[] {
  const near = around.sessions.filter((s) => WATCHED_KINDS.includes(s.kind) && s.status === 'booked' && !isFrozen(s, around.now) && s.warmUpAt < until);
  return near.flatMap((session): DressingWant[] => {
    const runs = runsAround(session, around);
    const free = new Map(session.lanes.flatMap((lane) => [lane, neighbourOf(lane)]).map((lane) => [lane, freeAt(lane, session, around)]));
    const lanes = session.lanes.flatMap((number): WantedLane[] => {
      const at = situationOf(number, session, around, runs);
      if (!at) return [];
      const waits = laneReadiness(at).checks.some((check) => (check.check === 'pattern' || check.check === 'run-complete') && check.latestStart !== null);
      return waits ? [{ lane: number, freeAt: pairRelease(number, free, around.now, false), run: at.run && runFits(at.run, at) === 'fits' ? at.run.key : null }] : [];
    });
    return lanes.length === 0 ? [] : [{ session: session.id, name: session.name, warmUpAt: session.warmUpAt, pattern: session.pattern, revision: session.revision, lanes }];
  });
}
