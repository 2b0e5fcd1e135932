import { type CheckResult, result } from '../check.ts';
import { type LaneSituation, latestDressing, type Occupant } from '../situation.ts';
import { filmFault } from './film.ts';

/**
 * Free in time: whoever has the lane until then is forecast to be gone, with time to clear, when dressing must begin or,
 * if it needs none, at warm-up.
 */
export function checkLaneFree(at: LaneSituation): CheckResult {
  const { occupants, session, now, settings } = at;
  const last = lastOf(occupants);
  if (!last) return result('lane-free', 'ok', 'lane.free');
  const needed = filmFault(at) ? latestDressing(at) : session.warmUpAt;
  const people = { waitsFor: { kind: 'people' as const, name: last.name }, latestStart: null };
  const params = { name: last.name ?? '', neededAt: needed };
  if (last.freeAt === null || last.latestFreeAt === null) {
    const near = now >= session.warmUpAt - settings.unknownEndMs;
    return result('lane-free', near ? 'at-risk' : 'ok', 'lane.end-unknown', { ...people, waits: !near, params });
  }
  const more = { ...people, params: { ...params, freeAt: last.freeAt }, settles: { by: last.freeAt, what: 'people' as const } };
  if (last.freeAt > needed) return result('lane-free', 'holds', 'lane.free-late', more);
  if (last.latestFreeAt > needed) return result('lane-free', 'at-risk', 'lane.free-tight', more);
  return result('lane-free', 'ok', 'lane.frees', { ...more, waits: true });
}

/** Who leaves last; somebody without a known end counts as last. */
const lastOf = (occupants: readonly Occupant[]): Occupant | undefined =>
  occupants.find((o) => o.freeAt === null) ?? [...occupants].sort((a, b) => (a.freeAt ?? 0) - (b.freeAt ?? 0)).at(-1);
