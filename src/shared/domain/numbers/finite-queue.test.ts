import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { queue, type Queue } from './erlang.ts';
import { finiteAnsweredWithin, finiteQueue } from './finite-queue.ts';

const input = fc.record({
  machines: fc.integer({ min: 1, max: 64 }),
  servers: fc.integer({ min: 1, max: 6 }),
  calls: fc.double({ min: 1e-4, max: 1e6, noNaN: true }),
  service: fc.double({ min: 0.01, max: 50, noNaN: true }),
});

describe('finiteQueue', () => {
  it('keeps Little’s law and adds up, from a quiet house to one that is all down', () => {
    fc.assert(
      fc.property(input, (one) => {
        const state = finiteQueue(one);
        expect(state.down.reduce((sum, chance) => sum + chance, 0)).toBeCloseTo(1, 12);
        const served = state.down.reduce((sum, chance, k) => sum + chance * Math.min(k, one.servers), 0) * one.service;
        expect(Math.abs(state.arrivals / served - 1)).toBeLessThan(1e-11);
        expect(Math.abs((state.arrivals * state.meanTime) / state.meanDown - 1)).toBeLessThan(1e-11);
        expect(state.availability).toBeGreaterThanOrEqual(0);
        expect(state.availability).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('comes near the open queue when machines are many and calls few', () => {
    const open = queue({ arrivals: 1, service: 1, servers: 2 }) as Queue;
    const finite = finiteQueue({ machines: 20_000, servers: 2, calls: 1 / 20_000, service: 1 });
    expect(finite.meanWait).toBeCloseTo(open.meanWait, 3);
  });
});

describe('finiteAnsweredWithin', () => {
  it('has the mean wait as the area of its tail', () => {
    const house = { machines: 12, servers: 2, calls: 0.2, service: 1 };
    let area = 0;
    const step = 0.002;
    for (let t = step / 2; t < 60; t += step) area += step * (1 - finiteAnsweredWithin(house, t));
    expect(area).toBeCloseTo(finiteQueue(house).meanWait, 5);
  });

  it('is certain for a house of one machine', () => {
    expect(finiteAnsweredWithin({ machines: 1, servers: 1, calls: 1, service: 1 }, 0)).toBe(1);
  });
});
