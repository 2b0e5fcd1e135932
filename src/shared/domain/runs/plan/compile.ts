import { STORES, type Store } from '../lasting.ts';
import { at } from './cells.ts';
import type { BlockLane, PlanBlock, PlanInput, PlanMachine, Span, TravelTime } from './model.ts';
import type { MachineData, Problem, SpanCells, Work } from './problem.ts';

const up = (ms: number): number => Math.ceil(ms / 1000);

/** Merged and sorted, rounded outwards to seconds from now. */
export function spanCells(spans: readonly Span[], now: number): SpanCells {
  const sorted = spans
    .map((span) => [Math.floor((span.from - now) / 1000), up(span.to - now)] as const)
    .filter(([from, to]) => to > from && to > 0)
    .sort((a, b) => a[0] - b[0]);
  const merged: [number, number][] = [];
  for (const [from, to] of sorted) {
    const last = merged.at(-1);
    if (last && from <= last[1]) last[1] = Math.max(last[1], to);
    else merged.push([from, to]);
  }
  return Int32Array.from(merged.flat());
}

/** Seconds from one lane to another, beyond the neighbour that the time a lane includes. */
export function travelSeconds(travel: TravelTime, from: number | null, to: number): number {
  if (from === null) return up(travel.fixedMs);
  const apart = Math.abs(to - from);
  return apart <= 1 ? 0 : up(travel.fixedMs + (apart - 1) * travel.perLaneMs);
}

function workOf(machine: PlanMachine, block: PlanBlock, release: Int32Array, input: PlanInput, stores: readonly Store[]): Work | null {
  const perLane = block.perLaneMs[machine.id];
  if (perLane === undefined) return null;
  const { lanes } = block;
  const move = Int32Array.from(lanes, (lane, k) => (k === 0 ? 0 : travelSeconds(machine.travel, at(lanes, k - 1).lane, lane.lane)));
  const dress = Int32Array.from(lanes, (lane: BlockLane) => up(perLane + (lane.extraMs ?? 0)));
  let [offset, minStart, tail] = [0, 0, 0];
  const ends: number[] = [];
  lanes.forEach((_, k) => {
    offset += move[k] ?? 0;
    minStart = Math.max(minStart, (release[k] ?? 0) - offset);
    offset += dress[k] ?? 0;
    ends.push(offset);
  });
  for (const end of ends) tail += offset - end;
  const perLaneUse = block.usePerLane?.[machine.id] ?? {};
  return {
    move, dress, total: offset, tail, minStart, minEnd: minStart + offset,
    closed: spanCells([...(machine.away ?? []), ...(block.closed ?? [])], input.now),
    travel: move.reduce((a, b) => a + b, 0),
    use: Int32Array.from(stores, (store) => (perLaneUse[store] ?? 0) * lanes.length),
  };
}

function transitions(machine: PlanMachine, blocks: readonly PlanBlock[]): Pick<MachineData, 'setup' | 'travel'> {
  const n = blocks.length;
  const setup = new Int32Array((n + 1) * n);
  const travel = new Int32Array((n + 1) * n);
  for (let previous = -1; previous < n; previous += 1) {
    const before = previous < 0 ? null : at(blocks, previous);
    const from = before ? at(before.lanes, before.lanes.length - 1).lane : machine.atLane;
    const [pattern, product] = before ? [before.pattern, before.product] : [machine.loadedPattern, machine.loadedProduct];
    blocks.forEach((block, next) => {
      const seconds = travelSeconds(machine.travel, from, at(block.lanes, 0).lane);
      const change = (pattern === block.pattern ? 0 : up(machine.patternChangeMs)) + (product === block.product ? 0 : up(machine.productChangeMs));
      travel[(previous + 1) * n + next] = seconds;
      setup[(previous + 1) * n + next] = seconds + change;
    });
  }
  return { setup, travel };
}

/** 1 where the previous plan had another predecessor, or another machine, for a block it knew. */
function changeTable(machine: PlanMachine, input: PlanInput): Int32Array {
  const n = input.blocks.length;
  const table = new Int32Array((n + 1) * n);
  if (!input.previous) return table;
  const before = new Map<string, string>();
  for (const run of input.previous) run.blocks.forEach((block, i) => before.set(block, `${run.machine} ${i === 0 ? '' : at(run.blocks, i - 1)}`));
  for (let previous = -1; previous < n; previous += 1) {
    const name = `${machine.id} ${previous < 0 ? '' : at(input.blocks, previous).id}`;
    input.blocks.forEach((block, next) => {
      const known = before.get(block.id);
      table[(previous + 1) * n + next] = known === undefined || known === name ? 0 : 1;
    });
  }
  return table;
}

