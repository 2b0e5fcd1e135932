import type { Store } from '../lasting.ts';
import type { Explanation, Pin, PlanBlock, PlanInput, PlanMachine } from './model.ts';

export interface Screened {
  input: PlanInput;
  unplanned: { block: string; session: string; because: Explanation[] }[];
}

/** The store of a machine that a whole block would overdraw even when full; null: it fits. */
function overdrawn(machine: PlanMachine, block: PlanBlock): { store: Store; need: number; holds: number } | null {
  for (const [store, amount] of Object.entries(block.usePerLane?.[machine.id] ?? {}) as [Store, number][]) {
    const state = machine.stores[store];
    const holds = state ? state.capacity - (state.reserve ?? 0) : Infinity;
    if (amount * block.lanes.length > holds) return { store, need: amount * block.lanes.length, holds };
  }
  return null;
}

/** Takes out what no plan can hold, with the reasons: no machine lays it, or it needs more than a full tank. */
export function screen(input: PlanInput): Screened {
  const unplanned: Screened['unplanned'] = [];
  const blocks: PlanBlock[] = [];
  for (const block of input.blocks) {
    const able = input.machines.filter((machine) => block.perLaneMs[machine.id] !== undefined);
    const short = able.map((machine) => ({ machine, over: overdrawn(machine, block) }));
    const fit = short.filter(({ over }) => over === null);
    if (fit.length > 0 && block.lanes.length > 0) {
      blocks.push({ ...block, perLaneMs: Object.fromEntries(fit.map(({ machine }) => [machine.id, block.perLaneMs[machine.id] ?? 0])) });
      continue;
    }
    const because: Explanation[] = short.flatMap(({ machine, over }) => (over ? [{ code: 'block.exceeds-store' as const, params: { machine: machine.id, ...over } }] : []));
    unplanned.push({ block: block.id, session: block.sessionId, because: because.length > 0 ? because : [{ code: 'block.no-machine', params: { pattern: block.pattern } }] });
  }
  const known = new Set(blocks.map((block) => block.id));
  const alive = (pin: Pin): boolean => (pin.kind === 'order' ? known.has(pin.before) && known.has(pin.after) : known.has(pin.block));
  return { input: { ...input, blocks, pins: (input.pins ?? []).filter(alive) }, unplanned };
}
