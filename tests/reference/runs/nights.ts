import { at } from '#shared/domain/runs/plan/cells.ts';
import type { PlanBlock, PlanInput, PlanMachine, Pin } from '#shared/domain/runs/plan/model.ts';

export const MIN = 60_000;

/** A small generator of repeatable numbers (mulberry32, public domain), so that a failing night can be named. */
export function repeatable(seed: number): (below: number) => number {
  let state = seed >>> 0;
  return (below) => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return (((t ^ (t >>> 14)) >>> 0) % (1 << 20)) % below;
  };
}

export interface NightShape {
  blocks: number;
  machines: number;
  /** Spans, stores, pins, split sessions … as the number of the night has it; off for plain nights. */
  extras: boolean;
}

function machineOf(pick: (below: number) => number, m: number, shape: NightShape): PlanMachine {
  const tight = shape.extras && pick(5) === 0 && shape.blocks <= 4;
  return {
    id: `M${m + 1}`, availableFrom: pick(6) * MIN, atLane: pick(3) === 0 ? null : 1 + pick(20), loadedPattern: pick(2) === 0 ? 'p1' : null, loadedProduct: 'x',
    travel: { fixedMs: pick(3) * MIN, perLaneMs: pick(2) * MIN }, patternChangeMs: pick(3) * MIN, productChangeMs: pick(4) * MIN,
    services: tight ? [{ id: 'refill', ms: (1 + pick(5)) * MIN, restores: ['tankA'] }] : [],
    stores: tight ? { tankA: { level: pick(9), capacity: 8 } } : {},
    away: shape.extras && pick(4) === 0 ? [{ from: (5 + pick(20)) * MIN, to: (25 + pick(15)) * MIN }] : [],
  };
}

function blockOf(pick: (below: number) => number, b: number, shape: NightShape, machines: readonly PlanMachine[]): PlanBlock {
  const first = 1 + pick(20);
  const count = 1 + pick(shape.extras ? 3 : 2);
  const step = shape.extras && pick(4) === 0 ? 2 : 1;
  const release = pick(40);
  const able = machines.filter(() => pick(8) !== 0 || !shape.extras);
  return {
    id: `b${b}`, sessionId: shape.extras && b > 0 && pick(3) === 0 ? `s${pick(b)}` : `s${b}`,
    lanes: Array.from({ length: count }, (_, k) => ({
      lane: first + k * step, release: (release + (shape.extras && pick(5) === 0 ? pick(10) : 0)) * MIN,
      ...(shape.extras && pick(12) === 0 ? { extraMs: 2 * MIN } : {}),
    })),
    warmUp: (release + 4 + pick(30)) * MIN, pattern: `p${1 + pick(3)}`, product: pick(4) === 0 ? 'y' : 'x',
    perLaneMs: Object.fromEntries((able.length > 0 ? able : machines).map((machine) => [machine.id, (1 + pick(4)) * MIN])),
    usePerLane: Object.fromEntries(machines.filter((machine) => machine.stores.tankA).map((machine) => [machine.id, { tankA: 1 + pick(2) }])),
    closed: shape.extras && pick(6) === 0 ? [{ from: (release + pick(10)) * MIN, to: (release + 10 + pick(15)) * MIN }] : [],
  };
}

function pinsOf(pick: (below: number) => number, blocks: readonly PlanBlock[], machines: readonly PlanMachine[]): Pin[] {
  const block = at(blocks, pick(blocks.length)).id;
  const other = at(blocks, pick(blocks.length)).id;
  const machine = at(machines, pick(machines.length)).id;
  switch (pick(12)) {
    case 0: return [{ kind: 'start', block, at: (20 + pick(30)) * MIN }];
    case 1: return [{ kind: 'machine', block, machine }];
    case 2: return [{ kind: 'first', block, machine }];
    case 3: return block === other ? [] : [{ kind: 'order', before: block, after: other }];
    default: return [];
  }
}

/** A random small night, whole minutes from 0. The same number gives the same night. */
export function smallNight(seed: number, shape: NightShape): PlanInput {
  const pick = repeatable(seed);
  const machines = Array.from({ length: shape.machines }, (_, m) => machineOf(pick, m, shape));
  const blocks = Array.from({ length: shape.blocks }, (_, b) => blockOf(pick, b, shape, machines));
  const pins = shape.extras ? pinsOf(pick, blocks, machines) : [];
  const previous = shape.extras && pick(2) === 0 ? [{ machine: 'M1', blocks: blocks.map((block) => block.id).reverse() }] : undefined;
  return { now: 0, marginMs: pick(2) * MIN, machines, blocks, pins, ...(previous ? { previous } : {}) };
}