function machineData(machine: PlanMachine, input: PlanInput, release: Int32Array[], stores: readonly Store[]): MachineData {
  const capacity = (store: Store) => machine.stores[store];
  const far = 2 ** 30;
  return {
    id: machine.id,
    available: Math.max(0, up(machine.availableFrom - input.now)),
    away: spanCells(machine.away ?? [], input.now),
    work: input.blocks.map((block, b) => workOf(machine, block, at(release, b), input, stores)),
    ...transitions(machine, input.blocks),
    change: changeTable(machine, input),
    services: machine.services.map((service) => ({ id: service.id, seconds: up(service.ms), restores: stores.map((store) => service.restores.includes(store)) })),
    level: Int32Array.from(stores, (store) => Math.max(0, (capacity(store)?.level ?? far) - (capacity(store)?.reserve ?? 0))),
    full: Int32Array.from(stores, (store) => Math.max(0, (capacity(store)?.capacity ?? far) - (capacity(store)?.reserve ?? 0))),
    first: -1,
  };
}

/** Stores that could run out on this night: only they enter the search. */
function bindingStores(input: PlanInput): Store[] {
  return STORES.filter((store) =>
    input.machines.some((machine) => {
      const state = machine.stores[store];
      if (!state) return false;
      const need = input.blocks.reduce((sum, block) => sum + (block.usePerLane?.[machine.id]?.[store] ?? 0) * block.lanes.length, 0);
      return need > state.level - (state.reserve ?? 0);
    }),
  );
}

function applyPins(problem: Problem, input: PlanInput): void {
  const index = new Map(input.blocks.map((block, b) => [block.id, b]));
  for (const pin of input.pins ?? []) {
    if (pin.kind === 'order') {
      const [before, after] = [index.get(pin.before), index.get(pin.after)];
      if (before !== undefined && after !== undefined) at(problem.after, after).push(before);
      problem.ordered = true;
      continue;
    }
    const b = index.get(pin.block);
    if (b === undefined) continue;
    if (pin.kind === 'start') {
      problem.pinStart[b] = Math.max(0, up(pin.at - input.now), problem.laneRelease[b]?.[0] ?? 0);
      continue;
    }
    for (const machine of problem.machines) {
      if (machine.id !== pin.machine) machine.work[b] = null;
      else if (pin.kind === 'first') machine.first = b;
    }
  }
}

/** The input in whole seconds and indices; durations and releases rounded up, due instants down. */
export function compile(input: PlanInput): Problem {
  const { blocks, now } = input;
  const release = blocks.map((block) => Int32Array.from(block.lanes, (lane) => Math.max(0, up(lane.release - now))));
  const sessions = [...new Set(blocks.map((block) => block.sessionId))];
  const session = Int32Array.from(blocks, (block) => sessions.indexOf(block.sessionId));
  const stores = bindingStores(input);
  const machines = input.machines.map((machine) => machineData(machine, input, release, stores));
  const problem: Problem = {
    n: blocks.length, now, machines, session, sessions, stores,
    laneCount: Int32Array.from(blocks, (block) => block.lanes.length),
    laneRelease: release,
    sessionBlocks: sessions.map((_, s) => blocks.flatMap((__, b) => (session[b] === s ? [b] : []))),
    due: Int32Array.from(blocks, (block) => Math.floor((block.warmUp - input.marginMs - now) / 1000)),
    pinStart: new Int32Array(blocks.length).fill(-1),
    after: blocks.map(() => []),
    ordered: false,
    pack: { travel: 1, change: blocks.length + 1 },
  };
  applyPins(problem, input);
  const longest = Math.max(0, ...machines.flatMap((machine) => [...machine.travel]));
  const inside = Math.max(0, ...machines.flatMap((machine) => machine.work.map((work) => work?.travel ?? 0)));
  problem.pack.travel = 1 + blocks.length * (longest + inside);
  return problem;
}
