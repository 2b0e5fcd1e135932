import type { Equipment, SafetyKind, Scope } from '../equipment.ts';
import type { Person } from '../journal/fact.ts';

/**
 * Life of a call, after ANSI/ISA-18.2: unanswered, acknowledged, on lane, parked, out of service, closed.
 * `returnedAt` says apart from that whether the machine runs again by itself.
 */
export type CallStatus = 'unanswered' | 'acknowledged' | 'on-lane' | 'parked' | 'out-of-service' | 'closed';

export type CallStepKind =
  | 'raised' | 'joined' | 'acknowledged' | 'on-lane' | 'parked' | 'unparked' | 'out-of-service' | 'back-in-service'
  | 'cleared' | 'returned' | 'lockout-begun' | 'lockout-step' | 'lockout-released' | 'lockout-alarm';

export interface CallStep {
  at: number;
  kind: CallStepKind;
  by: Person | null;
  text: string | null;
}

export interface Lockout {
  by: Person;
  begunAt: number;
  /** Steps recorded as done, by code, with their time. */
  steps: Record<string, number>;
  /** All steps of the record are done: *mechanic in machine, recorded …*. */
  inMachineSince: number | null;
  releasedAt: number | null;
  /** The machine counted or the lane was opened while somebody was recorded in it. */
  alarmAt: number | null;
}

export interface Call {
  /** Id of the raise that arrived first. */
  id: string;
  key: string;
  scope: Scope;
  lane: number;
  equipment: Equipment;
  safety: SafetyKind | null;
  lanesHeld: number[];
  raisedAt: number;
  /** Arrival of the first-arrived raise: escalation counts from here. */
  receivedAt: number;
  raisedBy: Person | null;
  origin: 'stop' | 'fault' | 'bowler' | 'desk' | 'mechanic';
  text: string | null;
  code: string | null;
  status: CallStatus;
  acknowledged: { at: number; by: Person } | null;
  onLane: { at: number; by: Person } | null;
  parked: { at: number; until: number; reason: string; by: Person } | null;
  outOfService: { at: number; reason: string; by: Person; backAt: number | null } | null;
  returnedAt: number | null;
  cleared: { at: number; by: Person; cause: string; note: string | null } | null;
  lockout: Lockout | null;
  /** Stop → restart, restored or clear; `to` null while it stands. */
  stops: { from: number; to: number | null }[];
  steps: CallStep[];
  /** Every raise that is part of this call: id and arrival; whoever names one of them means this call. */
  raises: { id: string; seq: number; n: number }[];
  lastAt: number;
}

/** `open` by call key; `closed` since the last checkpoint, oldest first. Replaced, never changed in place. */
export interface CallsState {
  open: Readonly<Record<string, Call>>;
  closed: readonly Call[];
}

export const emptyCalls: CallsState = { open: {}, closed: [] };
