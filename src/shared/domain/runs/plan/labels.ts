import { f64, i32 } from './cells.ts';

/**
 * Labels of a dynamic programme over sets: one chain a state (set × n + last block), in growing
 * columns instead of objects, since a night of 14 blocks makes some hundred thousand.
 */
export class Labels {
  readonly head: Int32Array;
  next: Int32Array;
  time: Int32Array;
  cost: Float64Array;
  parent: Int32Array;
  services: Uint8Array;
  /** `width` whole numbers a label, whose meaning is the caller's. */
  extra: Int32Array;
  count = 0;

  constructor(
    states: number,
    readonly width: number,
  ) {
    const room = Math.max(64, states);
    this.head = new Int32Array(states).fill(-1);
    this.next = new Int32Array(room);
    this.time = new Int32Array(room);
    this.cost = new Float64Array(room);
    this.parent = new Int32Array(room);
    this.services = new Uint8Array(room);
    this.extra = new Int32Array(room * width);
  }

  private grow(): void {
    const wider = <T extends Int32Array | Float64Array | Uint8Array>(old: T, fresh: T): T => {
      fresh.set(old);
      return fresh;
    };
    const room = this.next.length * 2;
    this.next = wider(this.next, new Int32Array(room));
    this.time = wider(this.time, new Int32Array(room));
    this.cost = wider(this.cost, new Float64Array(room));
    this.parent = wider(this.parent, new Int32Array(room));
    this.services = wider(this.services, new Uint8Array(room));
    this.extra = wider(this.extra, new Int32Array(room * this.width));
  }

  /** Adds a label to a state's chain and returns its place. */
  push(state: number, time: number, cost: number, parent: number, services: number, extra: Int32Array): number {
    if (this.count === this.next.length) this.grow();
    const at = this.count++;
    this.time[at] = time;
    this.cost[at] = cost;
    this.parent[at] = parent;
    this.services[at] = services;
    for (let k = 0; k < this.width; k += 1) this.extra[at * this.width + k] = i32(extra, k);
    this.next[at] = i32(this.head, state);
    this.head[state] = at;
    return at;
  }

  /** Takes the label after `previous` (−1: the first) out of a state's chain. */
  unlink(state: number, previous: number, at: number): void {
    if (previous < 0) this.head[state] = i32(this.next, at);
    else this.next[previous] = i32(this.next, at);
  }

  /**
   * Adds a label unless one of its state is as good in time, cost and every extra; drops those that it
   * makes needless. Smaller is better throughout. Returns false when it was not needed.
   */
  insert(state: number, time: number, cost: number, parent: number, services: number, extra: Int32Array): boolean {
    let previous = -1;
    for (let at = i32(this.head, state); at >= 0; ) {
      const following = i32(this.next, at);
      const [earlier, cheaper] = [i32(this.time, at) - time, f64(this.cost, at) - cost];
      if (earlier <= 0 && cheaper <= 0 && this.compares(at, extra, -1)) return false;
      if (earlier >= 0 && cheaper >= 0 && this.compares(at, extra, 1)) this.unlink(state, previous, at);
      else previous = at;
      at = following;
    }
    this.push(state, time, cost, parent, services, extra);
    return true;
  }

  /** Every extra of the label is ≤ (sign −1) or ≥ (sign 1) the given one. */
  compares(at: number, extra: Int32Array, sign: number): boolean {
    for (let k = 0; k < this.width; k += 1) if ((i32(this.extra, at * this.width + k) - i32(extra, k)) * sign < 0) return false;
    return true;
  }
}

/** How a machine's blocks follow one another: services are a bit mask, done on the way to the block. */
export interface Step {
  block: number;
  services: number;
}
