import type { BodyOf } from '#shared/contracts/contract.ts';
import type { floorContracts } from '#shared/contracts/floor.ts';
import type { LaneState } from '#shared/domain/floor/state.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import { conflict, invalid, notFound } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Decision, HouseAt, Ledger, NewFact } from '#server/platform/journal/ledger.ts';

/** A game is ten frames a bowler; entered by hand it stays an estimate. */
const FRAMES_A_GAME = 10;

type Decide<R> = (house: HouseAt) => Decision<R>;

export function laneOf(house: HouseAt, lane: number): LaneState {
  const found = house.state.floor[lane - 1];
  if (!found) throw notFound('lane.unknown', { lane });
  return found;
}

const facts = (...list: NewFact[]): Decision<HouseAt> => ({ facts: list, result: (after) => after });

/** What desk and mechanic do to lanes: each is decided on the house as it is and becomes a fact, or is refused with a code. */
export const laneDecisions = {
  open: (lane: number, body: BodyOf<typeof floorContracts.open>, by: Person): Decide<HouseAt> => (house) => {
    const state = laneOf(house, lane);
    if (state.use) throw conflict('lane.already-open', { lane });
    refuseOut(state);
    return facts({ type: 'lane.opened', data: { lane, ...body, use: body.use ?? 'open' }, by, after: state.lastAt });
  },
  close: (lane: number, by: Person): Decide<HouseAt> => (house) => {
    const state = laneOf(house, lane);
    if (!state.use) throw conflict('lane.not-open', { lane });
    return facts({ type: 'lane.closed', data: { lane }, by, after: state.lastAt });
  },
  move: (from: number, to: number, by: Person): Decide<HouseAt> => (house) => {
    const left = laneOf(house, from);
    const next = laneOf(house, to);
    if (from === to) throw invalid('lane.same', '/to', { lane: to });
    if (!left.use) throw conflict('lane.not-open', { lane: from });
    if (next.use) throw conflict('lane.already-open', { lane: to });
    refuseOut(next);
    return facts({ type: 'lane.moved', data: { from, to }, by, after: Math.max(left.lastAt, next.lastAt) });
  },
  outOfService: (lane: number, reason: string, by: Person): Decide<HouseAt> => (house) => {
    const state = laneOf(house, lane);
    refuseOut(state);
    return facts({ type: 'lane.out-of-service', data: { lane, reason }, by, after: state.lastAt });
  },
  backInService: (lane: number, by: Person): Decide<HouseAt> => (house) => {
    const state = laneOf(house, lane);
    if (!state.outOfService) throw conflict('lane.in-service', { lane });
    const call = Object.values(house.state.calls.open).find((c) => c.status === 'out-of-service' && c.lanesHeld.includes(lane));
    if (call) throw conflict('lane.held-by-call', { lane, call: call.id });
    return facts({ type: 'lane.back-in-service', data: { lane }, by, after: state.lastAt });
  },
  enterCounts: (lane: number, body: BodyOf<typeof floorContracts.enter>, by: Person): Decide<HouseAt> => (house) => {
    const state = laneOf(house, lane);
    const games = body.games ?? 0;
    const frames = body.frames ?? games * FRAMES_A_GAME;
    if (games + frames === 0) throw invalid('counts.empty', '/games');
    return facts({ type: 'lane.counted', data: { lane, games, frames, basis: 'estimated' }, by, after: state.lastAt });
  },
};

function refuseOut(state: LaneState): void {
  if (state.outOfService) throw conflict('lane.out-of-service', { lane: state.lane });
}

/** Runs one lane decision in the centre's unit of work. */
export const run = (ledger: Ledger, centre: CentreRef, decision: Decide<HouseAt>): Promise<HouseAt> => ledger.decide(centre, decision);
