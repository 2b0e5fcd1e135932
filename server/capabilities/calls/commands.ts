import type { Call } from '#shared/domain/calls/state.ts';
import { openCall } from '#shared/domain/calls/work.ts';
import { callKey, type Equipment, type SafetyKind } from '#shared/domain/equipment.ts';
import type { House } from '#shared/domain/house/state.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { Actor, Role } from '#shared/policy/policy.ts';
import { roleIn } from '#shared/policy/policy.ts';
import { conflict, invalid, notFound } from '#server/platform/http/refusal.ts';
import { personOf } from '#server/platform/http/person.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger, NewFact } from '#server/platform/journal/ledger.ts';
import type { CallsReadModel } from './read-model.ts';
import type { Rule } from './rules.ts';

/** A call after a command, with the house it stands in. */
export interface Done {
  call: Call;
  house: House;
  now: number;
}

export interface RaiseInput {
  lane: number;
  equipment: Equipment;
  safety?: SafetyKind;
  text?: string;
}

/** Where a danger is; what was named beside it doesn't matter. */
const DANGER_AT: Record<SafetyKind, Equipment> = {
  'wet-approach': 'approach', 'ball-on-lane': 'lane-surface', 'person-in-pit': 'pinsetter', 'smoke': 'pinsetter', 'other-danger': 'pinsetter',
};

/** Load → decide → facts, under the centre's lock: of fifty who say "mine" one is heard. */
export function callCommands(ledger: Ledger, ended: CallsReadModel) {
  return {
    /** Raises a call, or joins the open one of the same place and equipment. */
    raise(centre: CentreRef, actor: Actor, input: RaiseInput): Promise<Done> {
      const by = personOf(actor);
      return ledger.decide(centre, ({ state }, now) => {
        if (!state.floor[input.lane - 1]) throw invalid('lane.unknown', '/lane', { lane: input.lane });
        const equipment = input.safety ? DANGER_AT[input.safety] : input.equipment;
        const key = callKey(equipment, input.lane, input.safety ?? null);
        const data = { lane: input.lane, equipment, safety: input.safety, text: input.text || undefined, from: from(roleIn(actor, centre.slug)) };
        const facts: NewFact[] = [{ type: 'call.raised', data, by, after: newestAt(state, key) }];
        return { facts, result: (after) => ({ call: present(after.state.calls.open[key]), house: after.state, now }) };
      });
    },

    /** One step of a person on an open call. */
    work(centre: CentreRef, actor: Actor, id: string, rule: Rule): Promise<Done> {
      const by: Person = personOf(actor);
      const role = roleIn(actor, centre.slug);
      return ledger.decide(centre, async ({ state }, now, trx) => {
        const call = openCall(state.calls, id);
        if (!call) throw (await ended.find(centre, id, trx)) || closedSince(state, id) ? conflict('call.already-cleared') : notFound('call.unknown');
        const facts = [rule({ call, by, role, now })];
        return { facts, result: (after) => ({ call: present(openCall(after.state.calls, id) ?? closedSince(after.state, id)), house: after.state, now }) };
      });
    },
  };
}
export type CallCommands = ReturnType<typeof callCommands>;

const from = (role: Role | null): 'desk' | 'mechanic' => (role === 'mechanic' ? 'mechanic' : 'desk');

/** A raise comes after all that was said of its place, of a call that has ended too: within that one's span it would join it. */
const newestAt = (house: House, key: string): number | undefined => (house.calls.open[key] ?? house.calls.closed.findLast((call) => call.key === key))?.lastAt;

/** A call that ended since the last checkpoint, by any of its raises. */
export const closedSince = (house: House, id: string): Call | undefined => house.calls.closed.findLast((call) => call.id === id || call.raises.some((raised) => raised.id === id));

function present(call: Call | undefined): Call {
  if (!call) throw new Error('the fold lost the call that a fact was about');
  return call;
}
