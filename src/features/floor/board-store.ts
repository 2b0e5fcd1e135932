import type { FloorDelta, FloorSnapshot, LaneView } from '#shared/contracts/floor.ts';
import type { Heartbeat } from '#shared/realtime/events.ts';

/** Lists of the floor that a delta replaces whole; lanes have a subscription each (`lane:9`), and one for all (`lanes`), told once a batch. */
export type Part = 'calls' | 'sessions' | 'runs' | 'machines' | 'gateways' | 'tonight' | 'business' | 'centre';
type Key = Part | 'lanes' | `lane:${number}` | 'ready';

export interface BoardWorld {
  fetchSnapshot: () => Promise<FloorSnapshot>;
  /** Runs something after `ms`; gives what cancels it. */
  after: (ms: number, run: () => void) => () => void;
  /** 0 to 1, for the jitter of a repeated fetch. */
  chance: () => number;
  /** A snapshot was taken in, said at server time (epoch ms). */
  onHeard?: (at: number) => void;
  /** The snapshot was refused (signed out, another centre): nothing more is asked. */
  onRefused?: (error: unknown) => void;
  isRefusal?: (error: unknown) => boolean;
}

const BATCH_MS = 250;
const RETRY_MS = [500, 1000, 2000, 4000];

/**
 * The live floor of one centre. Protocol: subscribe and buffer → fetch the snapshot → drop deltas at or below its seq →
 * apply one only when nothing lies between it and what is shown (`prevSeq` ≤ own seq; values are absolute) → any gap or
 * new epoch: fetch again. A heartbeat ahead of everything heard means that the last message was lost: fetch again.
 * Deltas are applied in batches of 250 ms; only subscribers of what changed are told.
 */
export class BoardStore {
  private state: FloorSnapshot | null = null;
  private lanes: readonly LaneView[] = [];
  private buffer: FloorDelta[] = [];
  private fetching = false;
  private again = false;
  private failures = 0;
  private cancelBatch: (() => void) | null = null;
  private cancelRetry: (() => void) | null = null;
  private stopped = false;
  private readonly listeners = new Map<Key, Set<() => void>>();
  private readonly world: BoardWorld;

  constructor(world: BoardWorld) {
    this.world = world;
  }

  subscribe(key: Key, listener: () => void): () => void {
    const set = this.listeners.get(key) ?? new Set();
    this.listeners.set(key, set.add(listener));
    return () => set.delete(listener);
  }

  get seq(): number | null {
    return this.state?.seq ?? null;
  }
  lane(lane: number): LaneView | null {
    return this.lanes[lane - 1] ?? null;
  }
  /** The whole floor as shown; null before the first snapshot. Its `lanes` are current too. */
  snapshot(): FloorSnapshot | null {
    return this.state;
  }

  delta(delta: FloorDelta): void {
    this.buffer.push(delta);
    if (!this.fetching) this.cancelBatch ??= this.world.after(BATCH_MS, () => this.applyBuffer());
  }

  heartbeat(beat: Heartbeat): void {
    if (!this.state || this.fetching) return;
    const heard = Math.max(this.state.seq, ...this.buffer.map((d) => d.seq));
    if (beat.epoch !== this.state.epoch || beat.seq > heard) this.resync();
  }

  /** Fetches the snapshot: at the start, after a cut, when the page is seen again. Joined while one is on its way. */
  resync(): void {
    if (this.stopped) return;
    this.cancelRetry?.();
    this.cancelRetry = null;
    if (this.fetching) {
      this.again = true;
      return;
    }
    this.fetching = true;
    this.cancelBatch?.();
    this.cancelBatch = null;
    this.world.fetchSnapshot().then(
      (snapshot) => this.fetched(snapshot),
      (error: unknown) => this.failed(error),
    );
  }

  stop(): void {
    this.stopped = true;
    this.cancelBatch?.();
    this.cancelRetry?.();
  }

  private fetched(snapshot: FloorSnapshot): void {
    if (this.stopped) return;
    this.fetching = false;
    this.failures = 0;
    const newer = !this.state || snapshot.epoch !== this.state.epoch || snapshot.seq >= this.state.seq;
    if (newer) this.adopt(snapshot);
    this.world.onHeard?.(snapshot.at);
    const asked = this.again;
    this.again = false;
    if (asked) this.resync();
    else this.applyBuffer();
  }

  private failed(error: unknown): void {
    if (this.stopped) return;
    this.fetching = false;
    this.again = false;
    if (this.world.isRefusal?.(error)) {
      this.world.onRefused?.(error);
      return;
    }
    const wait = RETRY_MS[Math.min(this.failures++, RETRY_MS.length - 1)] ?? BATCH_MS;
    this.cancelRetry = this.world.after(wait * (0.75 + this.world.chance() / 2), () => this.resync());
  }

  private applyBuffer(): void {
    this.cancelBatch = null;
    if (this.fetching || !this.state) return;
    const pending = this.buffer;
    this.buffer = [];
    const changed = new Set<Key>();
    for (const [i, delta] of pending.entries()) {
      if (delta.epoch === this.state.epoch && delta.seq <= this.state.seq) continue;
      if (delta.epoch !== this.state.epoch || delta.prevSeq > this.state.seq) {
        this.buffer = pending.slice(i);
        this.resync();
        break;
      }
      this.apply(delta, changed);
    }
    this.tell(changed);
  }

  private apply({ lanes, prevSeq: _, ...rest }: FloorDelta, changed: Set<Key>): void {
    if (!this.state) return;
    for (const part of Object.keys(rest) as (keyof typeof rest)[]) if (this.listeners.has(part as Key)) changed.add(part as Key);
    this.state = { ...this.state, ...rest };
    if (!lanes?.length) return;
    const next = [...this.lanes];
    changed.add('lanes');
    for (const view of lanes) {
      next[view.lane - 1] = view;
      changed.add(`lane:${view.lane}`);
    }
    this.setLanes(next);
  }

  /** Takes a snapshot in, and tells only those whose part differs from what was shown. */
  private adopt(snapshot: FloorSnapshot): void {
    const before = this.state;
    const changed = new Set<Key>(['ready']);
    const parts: Part[] = ['calls', 'sessions', 'runs', 'machines', 'gateways', 'tonight', 'business', 'centre'];
    const kept: Partial<FloorSnapshot> = {};
    for (const part of parts) {
      if (before && same(before[part as keyof FloorSnapshot], snapshot[part as keyof FloorSnapshot])) Object.assign(kept, { [part]: before[part as keyof FloorSnapshot] });
      else changed.add(part);
    }
    const lanes = snapshot.lanes.map((view) => {
      const known = this.lanes[view.lane - 1];
      if (known && same(known, view)) return known;
      changed.add('lanes').add(`lane:${view.lane}`);
      return view;
    });
    this.state = { ...snapshot, ...kept };
    this.setLanes(lanes);
    this.tell(changed);
  }

  private setLanes(lanes: readonly LaneView[]): void {
    this.lanes = lanes;
    if (this.state) this.state = { ...this.state, lanes: [...lanes] };
  }

  private tell(changed: ReadonlySet<Key>): void {
    for (const key of changed) for (const listener of this.listeners.get(key) ?? []) listener();
  }
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);
