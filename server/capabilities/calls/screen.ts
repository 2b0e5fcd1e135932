import type { CallDetail, callContracts } from '#shared/contracts/calls.ts';
import type { ResponseOf } from '#shared/contracts/contract.ts';
import { businessDayAt } from '#shared/domain/business-day.ts';
import type { Family } from '#shared/domain/calls/causes.ts';
import type { Call } from '#shared/domain/calls/state.ts';
import { callFacts, callOrder } from '#shared/domain/calls/view.ts';
import { openCall } from '#shared/domain/calls/work.ts';
import { escalationBy } from '#shared/domain/house-rules.ts';
import type { House } from '#shared/domain/house/state.ts';
import { notFound } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Ledger } from '#server/platform/journal/ledger.ts';
import { closedSince, type Done } from './commands.ts';
import type { CallsReadModel } from './read-model.ts';
import { callDetail, callView, closedCall } from './view.ts';

const DAY = 86_400_000;
/** Span over which causes are counted, to offer the most frequent first. */
const CAUSES_DAYS = 90;

/** Family of a lane's pinsetter; null for a lane that the centre hasn't described. */
export type FamilyOfLane = (centre: CentreRef, lane: number) => Promise<Family>;

/** What the screens of calls show: the open ones from the house, the ended ones from the table. */
export function callsScreen(ledger: Ledger, ended: CallsReadModel, familyOfLane: FamilyOfLane) {
  const find = async (centre: CentreRef, house: House, id: string): Promise<Call> => {
    const call = openCall(house.calls, id) ?? closedSince(house, id) ?? (await ended.find(centre, id));
    if (!call) throw notFound('call.unknown');
    return call;
  };
  const detail = async (centre: CentreRef, { call, house, now }: Done): Promise<CallDetail> => {
    const [last, causeTimes, family] = await Promise.all([
      call.scope === 'house' ? [] : ended.lastOnLane(centre, call.lane, call.raisedAt),
      ended.causeTimes(centre, call.equipment, now - CAUSES_DAYS * DAY),
      familyOfLane(centre, call.lane),
    ]);
    return callDetail(call, house, now, { last, causeTimes, family, rules: centre.rules });
  };
  return {
    detail,

    async see(centre: CentreRef, id: string, now: number): Promise<CallDetail> {
      const { state: house } = await ledger.read(centre);
      return detail(centre, { call: await find(centre, house, id), house, now });
    },

    async list(centre: CentreRef, now: number): Promise<ResponseOf<typeof callContracts.list>> {
      const { state: house } = await ledger.read(centre);
      const day = businessDayAt(now, centre.zone, centre.cut);
      const order = callOrder(null);
      const facts = (call: Call) => callFacts(call, house, now, escalationBy(centre.rules));
      const open = Object.values(house.calls.open).toSorted((a, b) => order(facts(a), facts(b)));
      const closed = await ended.endedBetween(centre, day.from, day.to);
      return { open: open.map((call) => callView(call, house, now, centre.rules)), closed: closed.map((call) => closedCall(call, house, now, centre.rules)), lanes: centre.lanes };
    },

    /** Which causes fit a call; null while nothing is known of it: then the command refuses it anyway. */
    async familyOf(centre: CentreRef, id: string): Promise<Family> {
      const call = openCall((await ledger.read(centre)).state.calls, id);
      return call ? familyOfLane(centre, call.lane) : null;
    },
  };
}
export type CallsScreen = ReturnType<typeof callsScreen>;
