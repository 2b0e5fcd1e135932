import { repeatable } from '#tests/reference/runs/nights.ts';
import type { PlanBlock, PlanInput, PlanMachine } from '#shared/domain/runs/plan/model.ts';

const MIN = 60_000;

export interface HouseNight {
  lanes: number;
  sessions: number;
  machines: number;
  /** Lanes to a block; 1 plans every lane apart. */
  lanesPerBlock: number;
}

function laneMachine(m: number): PlanMachine {
  return {
    id: `M${m + 1}`, availableFrom: 0, atLane: m === 0 ? 1 : 41, loadedPattern: 'house', loadedProduct: 'x',
    travel: { fixedMs: 20_000, perLaneMs: 1_500 }, patternChangeMs: 60_000, productChangeMs: 0,
    services: [], stores: {},
  };
}

/**
 * A night of an invented house: leagues side by side, early ones that free their lanes over the evening
 * and late ones on the same lanes, patterns by league; between slack and 20 % more work than time.
 */
export function houseNight(seed: number, shape: HouseNight): PlanInput {
  const pick = repeatable(seed);
  const machines = Array.from({ length: shape.machines }, (_, m) => laneMachine(m));
  const each = shape.lanes / shape.sessions;
  const speed = [110_000 + pick(20) * 1000, 120_000 + pick(30) * 1000, 125_000];
  const blocks: PlanBlock[] = [];
  for (let s = 0; s < shape.sessions; s += 1) {
    const first = Math.round(s * each) + 1;
    const last = Math.round((s + 1) * each);
    const release = (pick(4) * 20 + pick(10)) * MIN;
    const warmUp = release + (25 + pick(5) * 15 + pick(7)) * MIN;
    for (let lane = first; lane <= last; lane += shape.lanesPerBlock) {
      const count = Math.min(shape.lanesPerBlock, last - lane + 1);
      blocks.push({
        id: `b${blocks.length}`, sessionId: `s${s}`, warmUp, pattern: s % 3 === 0 ? 'sport' : 'house', product: 'x',
        lanes: Array.from({ length: count }, (_, k) => ({ lane: lane + k, release })),
        perLaneMs: Object.fromEntries(machines.map((machine, m) => [machine.id, speed[m] ?? 120_000])),
      });
    }
  }
  return { now: 0, marginMs: 5 * MIN, machines, blocks };
}
