import type { Call, CallsState } from '../calls/state.ts';
import { pairOf } from '../equipment.ts';
import type { Session } from '../leagues/session.ts';
import { CHECKS, type CheckName, type CheckResult, type LaneMark, markOf, worstOf } from './check.ts';
import { checkBumpers } from './checks/bumpers.ts';
import { checkCertificate } from './checks/certificate.ts';
import { checkLaneFree } from './checks/lane-free.ts';
import { checkMachine } from './checks/machine.ts';
import { checkOtherEquipment } from './checks/other-equipment.ts';
import { checkPattern } from './checks/pattern.ts';
import { checkPinsetter } from './checks/pinsetter.ts';
import { checkRepeatedStops } from './checks/repeated-stops.ts';
import { checkRunComplete } from './checks/run-complete.ts';
import { paceOf } from '../runs/lane-time.ts';
import { occupantsOf } from './occupancy.ts';
import { runFor } from './run-forecast.ts';
import type { ReadinessSettings } from './settings.ts';
import type { LaneSituation, RunOnLane, Surroundings } from './situation.ts';

const BY_NAME: Record<CheckName, (at: LaneSituation) => CheckResult> = {
  pattern: checkPattern, 'run-complete': checkRunComplete, machine: checkMachine, 'lane-free': checkLaneFree, pinsetter: checkPinsetter,
  'repeated-stops': checkRepeatedStops, 'other-equipment': checkOtherEquipment, bumpers: checkBumpers, certificate: checkCertificate,
};

export interface LaneReadiness {
  lane: number;
  mark: LaneMark;
  checks: CheckResult[];
}

/** One lane of a session as its checks see it. */
export function situationOf(number: number, session: Session, around: Surroundings, runs: readonly RunOnLane[]): LaneSituation | null {
  const lane = around.floor[number - 1];
  if (!lane) return null;
  const run = runFor(number, runs, session.warmUpAt);
  const factsOf = new Map(around.lanes.map((facts) => [facts.lane, facts]));
  return {
    now: around.now, session, lane, facts: factsOf.get(number) ?? null,
    families: session.lanes.flatMap((n) => factsOf.get(n)?.family ?? []),
    calls: callsOf(number, around.calls), repairedAt: repairedAt(number, around.calls),
    occupants: occupantsOf(number, session, around.sessions, around.floor, around.now),
    run, paceMs: run ? paceOf(around.runs, run.machine, around.settings.usualPaceMs) : around.settings.usualPaceMs,
    levels: around.runs.levels, patterns: around.patterns, settings: around.settings,
  };
}

/** Open calls that concern a lane: its own, those that hold it, and those of the house. */
export const callsOf = (lane: number, calls: CallsState): Call[] =>
  Object.values(calls.open).filter((call) => call.lanesHeld.includes(lane) || call.scope === 'house' || call.equipment === 'lane-machine' || (call.scope === 'pair' ? pairOf(call.lane) === pairOf(lane) : call.lane === lane));

/** When a mechanic was last at this lane's pinsetter. */
function repairedAt(lane: number, calls: CallsState): number | null {
  const here = [...calls.closed, ...Object.values(calls.open)].filter((call) => call.equipment === 'pinsetter' && call.lane === lane);
  const times = here.flatMap((call) => [call.onLane?.at ?? 0, call.lockout?.inMachineSince ?? 0]);
  return Math.max(0, ...times) || null;
}

/** All checks of a lane as the centre weighs them. */
export function laneReadiness(at: LaneSituation): LaneReadiness {
  const checks = CHECKS.filter((name) => at.settings.weights[name] !== 'ignored').map((name) => weighed(BY_NAME[name](at), at.settings));
  return { lane: at.lane.lane, mark: worstOf(checks.map(markOf)), checks };
}

const weighed = (check: CheckResult, settings: ReadinessSettings): CheckResult =>
  check.verdict === 'holds' && settings.weights[check.check] === 'warns' ? { ...check, verdict: 'at-risk' } : check;
