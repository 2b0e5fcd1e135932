import { describe, expect, it } from 'vitest';
import { aNight, canonical, deliveries, type Night, type Step } from '#tests/support/night.ts';
import { raiseId } from '../calls/raise.ts';
import type { Fact, Person } from '../journal/fact.ts';
import { insert, startTimeline, type Fold, type Timeline } from '../journal/timeline.ts';
import { foldHouse } from './fold.ts';
import { emptyHouse, type House } from './state.ts';

const mechanic: Person = { kind: 'user', id: 'mechanic', name: 'Mo' };
const gateway: Person = { kind: 'gateway', id: 'gateway', name: 'G' };

/** What the server does with a night: each step is one unit of work. */
function served<S>(night: Night, steps: readonly Step[], fold: Fold<S>, base: S): S {
  let timeline: Timeline<S> = startTimeline(base);
  const arrived = new Map<string, Fact>();
  steps.forEach((step, i) => {
    const place = { seq: i + 1, receivedAt: Math.round(step.at) };
    const facts = 'events' in step ? step.events.flatMap((event, n): Fact[] => {
      if (arrived.has(event.id)) return [];
      const time = event.type === 'run.lane.dressed' ? event.data.finishedAt : event.time;
      // Field by field: with spreads in it, making facts took longer than folding them.
      const fact = { seq: place.seq, n, source: event.source, id: event.id, type: event.type, time, receivedAt: place.receivedAt, by: gateway, data: event.data } as Fact;
      arrived.set(event.id, fact);
      return [fact];
    }) : [acted(step.act, arrived, place)];
    timeline = insert(timeline, fold, facts).timeline;
  });
  expect(arrived.size).toBe(night.events.length);
  return timeline.state;
}

function acted(act: Night['acts'][number], arrived: Map<string, Fact>, place: { seq: number; receivedAt: number }): Fact {
  const raise = arrived.get(act.raise);
  if (!raise) throw new Error('somebody acted on a call that had not arrived');
  const call = raiseId(raise);
  const frame = { ...place, source: 'lanewright/user/mechanic', id: `${act.what} ${act.raise}`, time: act.at, n: 0, by: mechanic };
  if (act.what === 'acknowledge') return { ...frame, type: 'call.acknowledged', data: { call } };
  if (act.what === 'on-lane') return { ...frame, type: 'call.on-lane', data: { call } };
  return { ...frame, type: 'call.cleared', data: { call, cause: 'deck' } };
}

describe('order of arrival', () => {
  it('changes nothing: 200 nights of 3,000 events of every type, with acknowledgements and clears between them', () => {
    let cleared = 0;
    for (let seed = 1; seed <= 200; seed += 1) {
      const night = aNight(seed);
      const straight = served<House>(night, deliveries(night, seed, false), foldHouse, emptyHouse(night.lanes));
      const shuffled = served<House>(night, deliveries(night, seed, true), foldHouse, emptyHouse(night.lanes));
      expect(canonical(shuffled) === canonical(straight), `night ${seed}`).toBe(true);
      cleared += straight.calls.closed.length;
      expect(new Set(night.events.map((event) => event.type)).size).toBe(20);
    }
    expect(cleared).toBeGreaterThan(200 * 10);
  }, 240_000);

  it('is told by a planted fold that looks at the arrival', () => {
    const night = aNight(1, 1_000);
    const planted: Fold<House> = (house, fact) => {
      const next = foldHouse(house, fact);
      const late = fact.type === 'lane.counted' && fact.seq % 2 === 0;
      return late ? { ...next, floor: next.floor.map((lane) => ({ ...lane, deliveriesSince: lane.deliveriesSince + 1 })) } : next;
    };
    const run = (shuffled: boolean) => canonical(served(night, deliveries(night, 1, shuffled), planted, emptyHouse(night.lanes)));
    expect(run(true)).not.toBe(run(false));
  });
});
