import { describe, expect, it } from 'vitest';
import type { Fact, FactData, FactType, Person } from '../journal/fact.ts';
import { checkpointHouse, foldHouse } from './fold.ts';
import { emptyHouse, type House } from './state.ts';

const gateway: Person = { kind: 'gateway', id: 'g1', name: 'Back room' };
const ines: Person = { kind: 'user', id: 'u1', name: 'Ines' };
let seq = 0;

function fact<T extends FactType>(time: number, type: T, data: FactData[T], by: Person = gateway): Fact {
  seq += 1;
  return { seq, n: 0, source: 's', id: `e${seq}`, time, receivedAt: time + 5, by, type, data } as Fact;
}
const fold = (...facts: Fact[]): House => facts.reduce(foldHouse, emptyHouse(8));
const lane = (house: House, n: number) => house.floor[n - 1]!;
const only = (house: House) => Object.values(house.calls.open)[0]!;

describe('people on lanes', () => {
  it('takes the desk’s note and the scoring system’s word about the same people for one use', () => {
    const house = fold(fact(10, 'lane.opened', { lane: 3, use: 'open' }, ines), fact(20, 'lane.opened', { lane: 3, bowlers: 4 }));
    expect(lane(house, 3).use).toMatchObject({ kind: 'open', from: 10, bowlers: 4 });
    expect(lane(house, 3).uses).toEqual([]);
  });
  it('ends one party where the next begins', () => {
    const house = fold(fact(10, 'lane.opened', { lane: 3, label: 'Ada', use: 'party' }), fact(20, 'lane.opened', { lane: 3, label: 'Bo', use: 'party' }));
    expect(lane(house, 3).uses).toMatchObject([{ label: 'Ada', from: 10, to: 20 }]);
    expect(lane(house, 3).use).toMatchObject({ label: 'Bo', from: 20 });
  });
  it('moves people with their label', () => {
    const house = fold(fact(10, 'lane.opened', { lane: 1, label: 'Ada', use: 'open' }), fact(30, 'lane.moved', { from: 1, to: 6 }));
    expect(lane(house, 1).use).toBeNull();
    expect(lane(house, 6).use).toMatchObject({ label: 'Ada', kind: 'open', from: 30 });
  });
  it('keeps counts on a closed lane as unassigned', () => {
    const house = fold(fact(10, 'lane.counted', { lane: 2, deliveries: 3 }), fact(20, 'lane.opened', { lane: 2, use: 'open' }), fact(30, 'lane.counted', { lane: 2, deliveries: 2, frames: 1 }));
    expect(lane(house, 2).counts.map((c) => [c.kind, c.opened, c.deliveries, c.frames])).toEqual([['unassigned', 0, 3, 0], ['open', 20, 2, 1]]);
  });
});

describe('calls', () => {
  it('is one call for a lane and equipment; later stops join it, a clear ends the stop', () => {
    const stopped = fold(fact(10, 'pinsetter.stopped', { lane: 4, text: 'pin off spot' }), fact(20, 'pinsetter.restarted', { lane: 4 }), fact(30, 'pinsetter.stopped', { lane: 4 }));
    const call = only(stopped);
    expect(call.raises).toHaveLength(2);
    expect(call.stops).toEqual([{ from: 10, to: 20 }, { from: 30, to: null }]);
    expect(call.returnedAt).toBeNull();
    const cleared = foldHouse(stopped, fact(40, 'call.cleared', { call: call.id, cause: 'pin-jam' }, ines));
    expect(cleared.calls.open).toEqual({});
    expect(cleared.calls.closed[0]).toMatchObject({ status: 'closed', stops: [{ from: 10, to: 20 }, { from: 30, to: 40 }] });
    expect(lane(cleared, 4).stop).toBeNull();
  });
  it('counts a shared ball return once and holds both lanes', () => {
    const house = fold(fact(10, 'equipment.faulted', { lane: 5, equipment: 'ball-return' }), fact(12, 'equipment.faulted', { lane: 6, equipment: 'ball-return' }));
    expect(Object.keys(house.calls.open)).toEqual(['pair:5/ball-return']);
    expect(only(house).lanesHeld).toEqual([5, 6]);
  });
  it('is one call of the house when the power dips', () => {
    const house = fold(...[1, 2, 3].map((n) => fact(10 + n, 'pinsetter.stopped', { lane: n, reason: 'power' })));
    expect(Object.keys(house.calls.open)).toEqual(['house/power']);
    expect(lane(house, 2).stop).not.toBeNull();
  });
  it('keeps the id of the raise that arrived first, and its earliest time', () => {
    const late = { ...fact(10, 'pinsetter.stopped', { lane: 4 }), seq: 900 };
    const first = { ...fact(30, 'pinsetter.stopped', { lane: 4 }), seq: 800 };
    const alone = only(fold(first));
    const both = only(fold(late, first));
    expect(both.id).toBe(alone.id);
    expect(both.raisedAt).toBe(10);
    expect(both.receivedAt).toBe(35);
    const acknowledged = foldHouse(fold(late, first), fact(40, 'call.acknowledged', { call: alone.id }, ines));
    expect(only(acknowledged).status).toBe('acknowledged');
  });
  it('takes lanes out of service and puts them back', () => {
    const down = fold(fact(10, 'equipment.faulted', { lane: 5, equipment: 'ball-lift' }));
    const out = foldHouse(down, fact(20, 'call.out-of-service', { call: only(down).id, reason: 'belt' }, ines));
    expect([lane(out, 5).outOfService, lane(out, 6).outOfService]).toMatchObject([{ reason: 'belt' }, { reason: 'belt' }]);
    const back = foldHouse(out, fact(30, 'call.back-in-service', { call: only(out).id, cause: 'belt' }, ines));
    expect([lane(back, 5).outOfService, lane(back, 6).outOfService]).toEqual([null, null]);
    expect(lane(back, 6).outs).toEqual([{ from: 20, to: 30, reason: 'belt' }]);
    expect(back.calls.closed[0]).toMatchObject({ outOfService: { at: 20, backAt: 30 }, cleared: { cause: 'belt' } });
  });
  it('alarms when a machine counts while somebody is recorded in it', () => {
    const down = fold(fact(10, 'pinsetter.stopped', { lane: 7 }));
    const call = only(down).id;
    const inside = [fact(20, 'lockout.begun', { call }, ines), fact(21, 'lockout.stepped', { call, step: 'try', done: true }, ines)].reduce(foldHouse, down);
    expect(only(inside).lockout).toMatchObject({ inMachineSince: 21, alarmAt: null });
    expect(only(foldHouse(inside, fact(30, 'lane.counted', { lane: 8, cycles: 1 }))).lockout?.alarmAt).toBeNull();
    expect(only(foldHouse(inside, fact(31, 'lane.counted', { lane: 7, cycles: 1 }))).lockout?.alarmAt).toBe(31);
  });
});

