import type { LaneView, SessionBar } from '#shared/contracts/floor.ts';
import type { LaneUseKind } from '#shared/domain/equipment.ts';
import type { Call, CallStatus } from '#shared/domain/calls/state.ts';
import type { LaneState, Use } from '#shared/domain/floor/state.ts';
import type { House } from '#shared/domain/house/state.ts';
import { type AgeingSettings, filmStrength, freshness, hoursBetween } from '#shared/domain/runs/ageing.ts';
import { paceOf } from '#shared/domain/runs/lane-time.ts';
import type { Run } from '#shared/domain/runs/state.ts';
import type { PatternFacts } from './sources.ts';

/** A lane counts as forgotten open ten minutes after its last delivery. */
const QUIET_MS = 10 * 60_000;

export interface LaneContext {
  now: number;
  house: House;
  sessions: readonly SessionBar[];
  pattern: (code: string, revision: number | null) => PatternFacts | undefined;
  /** Ids of gateways that were silent for 90 s. */
  silent: ReadonlySet<string>;
  ageing: AgeingSettings;
}

/** What a screen shows of one lane: state of the lane, its worst call, its film and what is on it. */
export function laneView(lane: LaneState, context: LaneContext): LaneView {
  const calls = callsOf(lane.lane, context.house);
  const call = calls[0];
  const inside = calls.find((c) => c.lockout?.inMachineSince && !c.lockout.releasedAt)?.lockout;
  return {
    lane: lane.lane,
    use: lane.use && useView(lane, lane.use, context),
    progress: lane.progress && { game: lane.progress.game, frame: lane.progress.frame },
    bumpers: lane.bumpers,
    machine: machineOf(lane, calls, Boolean(inside)),
    stoppedSince: lane.stop?.since ?? calls.find((c) => c.safety)?.raisedAt ?? null,
    pins: lane.stop?.pins ?? null,
    outOfService: lane.outOfService,
    call: call ? { id: call.id, status: call.status, since: call.raisedAt, equipment: call.equipment, safety: call.safety, returned: call.returnedAt !== null } : null,
    mechanicIn: inside?.inMachineSince ? { by: inside.by.name, since: inside.inMachineSince } : null,
    film: filmView(lane, context),
    brokenOff: lane.brokenOff !== null,
    dressing: dressingOf(lane.lane, context),
    unheard: lane.source !== null && context.silent.has(lane.source),
    hearsDeliveries: lane.hears.deliveries,
  };
}

const URGENCY: Record<CallStatus, number> = { 'unanswered': 0, 'on-lane': 1, 'acknowledged': 2, 'out-of-service': 3, 'parked': 4, 'closed': 5 };
const urgency = (call: Call): number => (call.safety ? -10 : 0) + (call.returnedAt === null ? 0 : 10) + URGENCY[call.status];

/** Open calls that hold this lane or name it, the most urgent first. */
function callsOf(lane: number, house: House): Call[] {
  return Object.values(house.calls.open)
    .filter((c) => c.lanesHeld.includes(lane))
    .sort((a, b) => urgency(a) - urgency(b) || a.raisedAt - b.raisedAt);
}

function machineOf(lane: LaneState, calls: readonly Call[], inside: boolean): LaneView['machine'] {
  if (inside) return 'mechanic-in';
  if (lane.outOfService) return 'out-of-service';
  if (lane.stop || calls.some((c) => c.safety)) return 'stopped';
  if (lane.power === 'off') return 'off';
  return lane.power === 'unknown' && !lane.hears.stops && !lane.hears.deliveries ? 'unknown' : 'running';
}

function useView(lane: LaneState, use: Use, { now, sessions }: LaneContext): LaneView['use'] {
  const session = sessions.find((s) => s.phase !== 'past' && s.fromLane <= lane.lane && lane.lane <= s.toLane && s.warmUpAt <= now && now < s.endAt);
  const decided = use.kind === 'unknown' && session ? kindOfSession(session) : use.kind;
  return {
    kind: decided,
    label: use.label ?? (session && decided === kindOfSession(session) ? session.name : null),
    since: use.from, until: use.until, bowlers: use.bowlers, games: use.games,
    session: session && (use.label === null || use.label === session.name) && decided !== 'maintenance' ? session.id : null,
    quiet: lane.hears.deliveries && now - (use.lastDeliveryAt ?? use.from) > QUIET_MS,
  };
}

const kindOfSession = (session: SessionBar): LaneUseKind => (session.kind === 'practice' ? 'warmup' : session.kind);

function filmView(lane: LaneState, { now, pattern, ageing }: LaneContext): LaneView['film'] {
  const dressed = lane.dressed;
  if (!dressed) return null;
  const age = { deliveries: lane.hears.deliveries ? lane.deliveriesSince : null, hours: hoursBetween(dressed.at, now) };
  const known = dressed.pattern === null ? undefined : pattern(dressed.pattern, dressed.revision);
  const fresh = freshness(age, ageing);
  return {
    lengthFt: known?.lengthFt ?? null, strength: Math.round((filmStrength(age, ageing).strength ?? 0) * 100) / 100, deliveries: lane.deliveriesSince,
    at: dressed.at, pattern: dressed.pattern, revision: dressed.revision, verified: known?.verified ?? false, freshness: fresh === 'unknown' ? 'ageing' : fresh,
  };
}

/** The lane a machine is on isn't reported: it is the next one of an announced run without an outcome, since the last one ended. */
export function laneUnderMachine(run: Run): { lane: number; since: number } | null {
  if (run.status !== 'under-way' || run.startedAt === null || !run.lanes) return null;
  const lane = run.lanes.find((n) => !run.done.some((d) => d.lane === n));
  const ends = run.done.map((d) => d.finishedAt ?? 0);
  return lane === undefined ? null : { lane, since: Math.max(run.startedAt, ...ends) };
}

function dressingOf(lane: number, { house }: LaneContext): LaneView['dressing'] {
  for (const run of Object.values(house.runs.active)) {
    const at = laneUnderMachine(run);
    if (at?.lane === lane) return { machine: run.machine, run: run.run, since: at.since, paceMs: paceOf(house.runs, run.machine) };
  }
  return null;
}
