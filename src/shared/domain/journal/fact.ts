import type { Equipment, LaneUseKind, SafetyKind } from '../equipment.ts';

/** What a gateway reports, as validated; the wire format is in contracts/ingest.ts. Lanes by number, instants in epoch ms, volumes in mL as sent. */
export interface DeviceData {
  'lane.opened': { lane: number; use?: LaneUseKind; bowlers?: number; label?: string; until?: number; games?: number; bumpers?: boolean };
  'lane.closed': { lane: number };
  'lane.moved': { from: number; to: number };
  'lane.counted': { lane: number; deliveries?: number; cycles?: number; frames?: number; games?: number; basis?: 'scored' | 'estimated' };
  'game.progress': { lane: number; game: number; frame: number };
  'pinsetter.on': { lane: number };
  'pinsetter.off': { lane: number };
  'pinsetter.stopped': { lane: number; reason?: 'fault' | 'power' | 'unknown'; code?: string; text?: string; pins?: number[] };
  'pinsetter.restarted': { lane: number };
  'equipment.faulted': { equipment: Equipment; lane: number; text?: string };
  'equipment.restored': { equipment: Equipment; lane: number; text?: string };
  'call.requested': { lane: number; equipment?: Equipment; text?: string };
  'run.started': { machine: string; run: string; pattern?: string; revision?: number; lanes?: number[] };
  'run.lane.dressed': {
    machine: string; run: string; lane: number; startedAt: number; finishedAt: number;
    conditionerMl?: { a: number; b?: number }; cleanerMl?: number; measured?: boolean;
  };
  'run.lane.skipped': { machine: string; run: string; lane: number; reason: string };
  'run.finished': { machine: string; run: string };
  'run.aborted': { machine: string; run: string; lane?: number; reason: string };
  'machine.levels': { machine: string; tankAMl?: number; tankBMl?: number; cleanerMl?: number; wasteMl?: number; batteryPct?: number };
  'gateway.started': { queued?: number; uptimeS?: number };
  'gateway.heartbeat': { queued?: number; uptimeS?: number };
}

/** What people and jobs do. `call` is the id of a raise that is part of the call meant. */
export interface PersonData {
  'call.raised': { lane: number; equipment: Equipment; safety?: SafetyKind; text?: string; from: 'desk' | 'mechanic' | 'bowler' };
  'call.acknowledged': { call: string };
  'call.on-lane': { call: string };
  'call.cleared': { call: string; cause: string; note?: string };
  'call.parked': { call: string; reason: string; until: number };
  'call.unparked': { call: string };
  'call.out-of-service': { call: string; reason: string };
  'call.back-in-service': { call: string; cause?: string; note?: string };
  'lane.out-of-service': { lane: number; reason: string };
  'lane.back-in-service': { lane: number };
  'lockout.begun': { call: string };
  'lockout.stepped': { call: string; step: string; done: boolean };
  /** `leftBehind`: how a lock that its owner left was removed, in the manager's words. */
  'lockout.released': { call: string; leftBehind?: string };
  'run.planned': { machine: string; run: string; pattern: string; revision: number; lanes: number[]; startAt: number };
  'run.cancelled': { machine: string; run: string; reason: string };
  'session.confirmed': { session: string; lanes: number[] };
  'session.concern': { session: string; text: string; lane?: number };
  'session.reopened': { session: string; because: string };
}

export type FactData = DeviceData & PersonData;
export type FactType = keyof FactData;

export interface Person {
  kind: 'user' | 'gateway' | 'job';
  id: string;
  name: string;
}

interface FactFrame {
  /** Arrival: sequence number of the unit of work, and place in it. */
  seq: number;
  n: number;
  source: string;
  id: string;
  /** Place in time, epoch ms. For `run.lane.dressed` this is `finishedAt`. */
  time: number;
  /** When the server took it, epoch ms. */
  receivedAt: number;
  by: Person | null;
}

export type FactOf<T extends FactType> = FactFrame & { type: T; data: FactData[T] };
/** One line of the journal: a distributive union, so that `fact.type` narrows `fact.data`. */
export type Fact = { [T in FactType]: FactOf<T> }[FactType];
