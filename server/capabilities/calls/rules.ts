import { mayBeCause, type Family } from '#shared/domain/calls/causes.ts';
import { statusAt } from '#shared/domain/calls/escalation.ts';
import { mayRecord, nothingRecorded, RELEASE_STEPS, releaseRecorded } from '#shared/domain/calls/lockout-steps.ts';
import type { Call, Lockout } from '#shared/domain/calls/state.ts';
import { lockoutOpen } from '#shared/domain/calls/view.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { Role } from '#shared/policy/policy.ts';
import { conflict, invalid, Refusal } from '#server/platform/http/refusal.ts';
import type { NewFact } from '#server/platform/journal/ledger.ts';

const HOUR = 3_600_000;
/** Longest parking: a part that must be ordered belongs to a lane that is out of service. */
export const PARK_HOURS_MAX = 168;

/** Who acts on which open call, and when (server time, epoch ms). */
export interface Act {
  call: Call;
  by: Person;
  role: Role | null;
  now: number;
}
/** A rule gives the fact to record or throws a Refusal; the call is open. */
export type Rule = (act: Act) => NewFact;

const about = ({ call, by }: Act) => ({ by, after: call.lastAt });

/** Machine calls are the mechanics'; dangers are answered by whoever is nearest. */
function refuseDesk({ call, role }: Act): void {
  if (role === 'desk' && !call.safety) throw new Refusal(403, 'call.desk-answers-dangers');
}

function refuseOutOfService({ call }: Act): void {
  if (call.status === 'out-of-service') throw conflict('call.out-of-service');
}

/** Nothing is given back, parked or taken away while somebody's lockout record stands. */
function refuseLockout({ call }: Act): void {
  if (call.lockout && lockoutOpen(call)) throw conflict('call.mechanic-in-machine', { by: call.lockout.by.name });
}

export const acknowledge: Rule = (act) => {
  refuseDesk(act);
  refuseOutOfService(act);
  const has = act.call.onLane ?? act.call.acknowledged;
  if (has) throw conflict('call.already-acknowledged', { by: has.by.name, byId: has.by.id, at: has.at });
  return { type: 'call.acknowledged', data: { call: act.call.id }, ...about(act) };
};

/** Another mechanic takes the call; never out of the hands of one who is recorded in the machine. */
export const takeOver: Rule = (act) => {
  refuseOutOfService(act);
  const has = act.call.onLane ?? act.call.acknowledged;
  if (!has) throw conflict('call.not-acknowledged');
  if (has.by.id === act.by.id) throw conflict('call.already-yours');
  refuseLockout(act);
  return { type: 'call.acknowledged', data: { call: act.call.id }, ...about(act) };
};

export const onLane: Rule = (act) => {
  refuseDesk(act);
  refuseOutOfService(act);
  const { call, now } = act;
  if (call.onLane && statusAt(call, now) === 'on-lane' && call.status !== 'parked') throw conflict('call.already-on-lane', { by: call.onLane.by.name });
  return { type: 'call.on-lane', data: { call: call.id }, ...about(act) };
};

export const clear = (cause: string, note: string | undefined, family: Family): Rule => (act) => {
  refuseDesk(act);
  refuseOutOfService(act);
  refuseLockout(act);
  return { type: 'call.cleared', data: { call: act.call.id, cause: known(cause, family), note: note || undefined }, ...about(act) };
};

function known(cause: string, family: Family): string {
  if (!mayBeCause(cause, family)) throw invalid('call.cause-unknown', '/cause', { cause });
  return cause;
}

export const park = (reason: string, until: number): Rule => (act) => {
  if (act.call.safety) throw conflict('call.safety-cannot-be-parked');
  refuseOutOfService(act);
  refuseLockout(act);
  if (until <= act.now || until > act.now + PARK_HOURS_MAX * HOUR) throw invalid('call.park-end-invalid', '/until', { hours: PARK_HOURS_MAX });
  return { type: 'call.parked', data: { call: act.call.id, reason, until }, ...about(act) };
};

export const unpark: Rule = (act) => {
  if (act.call.status !== 'parked') throw conflict('call.not-parked');
  return { type: 'call.unparked', data: { call: act.call.id }, ...about(act) };
};

/** A machine may go out of service with its lock on: it stays locked over night. */
export const outOfService = (reason: string): Rule => (act) => {
  refuseOutOfService(act);
  return { type: 'call.out-of-service', data: { call: act.call.id, reason }, ...about(act) };
};

export const backInService = (cause: string | undefined, note: string | undefined, family: Family): Rule => (act) => {
  if (act.call.status !== 'out-of-service') throw conflict('call.not-out-of-service');
  refuseLockout(act);
  const said = cause === undefined ? undefined : known(cause, family);
  return { type: 'call.back-in-service', data: { call: act.call.id, cause: said, note: note || undefined }, ...about(act) };
};

export const lockoutBegin: Rule = (act) => {
  if (act.call.lockout && lockoutOpen(act.call)) throw conflict('lockout.already-begun', { by: act.call.lockout.by.name });
  return { type: 'lockout.begun', data: { call: act.call.id }, ...about(act) };
};

function openLockout({ call }: Act): Lockout {
  if (!call.lockout || !lockoutOpen(call)) throw conflict('lockout.not-begun');
  return call.lockout;
}

/** A lockout is personal: only who put the lock on fills in the record. */
function ownLockout(act: Act): Lockout {
  const lockout = openLockout(act);
  if (lockout.by.id !== act.by.id) throw conflict('lockout.other-mechanic', { by: lockout.by.name });
  return lockout;
}

export const lockoutStep = (step: string, done: boolean): Rule => (act) => {
  const verdict = mayRecord(step, done, ownLockout(act).steps);
  if (!verdict.ok && verdict.code === 'lockout.step-unknown') throw invalid(verdict.code, '/step');
  if (!verdict.ok) throw conflict('lockout.step-out-of-order', { waitsFor: 'waitsFor' in verdict ? verdict.waitsFor : step });
  return { type: 'lockout.stepped', data: { call: act.call.id, step, done }, ...about(act) };
};

export const lockoutRelease: Rule = (act) => {
  const { steps } = ownLockout(act);
  const waitsFor = RELEASE_STEPS.find((step) => steps[step] === undefined);
  if (!releaseRecorded(steps) && !nothingRecorded(steps)) throw conflict('lockout.release-incomplete', { waitsFor: waitsFor ?? '' });
  return { type: 'lockout.released', data: { call: act.call.id }, ...about(act) };
};

/** The owner of the lock has gone: the manager says how the written procedure was followed, and ends the record. */
export const lockoutLeftBehind = (procedure: string): Rule => (act) => {
  openLockout(act);
  return { type: 'lockout.released', data: { call: act.call.id, leftBehind: procedure }, ...about(act) };
};
