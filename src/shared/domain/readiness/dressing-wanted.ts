import type { Session } from '../leagues/session.ts';
import { WATCHED_KINDS } from '../leagues/session-kinds.ts';
import { pairOf } from '../equipment.ts';
import type { DressingWant, WantedLane } from '../runs/tonight.ts';
import { runFits } from './checks/by-run.ts';
import { laneReadiness, situationOf } from './lane.ts';
import { occupantsOf } from './occupancy.ts';
import { isFrozen, runsAround } from './session.ts';
import type { Surroundings } from './situation.ts';

/** A lane and its pair are free when the last of both has left; null: nobody knows. */
function pairFreeAt(lane: number, session: Session, around: Surroundings): number | null {
  const odd = pairOf(lane);
  const ends = [odd, odd + 1].flatMap((number) => occupantsOf(number, session, around.sessions, around.floor, around.now)).map((one) => one.freeAt);
  return ends.includes(null) ? null : Math.max(around.now, ...ends.map((end) => end ?? 0));
}

/** Lanes that sessions between now and `until` still want dressed, with the run that will do it, if it lays what is wanted. */
export function dressingWanted(around: Surroundings, until: number): DressingWant[] {
  const near = around.sessions.filter((s) => WATCHED_KINDS.includes(s.kind) && s.status === 'booked' && !isFrozen(s, around.now) && s.warmUpAt < until);
  return near.flatMap((session): DressingWant[] => {
    const runs = runsAround(session, around);
    const lanes = session.lanes.flatMap((number): WantedLane[] => {
      const at = situationOf(number, session, around, runs);
      if (!at) return [];
      const waits = laneReadiness(at).checks.some((check) => (check.check === 'pattern' || check.check === 'run-complete') && check.latestStart !== null);
      return waits ? [{ lane: number, freeAt: pairFreeAt(number, session, around), run: at.run && runFits(at.run, at) === 'fits' ? at.run.key : null }] : [];
    });
    return lanes.length === 0 ? [] : [{ session: session.id, name: session.name, warmUpAt: session.warmUpAt, pattern: session.pattern, revision: session.revision, lanes }];
  });
}
