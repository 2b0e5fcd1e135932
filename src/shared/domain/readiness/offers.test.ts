import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { aCall, anEvening, aRun, aSession, aUse, MIN, readinessOf, WARM_UP } from '#tests/support/evening.ts';
import { pairsOf } from '../leagues/lanes.ts';
import type { Surroundings } from './situation.ts';
import { offersFor } from './offers.ts';

const session = aSession();
const stop = aCall(7);
const offered = (around: Surroundings) => offersFor(session, readinessOf(around), around);
const booked = (id: string, lanes: number[], from: number, to: number) => aSession({ id, name: id, lanes, warmUpAt: from, startAt: from, endAt: to });
const moves = (around: Surroundings) => offered(around).offers.flatMap((offer) => (offer.kind === 'one-lane' ? [] : [offer]));

describe('offers when a lane fails', () => {
  it('none while nothing fails, nor because nobody has planned to dress', () => {
    expect(offered(anEvening())).toEqual({ failing: [], offers: [], noneUntil: null });
    expect(offered(anEvening({ lanes: { 7: { dressed: null } } })).failing).toEqual([]);
  });

  it('the nearest pair that is ready by the same checks, and the lane that is left', () => {
    expect(offered(anEvening({ calls: [stop] }))).toEqual({
      failing: [7], noneUntil: null,
      offers: [{ kind: 'move', fromPair: 7, toPair: 3, deliveries: 0 }, { kind: 'one-lane', fromPair: 7, lane: 8, delayMs: 35 * MIN }],
    });
  });

  it.each([
    ['booked over its time', { sessions: [session, booked('party', [3, 4], WARM_UP + 60 * MIN, WARM_UP + 120 * MIN)] }],
    ['out of service', { lanes: { 4: { outOfService: { since: 1, reason: 'belt', by: 'Odell' } } } }],
    ['with a stop', { calls: [stop, aCall(3)] }],
    ['of the other family', { lanes: {}, facts: [3, 4] }],
    ['with people on it without an end', { lanes: { 3: { use: aUse() } } }],
    ['bowled on much more than the others', { lanes: { 3: { deliveriesSince: 61 } } }],
    ['of another revision', { lanes: { 3: { dressed: { at: WARM_UP - 60 * MIN, machine: 'M1', run: '1', pattern: 'owls', revision: 2 } } }, now: WARM_UP - 2 * MIN }],
    ['on which a run begins meanwhile', { runs: [aRun({ key: 'M1/9', run: '9', lanes: [3, 4], plannedStart: WARM_UP + 10 * MIN })] }],
  ])('never a pair %s', (_, { facts, ...change }: { facts?: number[] } & Record<string, unknown>) => {
    const around = anEvening({ calls: [stop], ...change });
    const lanes = around.lanes.map((lane) => (facts?.includes(lane.lane) ? { ...lane, family: 'string' as const } : lane));
    expect(moves({ ...around, lanes })).toEqual([expect.objectContaining({ toPair: 1 })]);
  });

  it('only a certified pair for sanctioned play', () => {
    const sanctioned = aSession({ sanctioned: true });
    const around = anEvening({ calls: [stop], sessions: [sanctioned] });
    const lanes = around.lanes.map((lane) => (lane.lane === 3 ? { ...lane, certifiedUntil: '2026-01-01' } : lane));
    const offers = offersFor(sanctioned, readinessOf({ ...around, lanes }, sanctioned), { ...around, lanes }).offers;
    expect(offers[0]).toMatchObject({ kind: 'move', toPair: 1 });
  });

  it('dress first, then move, when that ends before warm-up', () => {
    const lanes = Object.fromEntries([1, 2, 3, 4].map((lane) => [lane, { dressed: null }]));
    const around = anEvening({ calls: [stop], lanes, now: WARM_UP - 5 * MIN });
    expect(moves(around)).toEqual([{ kind: 'dress-then-move', fromPair: 7, toPair: 3, machine: 'M1', startAt: WARM_UP - 5 * MIN, doneAt: WARM_UP - MIN }]);
    expect(moves({ ...around, now: WARM_UP - 3 * MIN })).toEqual([]);
  });

  it('says until when no pair is to be had', () => {
    const full = [session, booked('a', [1, 2], WARM_UP, WARM_UP + 90 * MIN), booked('b', [3, 4], WARM_UP - 30 * MIN, WARM_UP + 60 * MIN)];
    expect(offered(anEvening({ calls: [stop], sessions: full }))).toMatchObject({ noneUntil: WARM_UP + 60 * MIN, offers: [{ kind: 'one-lane' }] });
  });

  it('two failing pairs are never offered the same one', () => {
    const around = anEvening({ calls: [aCall(5), stop] });
    expect(moves(around).map((offer) => [offer.fromPair, offer.toPair])).toEqual([[5, 3], [7, 1]]);
  });

  it('whatever is booked, what is offered isn\'t', () => {
    const booking = fc.record({ from: fc.integer({ min: -120, max: 200 }), long: fc.integer({ min: 5, max: 180 }), pair: fc.constantFrom(1, 3) });
    fc.assert(fc.property(fc.array(booking, { maxLength: 4 }), (list) => {
      const others = list.map((b, i) => booked(`b${i}`, [b.pair, b.pair + 1], WARM_UP + b.from * MIN, WARM_UP + (b.from + b.long) * MIN));
      for (const offer of moves(anEvening({ calls: [stop], sessions: [session, ...others] }))) {
        const inTheWay = others.filter((o) => pairsOf(o.lanes).includes(offer.toPair) && o.warmUpAt < session.endAt && o.endAt > session.warmUpAt);
        if (inTheWay.length > 0) return false;
      }
      return true;
    }));
  });
});
