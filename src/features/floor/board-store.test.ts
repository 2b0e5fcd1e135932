import { describe, expect, it, vi } from 'vitest';
import type { FloorDelta, FloorSnapshot, LaneView } from '#shared/contracts/floor.ts';
import { type BoardWorld, BoardStore } from './board-store.ts';

const lane = (n: number, change: Partial<LaneView> = {}): LaneView => ({
  lane: n, use: null, progress: null, bumpers: false, machine: 'running', stoppedSince: null, pins: null, outOfService: null, call: null,
  mechanicIn: null, film: null, brokenOff: false, dressing: null, unheard: false, hearsDeliveries: true, ...change,
});
const snapshot = (seq: number, change: Partial<FloorSnapshot> = {}): FloorSnapshot => ({
  epoch: 'e1', seq, at: 1000 + seq, centre: { slug: 'a', name: 'A', zone: 'UTC', lanes: 4 }, business: { date: '2026-05-14', from: 0, to: 1 },
  lanes: [1, 2, 3, 4].map((n) => lane(n)), calls: [], sessions: [], runs: [], machines: [], gateways: [],
  tonight: { lanes: 4, inUse: 0, occupancyPct: null, frames: 0, framesEstimated: 0, deliveries: 0, stops: 0, rate: null }, ...change,
});
const delta = (prevSeq: number, seq: number, change: Partial<FloorDelta> = {}): FloorDelta => ({ epoch: 'e1', prevSeq, seq, at: 1000 + seq, ...change });
const stopped = (n: number) => [lane(n, { machine: 'stopped' })];
const beat = (seq: number, epoch = 'e1') => ({ epoch, seq, at: 0, database: 'ok' as const, gatewaysHeardAt: null });

/** A store in a world whose time is run by hand and whose snapshots are answered by hand. */
function world(extra: Partial<BoardWorld> = {}) {
  const asked: { give: (s: FloorSnapshot) => Promise<void>; fail: (e?: unknown) => Promise<void> }[] = [];
  let timers: { ms: number; run: () => void }[] = [];
  const settle = () => new Promise<void>((done) => setImmediate(done));
  const store = new BoardStore({
    fetchSnapshot: () =>
      new Promise((resolve, reject) => {
        asked.push({ give: (s) => (resolve(s), settle()), fail: (e = new Error('away')) => (reject(e), settle()) });
      }),
    after: (ms, run) => {
      const timer = { ms, run };
      timers.push(timer);
      return () => (timers = timers.filter((t) => t !== timer));
    },
    chance: () => 0.5,
    ...extra,
  });
  const run = () => {
    const due = timers;
    timers = [];
    for (const timer of due) timer.run();
  };
  return { store, asked, run, waits: () => timers.map((t) => t.ms) };
}

async function live(seq = 10) {
  const w = world();
  w.store.resync();
  await w.asked[0]!.give(snapshot(seq));
  return w;
}

