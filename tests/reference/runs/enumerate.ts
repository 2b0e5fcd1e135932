import { at } from '#shared/domain/runs/plan/cells.ts';
import type { PlanBlock, PlanInput, PlanMachine, Span } from '#shared/domain/runs/plan/model.ts';

/**
 * The planner's yardstick: every plan of a small night, each played minute by minute, without any of
 * the planner's code. All instants and durations of the input are whole minutes.
 */
const MIN = 60_000;

export interface Best {
  sessionsLate: number;
  lateness: number;
  freshness: number;
  travel: number;
  changes: number;
}

interface Visit {
  block: number;
  services: number;
}

const busy = (spans: readonly Span[] | undefined, minute: number): boolean => (spans ?? []).some((span) => minute * MIN >= span.from && minute * MIN < span.to);

const hop = (machine: PlanMachine, from: number | null, to: number): number => {
  if (from === null) return machine.travel.fixedMs / MIN;
  const apart = Math.abs(from - to);
  return apart <= 1 ? 0 : (machine.travel.fixedMs + (apart - 1) * machine.travel.perLaneMs) / MIN;
};

class Night {
  readonly memo = new Map<number, number[] | null>();

  constructor(readonly input: PlanInput) {}

  /** Minutes of work from `t`, resting while the machine is away. */
  after(machine: PlanMachine, t: number, work: number): number {
    let left = work;
    let minute = t;
    while (left > 0) {
      if (!busy(machine.away, minute)) left -= 1;
      minute += 1;
    }
    return minute;
  }

  before(machine: PlanMachine, t: number, work: number): number {
    let left = work;
    let minute = t;
    while (left > 0) {
      minute -= 1;
      if (!busy(machine.away, minute)) left -= 1;
    }
    return minute;
  }

  fits(machine: PlanMachine, block: PlanBlock, start: number, length: number): boolean {
    for (let minute = start; minute < start + length; minute += 1) if (busy(machine.away, minute) || busy(block.closed, minute)) return false;
    return true;
  }

  length(machine: PlanMachine, block: PlanBlock, k: number): number {
    return ((block.perLaneMs[machine.id] ?? 0) + (at(block.lanes, k).extraMs ?? 0)) / MIN;
  }

  move(machine: PlanMachine, block: PlanBlock, k: number): number {
    return k === 0 ? 0 : hop(machine, at(block.lanes, k - 1).lane, at(block.lanes, k).lane);
  }

  /** Start and ends of the lanes, as early as possible. */
  early(m: number, b: number, ready: number): number[] | null {
    const key = ((ready * 8 + b) * 4 + m) * 2;
    const known = this.memo.get(key);
    if (known !== undefined) return known;
    const [machine, block] = [at(this.input.machines, m), at(this.input.blocks, b)];
    const pin = (this.input.pins ?? []).find((p) => p.kind === 'start' && p.block === block.id);
    const asked = pin?.kind === 'start' ? Math.max(pin.at / MIN, at(block.lanes, 0).release / MIN, 0) : null;
    let t = asked === null ? ready : Math.max(asked, ready);
    let result: number[] | null = [];
    for (const [k, lane] of block.lanes.entries()) {
      t = this.after(machine, t, this.move(machine, block, k));
      t = Math.max(t, lane.release / MIN, 0);
      while (!this.fits(machine, block, t, this.length(machine, block, k))) t += 1;
      if (k === 0) result.push(t);
      t += this.length(machine, block, k);
      result.push(t);
    }
    if (asked !== null && result[0] !== asked) result = null;
    this.memo.set(key, result);
    return result;
  }

  late(m: number, b: number, until: number): number[] | null {
    const key = ((until * 8 + b) * 4 + m) * 2 + 1;
    const known = this.memo.get(key);
    if (known !== undefined) return known;
    const [machine, block] = [at(this.input.machines, m), at(this.input.blocks, b)];
    let result: number[] | null = [];
    if ((this.input.pins ?? []).some((p) => p.kind === 'start' && p.block === block.id)) {
      result = this.early(m, b, 0);
      if (result && (result.at(-1) ?? 0) > until) result = null;
    } else {
      let t = until;
      for (let k = block.lanes.length - 1; k >= 0 && result; k -= 1) {
        const length = this.length(machine, block, k);
        while (t - length >= 0 && !this.fits(machine, block, t - length, length)) t -= 1;
        if (t - length < Math.max(0, at(block.lanes, k).release / MIN)) result = null;
        else {
          result.unshift(t);
          if (k === 0) result.unshift(t - length);
          t = this.before(machine, t - length, this.move(machine, block, k));
        }
      }
    }
    this.memo.set(key, result);
    return result;
  }

  setup(machine: PlanMachine, last: number, next: number, services: number): { travel: number; all: number } {
    const block = at(this.input.blocks, next);
    const previous = last < 0 ? null : at(this.input.blocks, last);
    const travel = hop(machine, previous ? at(previous.lanes, previous.lanes.length - 1).lane : machine.atLane, at(block.lanes, 0).lane);
    const pattern = previous ? previous.pattern : machine.loadedPattern;
    const product = previous ? previous.product : machine.loadedProduct;
    let all = travel + (pattern === block.pattern ? 0 : machine.patternChangeMs / MIN) + (product === block.product ? 0 : machine.productChangeMs / MIN);
    machine.services.forEach((service, j) => (all += (services >> j) & 1 ? service.ms / MIN : 0));
    return { travel, all };
  }

