import { clearTimeOf, forecastSession, LEAGUE_PACE, type EndForecast } from '../leagues/end-forecast.ts';
import { framesDone, framesOnLane } from '../leagues/frames.ts';
import type { FloorState, LaneState, Use } from '../floor/state.ts';
import type { Session } from '../leagues/session.ts';
import type { Occupant } from './situation.ts';

const MINUTE = 60_000;
/** People of a session are let onto their lanes this long before its warm-up. */
const EARLY_MS = 15 * MINUTE;
/** A session without any news is over this long after its booked end. */
const FORGOTTEN_MS = 3 * 60 * MINUTE;

/** Do these people belong to this session: by its name, or by kind and time? */
export function belongsTo(use: Use, session: Session): boolean {
  if (use.label !== null) return use.label === session.name && use.from >= session.warmUpAt - EARLY_MS;
  const kinds: readonly string[] = session.kind === 'league' ? ['league', 'warmup', 'unknown'] : [session.kind, 'warmup', 'unknown'];
  return kinds.includes(use.kind) && use.from >= session.warmUpAt - EARLY_MS && use.from < session.endAt;
}

/** Lanes of a session on which its people are now. */
export function lanesPlaying(session: Session, floor: FloorState): LaneState[] {
  return session.lanes.flatMap((number) => {
    const lane = floor[number - 1];
    return lane?.use && belongsTo(lane.use, session) ? [lane] : [];
  });
}

/** Game and frame of the slowest lane of a session; null where no scoring tells. */
export function progressOf(session: Session, floor: FloorState): { game: number; frame: number; at: number } | null {
  const heard = lanesPlaying(session, floor).flatMap((lane) => (lane.progress ? [lane.progress] : []));
  return heard.reduce<LaneState['progress']>((slow, next) => (slow && slow.game * 10 + slow.frame <= next.game * 10 + next.frame ? slow : next), null);
}

/** Has it begun and ended: its people came and left, or its time is long over? */
export function isOver(session: Session, floor: FloorState, now: number): boolean {
  if (now < session.startAt) return false;
  if (lanesPlaying(session, floor).length > 0) return now > session.endAt + FORGOTTEN_MS;
  const came = session.lanes.some((number) => floor[number - 1]?.uses.some((use) => belongsTo(use, session)));
  return came || now >= session.endAt;
}

/** When the last of its people left, as heard; null when nobody of it was heard. */
function leftAt(session: Session, floor: FloorState): number | null {
  const ends = session.lanes.flatMap((number) => (floor[number - 1]?.uses ?? []).filter((use) => belongsTo(use, session)).flatMap((use) => use.to ?? []));
  return ends.length === 0 ? null : Math.max(...ends);
}

/** End of a session: as it was when it is over, its forecast while it lasts, or its booking. */
export function endOf(session: Session, floor: FloorState, now: number): EndForecast {
  if (!isOver(session, floor, now)) return forecastOf(session, floor, now);
  const endAt = leftAt(session, floor) ?? session.endAt;
  return { endAt, freeAt: endAt, latestFreeAt: endAt, basis: 'booked' };
}

const forecastOf = (session: Session, floor: FloorState, now: number): EndForecast =>
  forecastSession({ startAt: session.startAt, endAt: session.endAt, format: session.format, progress: progressOf(session, floor) }, now);

/**
 * Who has a lane between now and the warm-up of a session: the people on it, and whoever has booked it until then.
 * The session's own people aren't in its way.
 */
export function occupantsOf(number: number, wanting: Session, sessions: readonly Session[], floor: FloorState, now: number): Occupant[] {
  const lane = floor[number - 1];
  const use = lane?.use ?? null;
  const others = sessions.filter((s) => s.id !== wanting.id && s.status === 'booked' && s.lanes.includes(number) && s.warmUpAt < wanting.warmUpAt && !isOver(s, floor, now));
  const booked = others.map((session) => ofSession(session, number, floor, now));
  if (!lane || !use || belongsTo(use, wanting) || others.some((session) => belongsTo(use, session))) return booked;
  return [ofUse(use, lane, now), ...booked];
}

function ofSession(session: Session, number: number, floor: FloorState, now: number): Occupant {
  const forecast = endOf(session, floor, now);
  const progress = progressOf(session, floor);
  const all = session.format ? framesOnLane(session.format) : null;
  const done = session.format && progress ? framesDone(session.format, progress.game, progress.frame) : 0;
  const use = floor[number - 1]?.use;
  return {
    name: session.name, kind: session.kind, session: session.id, present: use ? belongsTo(use, session) : false, from: session.warmUpAt,
    endAt: forecast.endAt, freeAt: forecast.freeAt, latestFreeAt: forecast.latestFreeAt, framesLeft: all === null ? null : Math.max(0, all - done),
  };
}

function ofUse(use: Use, lane: LaneState, now: number): Occupant {
  const left = framesLeft(use, lane);
  const byFrames = left === null ? null : now + Math.round((left / LEAGUE_PACE.usualPace) * MINUTE);
  const endAt = use.until !== null ? Math.max(use.until, now) : byFrames;
  const clear = clearTimeOf(LEAGUE_PACE);
  return {
    name: use.label, kind: use.kind, session: null, present: true, from: use.from, endAt,
    freeAt: endAt === null ? null : endAt + clear.likely, latestFreeAt: endAt === null ? null : endAt + clear.high,
    framesLeft: left ?? (endAt === null ? null : ((endAt - now) / MINUTE) * LEAGUE_PACE.usualPace),
  };
}

/** Frames that people with a number of games have left on their lane; they don't cross. */
function framesLeft(use: Use, lane: LaneState): number | null {
  if (use.games === null || use.bowlers === null) return null;
  const rounds = lane.progress ? (lane.progress.game - 1) * 10 + lane.progress.frame - 1 : 0;
  return Math.max(0, use.games * 10 - rounds) * use.bowlers;
}
