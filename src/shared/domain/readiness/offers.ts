import { pairOf } from '../equipment.ts';
import { oneLaneDelay } from '../leagues/end-forecast.ts';
import { pairsOf } from '../leagues/lanes.ts';
import type { Session } from '../leagues/session.ts';
import type { CheckName, CheckResult } from './check.ts';
import { deliveriesAtWarmUp } from './checks/film.ts';
import { type LaneReadiness, laneReadiness, situationOf } from './lane.ts';
import { paceOf } from '../runs/lane-time.ts';
import { lanesLeft } from './run-forecast.ts';
import { runsAround, type SessionReadiness } from './session.ts';
import type { LaneSituation, RunOnLane, Surroundings } from './situation.ts';

export type Offer =
  | { kind: 'move'; fromPair: number; toPair: number; deliveries: number | null }
  | { kind: 'dress-then-move'; fromPair: number; toPair: number; machine: string; startAt: number; doneAt: number }
  | { kind: 'one-lane'; fromPair: number; lane: number; delayMs: number };

export interface Offers {
  /** Pairs of the session on which a lane fails, by their odd lane. */
  failing: number[];
  offers: Offer[];
  /** No pair of the house can be had for the whole session before this instant; null when one is offered, or none is known. */
  noneUntil: number | null;
}

/** What another pair can cure; a pattern that nobody has planned to lay is cured by laying it. */
const OF_THE_PLACE: readonly CheckName[] = ['pinsetter', 'other-equipment', 'lane-free', 'certificate', 'run-complete'];

const fails = (lane: LaneReadiness): boolean => lane.checks.some((check) => check.verdict === 'holds' && OF_THE_PLACE.includes(check.check));

/**
 * First offers when a lane fails: a pair that nobody has booked or wants until the session's end, ready by the very same checks,
 * of the same family, with about as many deliveries since dressing; or one that can be dressed first, in time for warm-up; or to
 * bowl on the lane that is left.
 */
export function offersFor(session: Session, readiness: SessionReadiness, around: Surroundings): Offers {
  const failingLanes = readiness.lanes.filter(fails).map((lane) => lane.lane);
  const failing = pairsOf(failingLanes);
  const found: Offer[] = [];
  const candidates = candidatePairs(session, around);
  for (const fromPair of failing) {
    const taken = found.flatMap((offer) => (offer.kind === 'one-lane' ? [] : [offer.toPair]));
    const best = bestOffer(fromPair, candidates.filter((pair) => !taken.includes(pair)), session, around);
    if (best) found.push(best);
    const alone = oneLane(fromPair, failingLanes, session);
    if (alone) found.push(alone);
  }
  const moved = found.some((offer) => offer.kind !== 'one-lane');
  return { failing, offers: found, noneUntil: failing.length > 0 && !moved ? freeAgain(session, around) : null };
}

/** Pairs outside the session that nobody has booked, and on which no run is planned, from warm-up to its end. */
export function candidatePairs(session: Session, around: Surroundings): number[] {
  const own = new Set(pairsOf(session.lanes));
  const wanted = new Set([...bookedMeanwhile(session, around).flatMap((other) => pairsOf(other.lanes)), ...pairsOf(dressedMeanwhile(session, around))]);
  return pairsOf(around.floor.map((lane) => lane.lane)).filter((pair) => !own.has(pair) && !wanted.has(pair) && around.floor[pair] !== undefined);
}

const bookedMeanwhile = (session: Session, around: Surroundings): Session[] =>
  around.sessions.filter((other) => other.id !== session.id && other.status === 'booked' && other.warmUpAt < session.endAt && other.endAt > session.warmUpAt);

function dressedMeanwhile(session: Session, around: Surroundings): number[] {
  return Object.values(around.runs.active)
    .filter((run) => run.plannedStart !== null && run.plannedStart >= session.warmUpAt && run.plannedStart < session.endAt)
    .flatMap(lanesLeft);
}

interface Candidate {
  pair: number;
  lanes: LaneReadiness[];
  situations: LaneSituation[];
}

