import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Fact } from './fact.ts';
import { compareFacts } from './order.ts';
import { factsOf, insert, rebased, startTimeline, type Fold } from './timeline.ts';

const fact = (time: number, source: string, id: string): Fact => ({
  seq: 1, n: 0, source, id, time, receivedAt: time, by: null, type: 'lane.closed', data: { lane: 1 },
});
const keyOf = (f: Fact) => `${f.time}/${f.source}/${f.id}`;
/** Order matters to this fold: it says which facts it saw after which. */
const chain: Fold<string> = (state, f) => `${state}|${keyOf(f)}`;

const facts = fc.uniqueArray(
  fc.record({ time: fc.integer({ min: 0, max: 60 }), source: fc.constantFrom('a', 'é', '\u{1F3B3}', '\uFFFD'), id: fc.string({ minLength: 1, maxLength: 3 }) }),
  { selector: (f) => `${f.time}/${f.source}/${f.id}`, maxLength: 300 },
).map((list) => list.map((f) => fact(f.time, f.source, f.id)));

/** A delivery: every fact at least once, some twice, shuffled, cut into batches. */
const deliveries = facts.chain((list) => fc.record({
  list: fc.constant(list),
  order: fc.shuffledSubarray([...list, ...list.slice(0, Math.ceil(list.length / 3))], { minLength: list.length + Math.ceil(list.length / 3) }),
  size: fc.integer({ min: 1, max: 40 }),
}));

const deliver = (order: Fact[], size: number, fold: Fold<string>) => {
  let timeline = startTimeline('');
  for (let i = 0; i < order.length; i += size) timeline = insert(timeline, fold, order.slice(i, i + size)).timeline;
  return timeline;
};

const inOrder = (list: Fact[]) => [...list].sort(compareFacts).reduce(chain, '');

describe('timeline', () => {
  it('is the sorted fold, however facts arrive', () => {
    fc.assert(fc.property(deliveries, ({ list, order, size }) => {
      const timeline = deliver(order, size, chain);
      expect(timeline.state).toBe(inOrder(list));
      expect(factsOf(timeline).map(keyOf)).toEqual([...list].sort(compareFacts).map(keyOf));
    }), { numRuns: 200 });
  });

  it('shows a fold that depends on the order of arrival', () => {
    let arrivals = 0;
    const planted: Fold<string> = (state, f) => `${state}|${keyOf(f)}#${(arrivals += 1)}`;
    const list = Array.from({ length: 50 }, (_, i) => fact(i, 'a', String(i)));
    const forwards = deliver(list, 5, planted).state;
    arrivals = 0;
    expect(deliver([...list].reverse(), 5, planted).state).not.toBe(forwards);
  });

  it('folds newer facts on, and refolds no further back than the state kept before a late one', () => {
    const list = Array.from({ length: 1000 }, (_, i) => fact(2 * i, 'a', String(i)));
    const whole = insert(startTimeline(''), chain, list);
    expect(whole.refolded).toBe(0);
    const late = insert(whole.timeline, chain, [fact(2 * 900 + 1, 'a', 'late')]);
    expect(late.refolded).toBeGreaterThanOrEqual(99);
    expect(late.refolded).toBeLessThan(99 + 33);
  });

  it('leaves the timeline it was given as it was', () => {
    const list = Array.from({ length: 40 }, (_, i) => fact(2 * i, 'a', String(i)));
    const before = insert(startTimeline(''), chain, list).timeline;
    const state = before.state;
    const one = insert(before, chain, [fact(100, 'b', 'x')]).timeline;
    const other = insert(before, chain, [fact(7, 'b', 'y'), fact(101, 'b', 'z')]).timeline;
    expect(before.state).toBe(state);
    expect(factsOf(before)).toHaveLength(40);
    expect(one.state).toBe(inOrder([...list, fact(100, 'b', 'x')]));
    expect(other.state).toBe(inOrder([...list, fact(7, 'b', 'y'), fact(101, 'b', 'z')]));
  });

  it('folds the same facts upon another base', () => {
    const list = Array.from({ length: 70 }, (_, i) => fact(i, 'a', String(i)));
    const timeline = insert(startTimeline(''), chain, list).timeline;
    expect(rebased(timeline, chain, 'base').state).toBe(list.reduce(chain, 'base'));
  });
});
