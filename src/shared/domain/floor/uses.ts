import type { FactOf } from '../journal/fact.ts';
import { changeLane } from './lane-change.ts';
import type { FloorState, LaneState, Use } from './state.ts';

/** Lane opened. The desk's note and the scoring system's word about the same people are one use; another kind or label begins a new one. */
export function open(floor: FloorState, fact: FactOf<'lane.opened'>): FloorState {
  const said = fact.data;
  return changeLane(floor, said.lane, fact, (lane) => {
    const bumpers = said.bumpers ?? lane.bumpers;
    if (lane.use && sameUse(lane.use, said)) return { bumpers, use: fill(lane.use, said) };
    const use: Use = {
      kind: said.use ?? 'unknown', from: fact.time, to: null, lastDeliveryAt: null, bowlers: said.bowlers ?? null, label: said.label ?? null,
      until: said.until ?? null, games: said.games ?? null, by: fact.by?.kind ?? 'gateway',
    };
    return { ...ended(lane, fact.time), bumpers, use, progress: null };
  });
}

export const close = (floor: FloorState, fact: FactOf<'lane.closed'>): FloorState =>
  changeLane(floor, fact.data.lane, fact, (lane) => ended(lane, fact.time));

/** The people move: their use ends on one lane and goes on, same kind and label, on the other. */
export function move(floor: FloorState, fact: FactOf<'lane.moved'>): FloorState {
  const { from, to } = fact.data;
  const left = floor[from - 1];
  if (!left || !floor[to - 1] || from === to) return floor;
  const use: Use = left.use
    ? { ...left.use, from: fact.time, to: null, lastDeliveryAt: null }
    : { kind: 'unknown', from: fact.time, to: null, lastDeliveryAt: null, bowlers: null, label: null, until: null, games: null, by: fact.by?.kind ?? 'gateway' };
  const gone = changeLane(floor, from, fact, (lane) => ended(lane, fact.time));
  return changeLane(gone, to, fact, (lane) => ({ ...ended(lane, fact.time), use, progress: left.progress }));
}

export const progress = (floor: FloorState, fact: FactOf<'game.progress'>): FloorState =>
  changeLane(floor, fact.data.lane, fact, () => ({ progress: { game: fact.data.game, frame: fact.data.frame, at: fact.time } }));

/** A use that ends in the moment it began is none. */
function ended(lane: LaneState, at: number): Pick<LaneState, 'use' | 'uses' | 'progress'> {
  return { use: null, progress: null, uses: lane.use && lane.use.from < at ? [...lane.uses, { ...lane.use, to: at }] : lane.uses };
}

type Said = FactOf<'lane.opened'>['data'];

function sameUse(use: Use, said: Said): boolean {
  const kind = said.use === undefined || said.use === 'unknown' || use.kind === 'unknown' || said.use === use.kind;
  const label = said.label === undefined || use.label === null || said.label === use.label;
  return kind && label;
}

function fill(use: Use, said: Said): Use {
  const kind = use.kind === 'unknown' && said.use ? said.use : use.kind;
  return {
    ...use, kind, label: use.label ?? said.label ?? null, bowlers: said.bowlers ?? use.bowlers, until: said.until ?? use.until,
    games: said.games ?? use.games,
  };
}

