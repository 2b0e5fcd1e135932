import * as z from 'zod/mini';
import { EQUIPMENT, SAFETY_KINDS } from '../domain/equipment.ts';
import { centreParams, contract, instant, laneNumber, line, note, uuid } from './contract.ts';
import { callView } from './floor.ts';

export const callStep = z.object({ at: instant, kind: z.string(), by: z.nullable(z.string()), text: z.nullable(z.string()) });

export const callDetail = z.extend(callView, {
  steps: z.array(callStep),
  lockout: z.nullable(z.object({ by: z.string(), byId: z.string(), begunAt: instant, steps: z.record(z.string(), instant), inMachineSince: z.nullable(instant), releasedAt: z.nullable(instant) })),
  cleared: z.nullable(z.object({ at: instant, by: z.string(), cause: z.string(), note: z.nullable(z.string()) })),
  history: z.object({
    /** Stops of this lane in its last 200 frames; null where no frames are heard. */
    stopsIn200Frames: z.nullable(z.int()),
    last: z.array(z.object({ at: instant, equipment: z.enum(EQUIPMENT), cause: z.nullable(z.string()), note: z.nullable(z.string()), by: z.nullable(z.string()), downMs: z.nullable(z.int()) })),
  }),
  neighbour: z.nullable(z.object({ lane: laneNumber, waits: z.boolean() })),
  outOfService: z.nullable(z.object({ since: instant, reason: z.string(), by: z.string() })),
  /** Family of this lane's pinsetter, where the centre has said it: which causes and which lockout wording fit. */
  family: z.nullable(z.enum(['free-fall', 'string'])),
  /** How often each cause ended a call on this kind of equipment here in the last 90 days, by code. */
  causeTimes: z.record(z.string(), z.int()),
});
export type CallDetail = z.infer<typeof callDetail>;

export const closedCall = z.extend(callView, {
  closedAt: instant, closedBy: z.nullable(z.string()), cause: z.nullable(z.string()), note: z.nullable(z.string()), downMs: z.nullable(z.int()),
});
export type ClosedCall = z.infer<typeof closedCall>;

const callParams = z.extend(centreParams, { call: uuid });
const at = '/api/centres/:centre/calls';
const work = { permission: 'call.work' as const, params: callParams, response: callDetail, method: 'POST' as const };
const closed = ['call.unknown', 'call.already-cleared'] as const;
/** Dangers are answered by whoever is nearest; machine calls by mechanics (`call.desk-answers-dangers`). */
const answer = { ...work, permission: 'call.answer' as const };

export const callContracts = {
  list: contract({
    id: 'calls.list', method: 'GET', path: at, permission: 'call.see', summary: 'Open calls, and those closed this business day', params: centreParams,
    response: z.object({ open: z.array(callView), closed: z.array(closedCall), /** Lanes of the house: where a call can be raised. */ lanes: z.int() }),
  }),
  see: contract({ id: 'calls.see', method: 'GET', path: `${at}/:call`, permission: 'call.see', summary: 'One call with its steps and the history of its lane', params: callParams, response: callDetail, refusals: ['call.unknown'] }),
  raise: contract({
    id: 'calls.raise', method: 'POST', path: at, permission: 'call.raise', summary: 'Raise a call; joins the open one of the same lane or pair and equipment',
    params: centreParams, status: 201,
    body: z.object({ lane: laneNumber, equipment: z._default(z.enum(EQUIPMENT), 'pinsetter'), safety: z.optional(z.enum(SAFETY_KINDS)), text: z.optional(note(300)) }),
    response: callDetail, refusals: ['lane.unknown'],
  }),
  acknowledge: contract({
    ...answer, id: 'calls.acknowledge', path: `${at}/:call/acknowledge`, summary: 'Say "mine"',
    refusals: [...closed, 'call.already-acknowledged', 'call.out-of-service', 'call.desk-answers-dangers'],
  }),
  takeOver: contract({
    ...work, id: 'calls.takeOver', path: `${at}/:call/take-over`, summary: 'Take over from the mechanic who has it',
    refusals: [...closed, 'call.not-acknowledged', 'call.already-yours', 'call.mechanic-in-machine', 'call.out-of-service'],
  }),
  onLane: contract({
    ...answer, id: 'calls.onLane', path: `${at}/:call/on-lane`, summary: 'The mechanic is on the lane',
    refusals: [...closed, 'call.already-on-lane', 'call.out-of-service', 'call.desk-answers-dangers'],
  }),
  clear: contract({
    ...answer, id: 'calls.clear', path: `${at}/:call/clear`, summary: 'Clear with cause and note: back running', body: z.object({ cause: line(60), note: z.optional(note(500)) }),
    refusals: [...closed, 'call.cause-unknown', 'call.mechanic-in-machine', 'call.out-of-service', 'call.desk-answers-dangers'],
  }),
  park: contract({
    ...work, id: 'calls.park', path: `${at}/:call/park`, summary: 'Park with a reason and an end', body: z.object({ reason: line(200), until: instant }),
    refusals: [...closed, 'call.safety-cannot-be-parked', 'call.park-end-invalid', 'call.mechanic-in-machine', 'call.out-of-service'],
  }),
  unpark: contract({ ...work, id: 'calls.unpark', path: `${at}/:call/unpark`, summary: 'Take up a parked call again', refusals: [...closed, 'call.not-parked'] }),
  outOfService: contract({
    ...work, id: 'calls.outOfService', path: `${at}/:call/out-of-service`, summary: 'The lanes of this call go out of service', body: z.object({ reason: line(200) }),
    refusals: [...closed, 'call.out-of-service'],
  }),
  backInService: contract({
    ...work, id: 'calls.backInService', path: `${at}/:call/back-in-service`, summary: 'Back in service: ends the call', body: z.object({ cause: z.optional(line(60)), note: z.optional(note(500)) }),
    refusals: [...closed, 'call.not-out-of-service', 'call.cause-unknown', 'call.mechanic-in-machine'],
  }),
  lockoutBegin: contract({ ...work, id: 'calls.lockoutBegin', path: `${at}/:call/lockout`, summary: 'Somebody reaches in: begin the record. It isolates nothing', refusals: [...closed, 'lockout.already-begun'] }),
  lockoutStep: contract({
    ...work, id: 'calls.lockoutStep', path: `${at}/:call/lockout/step`, summary: 'Record one step, or take it back', body: z.object({ step: line(40), done: z.boolean() }),
    refusals: [...closed, 'lockout.not-begun', 'lockout.step-unknown', 'lockout.step-out-of-order', 'lockout.other-mechanic'],
  }),
  lockoutRelease: contract({
    ...work, id: 'calls.lockoutRelease', path: `${at}/:call/lockout/release`, summary: 'End the record: tools out, guards on, people clear, told, own lock off',
    refusals: [...closed, 'lockout.not-begun', 'lockout.release-incomplete', 'lockout.other-mechanic'],
  }),
  lockoutLeftBehind: contract({
    ...work, id: 'calls.lockoutLeftBehind', path: `${at}/:call/lockout/left-behind`, permission: 'lockout.left-behind',
    summary: 'A lock left behind was removed by the written procedure: the manager ends the record', body: z.object({ procedure: line(300) }),
    refusals: [...closed, 'lockout.not-begun'],
  }),
};
