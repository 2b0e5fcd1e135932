import { foldCalls } from '../calls/fold.ts';
import type { Call, CallsState } from '../calls/state.ts';
import { openCall } from '../calls/work.ts';
import { foldFloor } from '../floor/fold.ts';
import { changeLane } from '../floor/lane-change.ts';
import { inService } from '../floor/machine.ts';
import type { FloorState } from '../floor/state.ts';
import type { Fact } from '../journal/fact.ts';
import { foldRuns, runWith } from '../runs/fold.ts';
import type { RunsState } from '../runs/state.ts';
import type { House } from './state.ts';

/** Raised by one whenever a fold gives another state for the same facts: stored states are then folded anew. */
export const HOUSE_FOLD_VERSION = 3;

/** (house, fact) → house, for facts in their order. The only place where one slice's fact reaches another slice's state. */
export function foldHouse(house: House, fact: Fact): House {
  const runs = foldRuns(house.runs, fact);
  const calls = foldCalls(house.calls, fact);
  const floor = fromRuns(fromCalls(foldFloor(house.floor, fact), fact, house.calls, calls), fact, runs);
  return floor === house.floor && calls === house.calls && runs === house.runs ? house : { floor, calls, runs };
}

/** What a state needn't carry past a business-day cut: what has ended is in the tables. */
export function checkpointHouse(house: House): House {
  return {
    floor: house.floor.map((lane) => (lane.uses.length + lane.outs.length + lane.counts.length === 0 ? lane : { ...lane, uses: [], outs: [], counts: [] })),
    calls: { ...house.calls, closed: [] },
    runs: { ...house.runs, ended: [] },
  };
}

/** A clear also ends the stop; a call takes its lanes out of service and puts them back. */
function fromCalls(floor: FloorState, fact: Fact, before: CallsState, after: CallsState): FloorState {
  if (fact.type === 'call.out-of-service') {
    const call = openCall(after, fact.data.call);
    const mark = { since: fact.time, reason: fact.data.reason, by: fact.by?.name ?? '' };
    return call ? eachLane(floor, call, fact, (lane) => ({ outOfService: lane.outOfService ?? mark })) : floor;
  }
  if (fact.type !== 'call.cleared' && fact.type !== 'call.back-in-service') return floor;
  const call = openCall(before, fact.data.call);
  if (!call) return floor;
  const stillOut = (lane: number) => Object.values(after.open).some((c) => c.status === 'out-of-service' && c.lanesHeld.includes(lane));
  return eachLane(floor, call, fact, (lane) => ({
    stop: call.equipment === 'pinsetter' && lane.lane === call.lane && !call.safety ? null : lane.stop,
    ...(call.outOfService && !stillOut(lane.lane) ? inService(lane, fact.time) : {}),
  }));
}

function eachLane(floor: FloorState, call: Call, fact: Fact, change: Parameters<typeof changeLane>[3]): FloorState {
  const lanes = call.lanesHeld.length > 0 ? call.lanesHeld : [call.lane];
  return lanes.reduce((all, lane) => changeLane(all, lane, fact, change), floor);
}

/** Dressing wipes the slate of a lane; a lane on which the machine broke off waits to be cleaned and redone. */
function fromRuns(floor: FloorState, fact: Fact, runs: RunsState): FloorState {
  if (fact.type === 'run.lane.dressed') {
    const { machine, run } = fact.data;
    const { pattern = null, revision = null } = runWith(runs, machine, run) ?? {};
    return changeLane(floor, fact.data.lane, fact, () => ({
      dressed: { at: fact.time, machine, run, pattern, revision }, brokenOff: null, deliveriesSince: 0, deliveriesSinceBy: {},
    }));
  }
  if (fact.type === 'run.aborted' && fact.data.lane !== undefined) {
    const mark = { at: fact.time, machine: fact.data.machine, run: fact.data.run };
    return changeLane(floor, fact.data.lane, fact, () => ({ brokenOff: mark }));
  }
  if (fact.type === 'run.started' && fact.data.pattern !== undefined) return named(floor, fact, runs);
  return floor;
}

/** A start that comes after lanes of its run were dressed says their pattern too. */
function named(floor: FloorState, fact: Extract<Fact, { type: 'run.started' }>, runs: RunsState): FloorState {
  const { machine, run } = fact.data;
  const { pattern = null, revision = null } = runWith(runs, machine, run) ?? {};
  return floor.reduce<FloorState>((all, lane) => {
    const mine = lane.dressed && lane.dressed.machine === machine && lane.dressed.run === run && lane.dressed.pattern === null;
    return mine && lane.dressed ? changeLane(all, lane.lane, fact, () => ({ dressed: lane.dressed && { ...lane.dressed, pattern, revision } })) : all;
  }, floor);
}
