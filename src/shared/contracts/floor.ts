import * as z from 'zod/mini';
import { EQUIPMENT, LANE_USES, SAFETY_KINDS } from '../domain/equipment.ts';
import { centreParams, contract, instant, laneNumber, laneParam, line, ok, uuid } from './contract.ts';

export const CALL_STATUSES = ['unanswered', 'acknowledged', 'on-lane', 'parked', 'out-of-service', 'closed'] as const;
export const VERDICTS = ['planned', 'at-risk', 'held', 'ready'] as const;

export const laneView = z.object({
  lane: laneNumber,
  use: z.nullable(z.object({
    kind: z.enum(LANE_USES), label: z.nullable(z.string()), since: instant, until: z.nullable(instant), bowlers: z.nullable(z.int()),
    games: z.nullable(z.int()), session: z.nullable(z.string()),
    /** Nothing bowled for ten minutes: probably forgotten open. */
    quiet: z.boolean(),
  })),
  progress: z.nullable(z.object({ game: z.int(), frame: z.int() })),
  bumpers: z.boolean(),
  /** `unknown`: no pinsetter event was ever heard of this lane. */
  machine: z.enum(['running', 'off', 'stopped', 'mechanic-in', 'out-of-service', 'unknown']),
  stoppedSince: z.nullable(instant),
  /** Pins that stand, as the machine told it at its stop. */
  pins: z.nullable(z.array(z.int())),
  outOfService: z.nullable(z.object({ since: instant, reason: z.string(), by: z.string() })),
  /** The call of this lane that asks most for a person. */
  call: z.nullable(z.object({ id: uuid, status: z.enum(CALL_STATUSES), since: instant, equipment: z.enum(EQUIPMENT), safety: z.nullable(z.enum(SAFETY_KINDS)), returned: z.boolean() })),
  mechanicIn: z.nullable(z.object({ by: z.string(), since: instant })),
  /** Strength 0–1 is an estimate from deliveries and hours; length in feet is null while no pattern of that name is known. */
  film: z.nullable(z.object({
    lengthFt: z.nullable(z.number()), strength: z.number(), deliveries: z.int(), at: instant, pattern: z.nullable(z.string()),
    revision: z.nullable(z.int()), verified: z.boolean(), freshness: z.enum(['fresh', 'ageing', 'worn']),
  })),
  brokenOff: z.boolean(),
  /** A machine is at work here; `since` and the time a lane of that machine, ms, place it on the lane (an estimate). */
  dressing: z.nullable(z.object({ machine: z.string(), run: z.string(), since: instant, paceMs: z.int() })),
  /** Its gateway was silent for 90 s: what is shown is what was last heard. */
  unheard: z.boolean(),
  /** Whether deliveries have ever been heard of this lane. */
  hearsDeliveries: z.boolean(),
});
export type LaneView = z.infer<typeof laneView>;

export const callView = z.object({
  id: uuid, lane: laneNumber, lanesHeld: z.array(laneNumber), scope: z.enum(['lane', 'pair', 'house']), equipment: z.enum(EQUIPMENT),
  safety: z.nullable(z.enum(SAFETY_KINDS)), origin: z.enum(['stop', 'fault', 'bowler', 'desk', 'mechanic']), text: z.nullable(z.string()),
  code: z.nullable(z.string()), status: z.enum(CALL_STATUSES), raisedAt: instant, receivedAt: instant, raisedBy: z.nullable(z.string()),
  mechanic: z.nullable(z.object({ id: z.string(), name: z.string() })), acknowledgedAt: z.nullable(instant), onLaneAt: z.nullable(instant),
  returnedAt: z.nullable(instant), parkedUntil: z.nullable(instant), joined: z.int(),
  mechanicIn: z.nullable(z.object({ by: z.string(), since: instant })), alarmAt: z.nullable(instant),
  /** Who should be looking by now: nobody answered for 3, 6, 9 minutes. */
  escalation: z.enum(['none', 'other-mechanic', 'desk', 'manager']),
  /** What is on the lane: the league, party or open play that waits. */
  playing: z.nullable(z.string()),
});
export type CallView = z.infer<typeof callView>;

export const sessionBar = z.object({
  id: uuid, name: z.string(), kind: z.enum(['league', 'tournament', 'party', 'open', 'practice', 'coaching', 'maintenance']),
  fromLane: laneNumber, toLane: laneNumber, warmUpAt: instant, startAt: instant,
  /** Forecast from frames left and pace, else as booked. */
  endAt: instant, phase: z.enum(['later', 'next', 'warm-up', 'now', 'past']),
  verdict: z.nullable(z.enum(VERDICTS)), /** One sentence for the bar and the side. */ says: z.nullable(z.string()),
  lanes: z.array(z.object({ lane: laneNumber, state: z.enum(['ok', 'waits', 'at-risk', 'holds']) })),
  confirmed: z.nullable(z.object({ by: z.string(), at: instant })), game: z.nullable(z.int()), frame: z.nullable(z.int()),
});
export type SessionBar = z.infer<typeof sessionBar>;