describe('the protocol of the board', () => {
  it('buffers before the snapshot, drops what it already holds, applies the rest', async () => {
    const w = world();
    w.store.resync();
    w.store.delta(delta(8, 9, { lanes: stopped(1) }));
    w.store.delta(delta(9, 11, { lanes: stopped(2) }));
    await w.asked[0]!.give(snapshot(10));
    expect([w.store.seq, w.store.lane(1)?.machine, w.store.lane(2)?.machine]).toEqual([11, 'running', 'stopped']);
    expect(w.asked).toHaveLength(1);
  });

  it('applies in batches of 250 ms and tells only whom it concerns', async () => {
    const w = await live();
    const [one, two, calls] = [vi.fn(), vi.fn(), vi.fn()];
    w.store.subscribe('lane:1', one);
    w.store.subscribe('lane:2', two);
    w.store.subscribe('calls', calls);
    w.store.delta(delta(10, 11, { lanes: stopped(1) }));
    w.store.delta(delta(11, 12, { lanes: [lane(1, { machine: 'off' })] }));
    expect([w.waits(), w.store.lane(1)?.machine]).toEqual([[250], 'running']);
    w.run();
    expect([w.store.seq, w.store.lane(1)?.machine, one.mock.calls.length, two.mock.calls.length, calls.mock.calls.length]).toEqual([12, 'off', 1, 0, 0]);
    expect(w.store.snapshot()?.lanes[0]?.machine).toBe('off');
  });

  it('a gap fetches again and keeps what came after it', async () => {
    const w = await live();
    w.store.delta(delta(11, 12, { lanes: stopped(3) }));
    w.run();
    expect([w.asked.length, w.store.seq, w.store.lane(3)?.machine]).toEqual([2, 10, 'running']);
    w.store.delta(delta(12, 13, { lanes: stopped(4) }));
    await w.asked[1]!.give(snapshot(12, { lanes: [lane(1), lane(2), ...stopped(3), lane(4)] }));
    expect([w.store.seq, w.store.lane(3)?.machine, w.store.lane(4)?.machine]).toEqual([13, 'stopped', 'stopped']);
  });

  it('a new epoch fetches again, even with a lower seq, and drops deltas of the old one', async () => {
    const w = await live(500);
    w.store.delta(delta(2, 3, { epoch: 'e2' }));
    w.run();
    w.store.delta(delta(500, 501, { lanes: stopped(1) }));
    await w.asked[1]!.give(snapshot(3, { epoch: 'e2' }));
    expect([w.store.seq, w.store.snapshot()?.epoch]).toEqual([3, 'e2']);
    expect(w.store.lane(1)?.machine).toBe('running');
  });

  it('a heartbeat ahead of everything heard finds the lost last message', async () => {
    const w = await live();
    w.store.heartbeat(beat(10));
    w.store.delta(delta(10, 12));
    w.store.heartbeat(beat(12));
    expect(w.asked).toHaveLength(1);
    w.store.heartbeat(beat(13));
    expect(w.asked).toHaveLength(2);
  });

  it('a heartbeat of another epoch fetches again', async () => {
    const w = await live();
    w.store.heartbeat(beat(1, 'e2'));
    expect(w.asked).toHaveLength(2);
  });

  it('an older snapshot that arrives late changes nothing', async () => {
    const w = await live();
    w.store.resync();
    await w.asked[1]!.give(snapshot(9, { lanes: [...stopped(1), lane(2), lane(3), lane(4)] }));
    expect([w.store.seq, w.store.lane(1)?.machine]).toEqual([10, 'running']);
  });

  it('asked for twice while one is on its way, it fetches once more after it', async () => {
    const w = await live();
    w.store.resync();
    w.store.resync();
    w.store.resync();
    expect(w.asked).toHaveLength(2);
    await w.asked[1]!.give(snapshot(11));
    expect(w.asked).toHaveLength(3);
  });

  it('keeps the identity of lanes that did not change, so that they are not drawn again', async () => {
    const w = await live();
    const before = w.store.lane(2);
    const told = vi.fn();
    w.store.subscribe('lane:2', told);
    w.store.resync();
    await w.asked[1]!.give(snapshot(11));
    expect(w.store.lane(2)).toBe(before);
    expect(told).not.toHaveBeenCalled();
  });
});

describe('a server that is away', () => {
  it('asks again with growing, jittered pauses and recovers', async () => {
    const w = world();
    w.store.resync();
    await w.asked[0]!.fail();
    expect(w.waits()).toEqual([500]);
    w.run();
    await w.asked[1]!.fail();
    expect(w.waits()).toEqual([1000]);
    w.run();
    await w.asked[2]!.give(snapshot(10));
    expect([w.store.seq, w.waits()]).toEqual([10, []]);
  });

  it('a refusal ends the asking', async () => {
    const onRefused = vi.fn();
    const w = world({ isRefusal: () => true, onRefused });
    w.store.resync();
    await w.asked[0]!.fail();
    expect([onRefused.mock.calls.length, w.waits()]).toEqual([1, []]);
  });

  it('a stopped store asks nothing more', async () => {
    const w = world();
    w.store.resync();
    w.store.stop();
    await w.asked[0]!.fail();
    w.store.resync();
    expect([w.asked.length, w.waits()]).toEqual([1, []]);
  });
});
