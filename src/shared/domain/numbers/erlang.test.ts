import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { answeredWithin, erlangB, erlangC, queue, serversNeeded, waitQuantile, type Queue } from './erlang.ts';

const input = fc.record({ arrivals: fc.double({ min: 0.01, max: 5, noNaN: true }), service: fc.double({ min: 0.2, max: 4, noNaN: true }), servers: fc.integer({ min: 1, max: 40 }) });

describe('queue', () => {
  it('keeps Little’s law, and agrees with its own state probabilities', () => {
    fc.assert(
      fc.property(input, (one) => {
        const state = queue(one);
        if (!('waits' in state)) {
          expect(one.arrivals / one.service).toBeGreaterThanOrEqual(one.servers);
          return;
        }
        let term = state.empty;
        let [sum, present, waiting] = [0, 0, 0];
        for (let k = 0; k < 20_000 && (term > 1e-17 || k < 100); k += 1) {
          sum += term;
          present += k * term;
          waiting += Math.max(0, k - one.servers) * term;
          term *= state.load / Math.min(k + 1, one.servers);
        }
        fc.pre(state.utilisation < 0.995);
        expect(sum).toBeCloseTo(1, 7);
        expect(present / (one.arrivals * state.meanTime)).toBeCloseTo(1, 6);
        expect(waiting - one.arrivals * state.meanWait).toBeCloseTo(0, 4);
        expect(state.inSystem).toBeCloseTo(state.waiting + state.load, 8);
      }),
    );
  });

  it('is overloaded, not infinite, when calls come as fast as they can be served', () => {
    expect(queue({ arrivals: 2, service: 1, servers: 2 })).toEqual({ value: null, reason: 'overloaded' });
    expect(erlangC(1, 1)).toEqual({ value: null, reason: 'overloaded' });
    expect(waitQuantile({ arrivals: 2, service: 1, servers: 2 }, 0.9)).toEqual({ value: null, reason: 'overloaded' });
    expect(answeredWithin({ arrivals: 2, service: 1, servers: 2 }, 0.9)).toEqual({ value: null, reason: 'overloaded' });
  });
});

describe('waits', () => {
  it('have quantiles that undo the distribution', () => {
    fc.assert(
      fc.property(input, fc.double({ min: 0.01, max: 0.999, noNaN: true }), (one, p) => {
        const wait = waitQuantile(one, p).value;
        if (wait === null) return;
        const share = answeredWithin(one, wait).value as number;
        if (wait === 0) expect(share).toBeGreaterThanOrEqual(p);
        else expect(share).toBeCloseTo(p, 9);
      }),
    );
  });

  it('are all at once met by enough mechanics, and not by one fewer', () => {
    const c = serversNeeded(10, 4, 0.05, 0.9);
    expect(answeredWithin({ arrivals: 10, service: 4, servers: c }, 0.05).value).toBeGreaterThanOrEqual(0.9);
    const fewer = answeredWithin({ arrivals: 10, service: 4, servers: c - 1 }, 0.05).value;
    expect(fewer === null || fewer < 0.9).toBe(true);
  });
});

describe('erlangB', () => {
  it('turns everybody away without servers, nobody without calls', () => {
    expect(erlangB(3, 0)).toBe(1);
    expect(erlangB(0, 2)).toBe(0);
    expect((queue({ arrivals: 0, service: 1, servers: 1 }) as Queue).meanWait).toBe(0);
  });
});
