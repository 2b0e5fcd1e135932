import { expect, it } from 'vitest';
import { queue, type Queue } from './erlang.ts';
import { singleServer, type SingleServer } from './single-server.ts';

it('equals the queue of one mechanic when work times are exponential', () => {
  const one = singleServer(0.8, 1, 1) as SingleServer;
  const other = queue({ arrivals: 0.8, service: 1, servers: 1 }) as Queue;
  expect(one.meanWait).toBeCloseTo(other.meanWait, 12);
  expect(one.inSystem).toBeCloseTo(other.inSystem, 12);
});

it('halves the wait when every job takes the same time', () => {
  expect((singleServer(0.8, 1, 0) as SingleServer).meanWait).toBeCloseTo(2, 12);
  expect(singleServer(1, 1, 0)).toEqual({ value: null, reason: 'overloaded' });
});
