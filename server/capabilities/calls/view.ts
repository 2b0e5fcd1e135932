import type { CallView } from '#shared/contracts/floor.ts';
import type { CallDetail, ClosedCall } from '#shared/contracts/calls.ts';
import { pastCall, stopsInLastFrames } from '#shared/domain/calls/history.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import { callFacts } from '#shared/domain/calls/view.ts';
import { neighbourOf } from '#shared/domain/equipment.ts';
import { escalationBy, type HouseRules } from '#shared/domain/house-rules.ts';
import type { House } from '#shared/domain/house/state.ts';
import { useNames } from '#shared/text/en/calls.ts';

/** A call as screens and the floor show it. */
export function callView(call: Call, house: House, now: number, rules: HouseRules): CallView {
  const { playing, ...facts } = callFacts(call, house, now, escalationBy(rules));
  return { ...facts, playing: playing && (playing.label ?? useNames[playing.kind]) };
}

/** What a call's page needs besides the call itself. */
export interface Around {
  last: CallDetail['history']['last'];
  causeTimes: Record<string, number>;
  family: CallDetail['family'];
  rules: HouseRules;
}

export function callDetail(call: Call, house: House, now: number, around: Around): CallDetail {
  const other = neighbourOf(call.lane);
  const neighbour = call.scope === 'house' ? undefined : house.floor[other - 1];
  const ended = call.status === 'closed' ? pastCall(call) : null;
  return {
    ...callView(call, house, now, around.rules),
    steps: call.steps.map((step) => ({ at: step.at, kind: step.kind, by: step.by?.name ?? null, text: step.text })),
    lockout: call.lockout && {
      by: call.lockout.by.name, byId: call.lockout.by.id, begunAt: call.lockout.begunAt, steps: call.lockout.steps,
      inMachineSince: call.lockout.inMachineSince, releasedAt: call.lockout.releasedAt,
    },
    cleared: ended && { at: ended.at, by: ended.by ?? '', cause: ended.cause ?? '', note: ended.note },
    history: { stopsIn200Frames: call.scope === 'house' ? null : stopsInLastFrames(house.floor[call.lane - 1]), last: around.last },
    neighbour: neighbour ? { lane: other, waits: neighbour.use !== null && call.lanesHeld.includes(other) } : null,
    outOfService: call.outOfService && call.outOfService.backAt === null ? { since: call.outOfService.at, reason: call.outOfService.reason, by: call.outOfService.by.name } : null,
    family: around.family,
    causeTimes: around.causeTimes,
  };
}

export function closedCall(call: Call, house: House, now: number, rules: HouseRules): ClosedCall {
  const past = pastCall(call);
  return { ...callView(call, house, now, rules), playing: null, closedAt: past.at, closedBy: past.by, cause: past.cause, note: past.note, downMs: past.downMs };
}