  stored(m: number, visits: readonly Visit[]): boolean {
    const machine = at(this.input.machines, m);
    const level = Object.fromEntries(Object.entries(machine.stores).map(([store, state]) => [store, state.level]));
    for (const { block, services } of visits) {
      machine.services.forEach((service, j) => {
        if ((services >> j) & 1) for (const store of service.restores) level[store] = machine.stores[store]?.capacity ?? 0;
      });
      const use = this.input.blocks[block]?.usePerLane?.[machine.id] ?? {};
      for (const [store, amount] of Object.entries(use)) {
        level[store] = (level[store] ?? Infinity) - amount * at(this.input.blocks, block).lanes.length;
        if ((level[store] ?? 0) < 0) return false;
      }
    }
    return true;
  }

  allowed(m: number, visits: readonly Visit[]): boolean {
    const machine = at(this.input.machines, m);
    const ids = visits.map(({ block }) => at(this.input.blocks, block).id);
    if (visits.some(({ block }) => at(this.input.blocks, block).perLaneMs[machine.id] === undefined)) return false;
    return (this.input.pins ?? []).every((pin) => {
      if (pin.kind === 'start') return true;
      if (pin.kind === 'order') return ids.includes(pin.before) === ids.includes(pin.after) && ids.indexOf(pin.before) <= ids.indexOf(pin.after);
      if (pin.kind === 'first' && pin.machine === machine.id) return ids[0] === pin.block;
      return pin.machine === machine.id || !ids.includes(pin.block);
    });
  }

  value(orders: readonly (readonly Visit[])[]): Best | null {
    const { input } = this;
    const late = new Map<string, number>();
    const due = (b: number): number => (at(input.blocks, b).warmUp - input.marginMs) / MIN;
    for (const [m, visits] of orders.entries()) {
      let [t, last] = [at(input.machines, m).availableFrom / MIN, -1];
      for (const { block, services } of visits) {
        const lanes = this.early(m, block, this.after(at(input.machines, m), t, this.setup(at(input.machines, m), last, block, services).all));
        if (!lanes) return null;
        [t, last] = [at(lanes, lanes.length - 1), block];
        const session = at(input.blocks, block).sessionId;
        late.set(session, Math.max(late.get(session) ?? 0, t - due(block)));
      }
    }
    const best: Best = { sessionsLate: 0, lateness: 0, freshness: 0, travel: 0, changes: 0 };
    for (const by of late.values()) if (by > 0) [best.sessionsLate, best.lateness] = [best.sessionsLate + 1, best.lateness + by];
    for (const [m, visits] of orders.entries()) if (!this.shift(m, visits, late, due, best)) return null;
    return best;
  }

  private shift(m: number, visits: readonly Visit[], late: Map<string, number>, due: (b: number) => number, best: Best): boolean {
    const machine = at(this.input.machines, m);
    let until = Infinity;
    for (let i = visits.length - 1; i >= 0; i -= 1) {
      const { block, services } = at(visits, i);
      const ready = due(block) + (late.get(at(this.input.blocks, block).sessionId) ?? 0);
      const lanes = this.late(m, block, Math.min(until, ready));
      if (!lanes) return false;
      const last = i === 0 ? -1 : at(visits, i - 1).block;
      const setup = this.setup(machine, last, block, services);
      lanes.slice(1).forEach((end) => (best.freshness += ready - end));
      best.travel += setup.travel;
      at(this.input.blocks, block).lanes.forEach((_, k) => (best.travel += this.move(machine, at(this.input.blocks, block), k)));
      best.changes += this.changed(machine, block, last) ? 1 : 0;
      until = this.before(machine, at(lanes, 0), setup.all);
    }
    return visits.length === 0 || until >= machine.availableFrom / MIN;
  }

  private changed(machine: PlanMachine, block: number, last: number): boolean {
    const id = at(this.input.blocks, block).id;
    const run = this.input.previous?.find((known) => known.blocks.includes(id));
    if (!run) return false;
    const before = run.blocks[run.blocks.indexOf(id) - 1];
    return run.machine !== machine.id || before !== (last < 0 ? undefined : at(this.input.blocks, last).id);
  }
}

export const KEYS = ['sessionsLate', 'lateness', 'freshness', 'travel', 'changes'] as const;

const better = (a: Best, b: Best): boolean => {
  for (const key of KEYS) if (a[key] !== b[key]) return a[key] < b[key];
  return false;
};

/** Every order of every sharing of the blocks, every choice of services; null when the pins allow none. */
export function bestByEnumeration(input: PlanInput): Best | null {
  const night = new Night(input);
  const n = input.blocks.length;
  const tight = input.machines.some((machine) => Object.keys(machine.stores).length > 0);
  let best: Best | null = null;
  const consider = (orders: Visit[][]): void => {
    if (!orders.every((visits, m) => night.allowed(m, visits) && night.stored(m, visits))) return;
    const value = night.value(orders);
    if (value && (!best || better(value, best))) best = value;
  };
  const orders: Visit[][] = input.machines.map(() => []);
  const place = (m: number, left: number): void => {
    if (left === 0) {
      consider(orders.map((visits) => [...visits]));
      return;
    }
    if (m + 1 < orders.length) place(m + 1, left);
    const masks = tight ? 1 << at(input.machines, m).services.length : 1;
    for (let block = 0; block < n; block += 1) {
      if (!((left >> block) & 1)) continue;
      for (let services = 0; services < masks; services += 1) {
        at(orders, m).push({ block, services });
        place(m, left & ~(1 << block));
        at(orders, m).pop();
      }
    }
  };
  place(0, (1 << n) - 1);
  return best;
}