export const runBar = z.object({
  key: z.string(), run: z.string(), machine: z.string(), status: z.enum(['planned', 'under-way', 'finished', 'aborted', 'cancelled']),
  pattern: z.nullable(z.string()), verified: z.boolean(), lanes: z.array(laneNumber), done: z.int(), startAt: z.nullable(instant),
  endAt: z.nullable(instant), /** Under way or planned: `endAt` is a forecast from the machine's own pace. */ forecast: z.boolean(), laneNow: z.nullable(laneNumber),
});
export type RunBar = z.infer<typeof runBar>;

export const machineView = z.object({
  code: z.string(), name: z.string(), tankAMl: z.nullable(z.number()), tankBMl: z.nullable(z.number()), cleanerMl: z.nullable(z.number()),
  wasteMl: z.nullable(z.number()), batteryPct: z.nullable(z.number()), at: z.nullable(instant),
});

export const gatewayView = z.object({
  name: z.string(), heardAt: z.nullable(instant), silent: z.boolean(), clockErrorMs: z.nullable(z.int()), missing: z.nullable(z.string()),
  faults: z.array(z.string()),
});

export const tonight = z.object({
  lanes: z.int(), inUse: z.int(), occupancyPct: z.nullable(z.number()), frames: z.int(), framesEstimated: z.int(), deliveries: z.int(), stops: z.int(),
  rate: z.nullable(z.object({ perThousand: z.number(), low: z.number(), high: z.number() })),
});

export const floorSnapshot = z.object({
  epoch: z.string(), seq: z.int(), at: instant,
  centre: z.object({ slug: z.string(), name: z.string(), zone: z.string(), lanes: z.int() }),
  business: z.object({ date: z.string(), from: instant, to: instant }),
  lanes: z.array(laneView), calls: z.array(callView), sessions: z.array(sessionBar), runs: z.array(runBar),
  machines: z.array(machineView), gateways: z.array(gatewayView), tonight,
});
export type FloorSnapshot = z.infer<typeof floorSnapshot>;

/** What changed after `prevSeq`, in absolute values: `lanes` only those that changed, every other list whole. */
export type FloorDelta = { epoch: string; prevSeq: number; seq: number; at: number } & Partial<
  Pick<FloorSnapshot, 'lanes' | 'calls' | 'sessions' | 'runs' | 'machines' | 'gateways' | 'tonight' | 'business'>
>;

const laneParams = z.extend(centreParams, { lane: laneParam });
const laneAnswer = z.object({ lane: laneView });

export const floorContracts = {
  snapshot: contract({
    id: 'floor.snapshot', method: 'GET', path: '/api/centres/:centre/floor', permission: 'floor.see',
    summary: 'The whole floor at one sequence number', params: centreParams, response: floorSnapshot,
  }),
  open: contract({
    id: 'floor.open', method: 'POST', path: '/api/centres/:centre/lanes/:lane/open', permission: 'lane.operate', summary: 'Note that a lane was opened',
    params: laneParams,
    body: z.object({
      use: z.optional(z.enum(LANE_USES)), label: z.optional(line(60)), bowlers: z.optional(z.int().check(z.minimum(1), z.maximum(20))),
      until: z.optional(instant), games: z.optional(z.int().check(z.minimum(1), z.maximum(50))), bumpers: z.optional(z.boolean()),
    }),
    response: laneAnswer, refusals: ['lane.unknown', 'lane.already-open', 'lane.out-of-service'],
  }),
  close: contract({
    id: 'floor.close', method: 'POST', path: '/api/centres/:centre/lanes/:lane/close', permission: 'lane.operate', summary: 'Note that a lane is free',
    params: laneParams, response: laneAnswer, refusals: ['lane.unknown', 'lane.not-open'],
  }),
  move: contract({
    id: 'floor.move', method: 'POST', path: '/api/centres/:centre/lanes/:lane/move', permission: 'lane.operate', summary: 'The people move to another lane',
    params: laneParams, body: z.object({ to: laneNumber }), response: z.object({ from: laneView, to: laneView }),
    refusals: ['lane.unknown', 'lane.not-open', 'lane.already-open', 'lane.out-of-service', 'lane.same'],
  }),
  outOfService: contract({
    id: 'floor.outOfService', method: 'POST', path: '/api/centres/:centre/lanes/:lane/out-of-service', permission: 'lane.service',
    summary: 'Take a lane out of service', params: laneParams, body: z.object({ reason: line(200) }), response: laneAnswer,
    refusals: ['lane.unknown', 'lane.out-of-service'],
  }),
  backInService: contract({
    id: 'floor.backInService', method: 'POST', path: '/api/centres/:centre/lanes/:lane/back-in-service', permission: 'lane.service',
    summary: 'Put a lane back in service', params: laneParams, response: laneAnswer, refusals: ['lane.unknown', 'lane.in-service', 'lane.held-by-call'],
  }),
  enter: contract({
    id: 'floor.enterCounts', method: 'POST', path: '/api/centres/:centre/lanes/:lane/counts', permission: 'lane.operate',
    summary: 'Enter games or frames by hand, marked estimated', params: laneParams,
    body: z.object({ games: z.optional(z.int().check(z.minimum(0), z.maximum(500))), frames: z.optional(z.int().check(z.minimum(0), z.maximum(5000))) }),
    response: ok, refusals: ['lane.unknown', 'counts.empty'],
  }),
};
