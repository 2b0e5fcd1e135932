import type { BlockLane, Pin, Plan, PlanBlock, PlanInput, PlanMachine } from './model.ts';

/** What has happened on one machine since the plan was made. */
export interface MachineProgress {
  machine: string;
  /** Lanes it has dressed, in order. */
  done: readonly number[];
  /** The lane it is on: it finishes that. */
  on: { lane: number; endsAt: number } | null;
  /** Out of order: back at `until`, or not tonight; the lane on which it broke off is cleaned and redone. */
  broken?: { until: number | null; lane: number | null };
}

export interface Progress {
  now: number;
  machines: readonly MachineProgress[];
  /** Time to clean a broken-off lane before it is done again. */
  redoMs: number;
}

const blockOfLane = (input: PlanInput, lane: number): PlanBlock | undefined => input.blocks.find((block) => block.lanes.some((known) => known.lane === lane));

function machineNow(machine: PlanMachine, input: PlanInput, progress: Progress): PlanMachine {
  const seen = progress.machines.find((known) => known.machine === machine.id);
  const lane = seen?.on?.lane ?? seen?.done.at(-1);
  const block = lane === undefined ? undefined : blockOfLane(input, lane);
  const until = seen?.broken?.until;
  return {
    ...machine,
    availableFrom: Math.max(machine.availableFrom, progress.now, seen?.on && !seen.broken ? seen.on.endsAt : progress.now),
    atLane: lane ?? machine.atLane,
    loadedPattern: block?.pattern ?? machine.loadedPattern,
    loadedProduct: block?.product ?? machine.loadedProduct,
    away: [...(machine.away ?? []), ...(typeof until === 'number' ? [{ from: progress.now, to: until }] : [])],
  };
}

/**
 * The same night, seen from now: dressed lanes are gone, a lane under way is finished by its machine and
 * the rest of its block comes next there, a broken machine's lanes are open to the others, its last lane
 * with cleaning before. Plan the result with makePlan: among equals it stays nearest to the plan in force.
 */
export function replanInput(input: PlanInput, inForce: Plan, progress: Progress): PlanInput {
  const broken = new Map(progress.machines.flatMap((seen) => (seen.broken ? [[seen.machine, seen.broken] as const] : [])));
  const gone = new Set([...broken].flatMap(([machine, state]) => (state.until === null ? [machine] : [])));
  const redo = new Set([...broken.values()].flatMap((state) => (state.lane === null ? [] : [state.lane])));
  const away = new Set(progress.machines.flatMap((seen) => [...seen.done, ...(seen.on && !seen.broken ? [seen.on.lane] : [])]));
  for (const lane of redo) away.delete(lane);
  const laneNow = (lane: BlockLane): BlockLane => (redo.has(lane.lane) ? { ...lane, extraMs: (lane.extraMs ?? 0) + progress.redoMs } : lane);
  const blocks = input.blocks.flatMap((block) => {
    const lanes = block.lanes.filter((lane) => !away.has(lane.lane)).map(laneNow);
    const perLaneMs = Object.fromEntries(Object.entries(block.perLaneMs).filter(([machine]) => !gone.has(machine)));
    return lanes.length === 0 ? [] : [{ ...block, lanes, perLaneMs }];
  });
  const left = new Set(blocks.map((block) => block.id));
  const keeps = (pin: Pin): boolean => (pin.kind !== 'machine' && pin.kind !== 'first') || !broken.has(pin.machine);
  const under = progress.machines.flatMap((seen): Pin[] => {
    const block = seen.on && !seen.broken ? blockOfLane(input, seen.on.lane) : undefined;
    return block && left.has(block.id) ? [{ kind: 'first', block: block.id, machine: seen.machine }] : [];
  });
  const started = new Set(under.flatMap((pin) => (pin.kind === 'first' ? [pin.block] : [])));
  return {
    ...input,
    now: progress.now,
    machines: input.machines.map((machine) => machineNow(machine, input, progress)),
    blocks,
    pins: [...(input.pins ?? []).filter((pin) => keeps(pin) && !(pin.kind !== 'order' && started.has(pin.block))), ...under],
    previous: inForce.machines.map((run) => ({ machine: run.machine, blocks: run.blocks.map((block) => block.block).filter((id) => left.has(id)) })),
  };
}