describe('runs', () => {
  const run = { machine: 'm1', run: '118' };
  it('dresses a lane as of its end and counts deliveries from there', () => {
    const house = fold(
      fact(5, 'lane.counted', { lane: 1, deliveries: 9 }), fact(10, 'run.started', { ...run, pattern: 'house', revision: 2, lanes: [1, 2] }),
      fact(20, 'run.lane.dressed', { ...run, lane: 1, startedAt: 11, finishedAt: 20, conditionerMl: { a: 24.6 } }), fact(25, 'lane.counted', { lane: 1, deliveries: 2 }),
    );
    expect(lane(house, 1)).toMatchObject({ dressed: { at: 20, pattern: 'house', revision: 2 }, deliveriesSince: 2 });
    expect(house.runs.active['m1/118']?.done).toMatchObject([{ lane: 1, aUl: 24600, outcome: 'dressed' }]);
  });
  it('leaves a lane on which the machine broke off to be redone', () => {
    const house = fold(fact(10, 'run.started', run), fact(20, 'run.aborted', { ...run, lane: 2, reason: 'battery' }));
    expect(lane(house, 2)).toMatchObject({ brokenOff: { run: '118' }, dressed: null });
    expect(house.runs.ended).toMatchObject([{ status: 'aborted', done: [{ lane: 2, outcome: 'broken-off' }] }]);
  });
  it('ends a run that nobody closed where the machine’s next one begins', () => {
    const house = fold(fact(10, 'run.started', run), fact(50, 'run.started', { machine: 'm1', run: '119' }));
    expect(house.runs.ended).toMatchObject([{ run: '118', status: 'finished', reason: 'not-closed' }]);
    expect(Object.keys(house.runs.active)).toEqual(['m1/119']);
  });
  it('a code that a machine gives again is another run; a lane told late still goes to the one that had it', () => {
    const first = fold(fact(10, 'run.started', run), fact(20, 'run.lane.dressed', { ...run, lane: 1, startedAt: 11, finishedAt: 20 }), fact(30, 'run.finished', run), fact(32, 'run.lane.skipped', { ...run, lane: 2, reason: 'occupied' }));
    const again = [fact(50, 'run.started', { ...run, pattern: 'house' }), fact(60, 'run.lane.dressed', { ...run, lane: 3, startedAt: 51, finishedAt: 60 })].reduce(foldHouse, first);
    expect(again.runs.ended).toEqual(first.runs.ended);
    expect(again.runs.ended).toMatchObject([{ key: 'm1/118/10', done: [{ lane: 1 }, { lane: 2 }] }]);
    expect(again.runs.active).toMatchObject({ 'm1/118': { key: 'm1/118/50', startedAt: 50, pattern: 'house', done: [{ lane: 3 }] } });
  });
});

it('drops what has ended at a cut and keeps what goes on', () => {
  const house = fold(fact(10, 'lane.opened', { lane: 1 }), fact(20, 'lane.closed', { lane: 1 }), fact(30, 'lane.opened', { lane: 2 }), fact(31, 'lane.counted', { lane: 2, frames: 1 }));
  const kept = checkpointHouse(house);
  expect(lane(kept, 1).uses).toEqual([]);
  expect(lane(kept, 2)).toMatchObject({ use: { from: 30 }, counts: [], framesEver: 1 });
});