function bestOffer(fromPair: number, pairs: readonly number[], session: Session, around: Surroundings): Offer | null {
  const familyOf = (lane: number) => around.lanes.find((facts) => facts.lane === lane)?.family;
  const seen = pairs.filter((pair) => [pair, pair + 1].every((lane) => familyOf(lane) === familyOf(fromPair))).map((pair) => look(pair, session, around));
  const usual = usualDeliveries(session, around);
  const ready = seen.filter((c) => c.lanes.every((lane) => lane.mark === 'ok') && c.situations.every((at) => Math.abs((deliveriesAtWarmUp(at) ?? usual) - usual) <= around.settings.offerDeliveries));
  const near = (a: Candidate, b: Candidate) => Math.abs(a.pair - fromPair) - Math.abs(b.pair - fromPair);
  const move = ready.sort(near)[0];
  if (move) return { kind: 'move', fromPair, toPair: move.pair, deliveries: move.situations.reduce<number | null>((most, at) => Math.max(most ?? 0, deliveriesAtWarmUp(at) ?? 0), null) };
  const dressed = seen.sort(near).flatMap((candidate) => dressFirst(candidate, fromPair, session, around));
  return dressed[0] ?? null;
}

function look(pair: number, session: Session, around: Surroundings): Candidate {
  const moved: Session = { ...session, lanes: [pair, pair + 1] };
  const runs = runsAround(moved, around);
  const situations = [pair, pair + 1].flatMap((lane) => situationOf(lane, moved, around, runs) ?? []);
  return { pair, situations, lanes: situations.map(laneReadiness) };
}

/** Deliveries that the session's lanes are expected to have at warm-up: their middle. */
function usualDeliveries(session: Session, around: Surroundings): number {
  const runs = runsAround(session, around);
  const all = session.lanes.flatMap((lane) => {
    const at = situationOf(lane, session, around, runs);
    return at ? [deliveriesAtWarmUp(at) ?? 0] : [];
  }).sort((a, b) => a - b);
  return all[Math.floor(all.length / 2)] ?? 0;
}

const DRESSABLE: readonly CheckName[] = ['pattern', 'run-complete'];
const isCurable = (check: CheckResult): boolean => check.verdict === 'ok' || (DRESSABLE.includes(check.check) && check.waitsFor?.kind === 'run' && check.waitsFor.name === null);

/** Nothing wrong but its film, nobody in the way too long, and a machine that is done with both lanes in time. */
function dressFirst({ pair, lanes, situations }: Candidate, fromPair: number, session: Session, around: Surroundings): Offer[] {
  if (session.pattern === null || !lanes.every((lane) => lane.checks.every(isCurable))) return [];
  const freeAt = Math.max(around.now, ...situations.flatMap((at) => at.occupants.map((occupant) => occupant.freeAt ?? Number.POSITIVE_INFINITY)));
  const machines = Object.keys({ ...around.runs.paces, ...around.runs.levels });
  const runs = runsAround(session, around);
  return machines.flatMap((machine) => {
    const startAt = Math.max(freeAt, machineFreeAt(machine, runs, around.now));
    const doneAt = startAt + 2 * paceOf(around.runs, machine, around.settings.usualPaceMs);
    const intoOthers = runs.some((run) => run.machine === machine && run.status === 'planned' && run.startAt < doneAt && run.doneAt > startAt);
    return doneAt <= session.warmUpAt && !intoOthers ? [{ kind: 'dress-then-move' as const, fromPair, toPair: pair, machine, startAt, doneAt }] : [];
  }).sort((a, b) => a.doneAt - b.doneAt);
}

/** Behind the run under way; planned ones keep their place. */
const machineFreeAt = (machine: string, runs: readonly RunOnLane[], now: number): number =>
  Math.max(now, ...runs.filter((run) => run.machine === machine && run.status === 'under-way').map((run) => run.doneAt));

function oneLane(fromPair: number, failing: readonly number[], session: Session): Offer | null {
  const left = [fromPair, fromPair + 1].filter((lane) => session.lanes.includes(lane) && !failing.includes(lane));
  const lane = left[0];
  return session.format && left.length === 1 && lane !== undefined ? { kind: 'one-lane', fromPair, lane, delayMs: oneLaneDelay(session.format) } : null;
}

/** The earliest end of what stands on any pair outside the session. */
function freeAgain(session: Session, around: Surroundings): number | null {
  const own = new Set(pairsOf(session.lanes));
  const ends = new Map<number, number>();
  for (const other of bookedMeanwhile(session, around)) {
    for (const pair of new Set(other.lanes.map(pairOf))) if (!own.has(pair)) ends.set(pair, Math.max(ends.get(pair) ?? 0, other.endAt));
  }
  return ends.size > 0 ? Math.min(...ends.values()) : null;
}
