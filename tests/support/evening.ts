import type { Call } from '#shared/domain/calls/state.ts';
import { callKey, lanesHeld, scopeOf } from '#shared/domain/equipment.ts';
import { emptyFloor, type LaneState, type Use } from '#shared/domain/floor/state.ts';
import { lanesBetween } from '#shared/domain/leagues/lanes.ts';
import type { Session } from '#shared/domain/leagues/session.ts';
import { laneReadiness, situationOf } from '#shared/domain/readiness/lane.ts';
import { runsAround, sessionReadiness } from '#shared/domain/readiness/session.ts';
import { DEFAULT_READINESS } from '#shared/domain/readiness/settings.ts';
import type { Surroundings } from '#shared/domain/readiness/situation.ts';
import type { Run } from '#shared/domain/runs/state.ts';

export const MIN = 60_000;
export const HOUR = 60 * MIN;
/** Thursday 14 May 2026, 20:05 in a zone of UTC. */
export const WARM_UP = Date.UTC(2026, 4, 14, 20, 5);

/** A late league on lanes 5–8 that asks for the house pattern, revision 3. */
export function aSession(change: Partial<Session> = {}): Session {
  return {
    id: 'night-owls', kind: 'league', leagueId: 'league-1', name: 'Night Owls', date: '2026-05-14', lanes: lanesBetween(5, 8), warmUpAt: WARM_UP,
    startAt: WARM_UP + 10 * MIN, endAt: WARM_UP + 160 * MIN, status: 'booked', pattern: 'owls', revision: 3, fresh: false, sanctioned: false, teams: 4,
    format: { bowlers: 8, games: 3, absent: 0 }, ...change,
  };
}

export const aUse = (change: Partial<Use> = {}): Use => ({
  kind: 'open', from: WARM_UP - 2 * HOUR, to: null, lastDeliveryAt: null, bowlers: 4, label: null, until: null, games: null, by: 'gateway', ...change,
});

export const aRun = (change: Partial<Run> = {}): Run => ({
  key: 'M1/118', machine: 'M1', run: '118', pattern: 'owls', revision: 3, lanes: [5, 6, 7, 8], status: 'planned', plannedStart: WARM_UP - 30 * MIN, startedAt: null,
  endedAt: null, reason: null, entered: 'hand', done: [], lastAt: WARM_UP - 3 * HOUR, ...change,
});

export function aCall(lane: number, change: Partial<Call> = {}): Call {
  const equipment = change.equipment ?? 'pinsetter';
  const safety = change.safety ?? null;
  const raisedAt = change.raisedAt ?? WARM_UP - 63 * MIN;
  return {
    id: `call-${lane}-${equipment}`, key: callKey(equipment, lane, safety), scope: scopeOf(equipment, safety), lane, equipment, safety,
    lanesHeld: lanesHeld(equipment, lane, safety), raisedAt, receivedAt: raisedAt, raisedBy: null, origin: 'stop', text: null, code: null,
    status: 'unanswered', acknowledged: null, onLane: null, parked: null, outOfService: null, returnedAt: null, cleared: null, lockout: null,
    stops: [{ from: raisedAt, to: null }], steps: [], raises: [], lastAt: raisedAt, ...change,
  };
}

/** An hour before warm-up, eight lanes dressed an hour earlier as the session wants them, nobody on them, all machines running. */
export function anEvening(change: { now?: number; lanes?: Record<number, Partial<LaneState>>; runs?: Run[]; calls?: Call[] } & Partial<Omit<Surroundings, 'lanes' | 'runs' | 'calls'>> = {}): Surroundings {
  const { now = WARM_UP - HOUR, lanes = {}, runs = [], calls = [], ...rest } = change;
  const floor = emptyFloor(8).map((lane): LaneState => ({
    ...lane, power: 'on', hears: { deliveries: true, frames: true, stops: true }, dressed: { at: WARM_UP - 2 * HOUR, machine: 'M1', run: '117', pattern: 'owls', revision: 3 },
    ...lanes[lane.lane],
  }));
  return {
    now, floor,
    calls: { open: Object.fromEntries(calls.filter((call) => call.status !== 'closed').map((call) => [call.key, call])), closed: calls.filter((call) => call.status === 'closed') },
    runs: {
      active: Object.fromEntries(runs.filter((run) => run.status === 'planned' || run.status === 'under-way').map((run) => [run.key, run])),
      ended: runs.filter((run) => run.status !== 'planned' && run.status !== 'under-way'), levels: {}, paces: { M1: [2 * MIN, 2 * MIN, 2 * MIN] },
    },
    lanes: floor.map(({ lane }) => ({ lane, family: 'free-fall', certifiedUntil: '2026-12-31' })), sessions: [aSession()],
    patterns: [{ code: 'owls', name: 'Night Owls', revisions: [{ revision: 2, aUl: 20_000, bUl: 0 }, { revision: 3, aUl: 25_000, bUl: 0 }] }, { code: 'house', name: 'House', revisions: [{ revision: 1, aUl: 22_000, bUl: 0 }] }],
    settings: DEFAULT_READINESS, ...rest,
  };
}

/** Lanes 5–8 undressed: what the late league finds. */
export const undressed = (more: Partial<LaneState> = {}): Record<number, Partial<LaneState>> =>
  Object.fromEntries([5, 6, 7, 8].map((lane) => [lane, { dressed: null, ...more }]));

/** What a check is given for one lane of the session. */
export function seenFrom(lane: number, around: Surroundings, session: Session = aSession()) {
  const at = situationOf(lane, session, around, runsAround(session, around));
  if (!at) throw new Error(`no lane ${lane}`);
  return at;
}

export const readinessOf = (around: Surroundings, session: Session = aSession()) => sessionReadiness(session, around);
export const laneOf = (lane: number, around: Surroundings, session: Session = aSession()) => laneReadiness(seenFrom(lane, around, session));
