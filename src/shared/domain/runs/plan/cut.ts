import type { Amounts, Store } from '../lasting.ts';
import { at } from './cells.ts';
import type { PlanBlock, PlanMachine, Span } from './model.ts';

/** One lane to be dressed. */
export interface LaneJob {
  lane: number;
  sessionId: string;
  warmUp: number;
  release: number;
  pattern: string;
  product: string;
  perLaneMs: Readonly<Record<string, number>>;
  usePerLane?: Readonly<Record<string, Amounts>>;
  closed?: readonly Span[];
  extraMs?: number;
}

/** Blocks that are answered at once and still let machines share a session. */
export const CUT_BLOCKS = 12;
const SHORTEST_CUT = 4;

const keyOf = (job: LaneJob): string => JSON.stringify([job.sessionId, job.warmUp, job.release, job.pattern, job.product, job.perLaneMs, job.usePerLane ?? null, job.closed ?? null]);

/** Most lanes of a job that every machine's full stores last for. */
function mostLanes(job: LaneJob, machines: readonly PlanMachine[]): number {
  let most = Infinity;
  for (const machine of machines) {
    if (job.perLaneMs[machine.id] === undefined) continue;
    for (const [store, amount] of Object.entries(job.usePerLane?.[machine.id] ?? {}) as [Store, number][]) {
      const state = machine.stores[store];
      if (state && amount > 0) most = Math.min(most, Math.floor((state.capacity - (state.reserve ?? 0)) / amount));
    }
  }
  return Math.max(1, most);
}

/** Where to cut a group near its middle without parting a pair, if it has one. */
function middle(group: readonly LaneJob[]): number {
  const half = Math.ceil(group.length / 2);
  for (let off = 0; off < half; off += 1) {
    for (const place of [half + off, half - off]) {
      const next = group[place];
      if (place > 0 && next && next.lane % 2 === 1) return place;
    }
  }
  return half;
}

function halve(groups: LaneJob[][], machines: number): LaneJob[][] {
  const list = [...groups];
  while (machines > 1 && list.length < CUT_BLOCKS) {
    const longest = list.reduce((best, group, i) => (group.length > (list[best]?.length ?? 0) ? i : best), 0);
    const group = list[longest];
    if (!group || group.length < SHORTEST_CUT) break;
    const place = middle(group);
    list.splice(longest, 1, group.slice(0, place), group.slice(place));
  }
  return list;
}

/**
 * Lanes that share session, release, due, pattern and closing form a block, in lane order: a lane that
 * frees later, or a second pattern on the odd lanes, becomes a block of its own. A block that one
 * filling doesn't last for is cut. With several machines the longest blocks are halved, pairs together,
 * while the whole stays small enough to be solved exactly at once.
 */
export function formBlocks(jobs: readonly LaneJob[], machines: readonly PlanMachine[]): PlanBlock[] {
  const byKey = new Map<string, LaneJob[]>();
  for (const job of [...jobs].sort((a, b) => a.lane - b.lane)) {
    const group = byKey.get(keyOf(job));
    if (group) group.push(job);
    else byKey.set(keyOf(job), [job]);
  }
  const fitting = [...byKey.values()].flatMap((group) => {
    const most = Math.min(group.length, mostLanes(at(group, 0), machines));
    return Array.from({ length: Math.ceil(group.length / most) }, (_, i) => group.slice(i * most, (i + 1) * most));
  });
  return halve(fitting, machines.length).map((group) => {
    const { lane, sessionId, warmUp, pattern, product, perLaneMs, usePerLane, closed } = at(group, 0);
    return {
      id: `${sessionId}:${pattern}:${lane}-${at(group, group.length - 1).lane}`, sessionId, warmUp, pattern, product, perLaneMs,
      lanes: group.map((job) => ({ lane: job.lane, release: job.release, ...(job.extraMs ? { extraMs: job.extraMs } : {}) })),
      ...(usePerLane ? { usePerLane } : {}), ...(closed ? { closed } : {}),
    };
  });
}
