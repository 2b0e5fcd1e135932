import type { FactOf } from '../journal/fact.ts';
import { changeLane } from './lane-change.ts';
import type { FloorState, LaneState } from './state.ts';

const MARKS_KEPT = 12;

export const power = (floor: FloorState, fact: FactOf<'pinsetter.on'> | FactOf<'pinsetter.off'>): FloorState =>
  changeLane(floor, fact.data.lane, fact, (lane) => ({ power: fact.type === 'pinsetter.on' ? 'on' : 'off', hears: { ...lane.hears, stops: true } }));

/** The machine halts by itself. A second word about the same stop only adds what was missing. */
export function stop(floor: FloorState, fact: FactOf<'pinsetter.stopped'>): FloorState {
  const said = fact.data;
  return changeLane(floor, said.lane, fact, (lane) => {
    const before = lane.stop;
    return {
      hears: { ...lane.hears, stops: true },
      stopMarks: before ? lane.stopMarks : [...lane.stopMarks, lane.framesEver].slice(-MARKS_KEPT),
      stop: {
        since: before?.since ?? fact.time, reason: before?.reason ?? said.reason ?? null, code: before?.code ?? said.code ?? null,
        text: before?.text ?? said.text ?? null, pins: said.pins ?? before?.pins ?? null,
      },
    };
  });
}

export const restart = (floor: FloorState, fact: FactOf<'pinsetter.restarted'>): FloorState =>
  changeLane(floor, fact.data.lane, fact, (lane) => ({ stop: null, power: 'on', hears: { ...lane.hears, stops: true } }));

export const outOfService = (floor: FloorState, fact: FactOf<'lane.out-of-service'>): FloorState =>
  changeLane(floor, fact.data.lane, fact, (lane) => ({
    outOfService: lane.outOfService ?? { since: fact.time, reason: fact.data.reason, by: fact.by?.name ?? '' },
  }));

export const backInService = (floor: FloorState, fact: FactOf<'lane.back-in-service'>): FloorState =>
  changeLane(floor, fact.data.lane, fact, (lane) => inService(lane, fact.time));

/** The lane is in service from `at`; the time it was out is kept. */
export function inService(lane: LaneState, at: number): Pick<LaneState, 'outOfService' | 'outs'> {
  const out = lane.outOfService;
  return { outOfService: null, outs: out && out.since < at ? [...lane.outs, { from: out.since, to: at, reason: out.reason }] : lane.outs };
}
