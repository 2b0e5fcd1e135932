import { describe, expect, it } from 'vitest';
import { answeredWithin, erlangC, queue, type Queue, type QueueInput } from '#shared/domain/numbers/erlang.ts';
import { finiteQueue } from '#shared/domain/numbers/finite-queue.ts';
import { singleServer, type SingleServer } from '#shared/domain/numbers/single-server.ts';
import { erlangRows, erlangServers } from './erlang-table.ts';
import { near } from './near.ts';

const state = (arrivals: number, service: number, servers: number): Queue => queue({ arrivals, service, servers }) as Queue;

describe('open queues', () => {
  it('eye clinic: 6 an hour, 20 min each, 3 doctors (Gross and Harris, Fundamentals of Queueing Theory; results from memory)', () => {
    const clinic = state(6, 3, 3);
    near(clinic.empty, 1 / 9);
    near(clinic.waits, 4 / 9);
    near(clinic.waiting, 8 / 9);
    near(clinic.inSystem, 26 / 9);
    near(clinic.meanWait * 60, 80 / 9);
    near(clinic.meanTime * 60, 260 / 9);
  });

  it('county hospital, one doctor and two (Hillier and Lieberman, Introduction to Operations Research; from memory)', () => {
    const one = state(2, 3, 1);
    [one.empty, one.waiting, one.inSystem, one.meanWait, one.meanTime].forEach((value, i) => near(value, [1 / 3, 4 / 3, 2, 2 / 3, 1][i] as number));
    const two = state(2, 3, 2);
    [two.empty, two.waiting, two.inSystem, two.meanWait, two.meanTime, two.waits].forEach((value, i) => near(value, [1 / 2, 1 / 12, 3 / 4, 1 / 24, 3 / 8, 1 / 6][i] as number));
  });

  it('six erlangs to ten servers: about one in ten waits (course example)', () => {
    const ten = state(2, 1 / 3, 10);
    expect(ten.waits).toBeCloseTo(0.101299, 6);
    expect(ten.waiting).toBeCloseTo(0.151949, 6);
    expect(ten.meanWait).toBeCloseTo(0.075974, 5.9);
  });

  it('one server, exponential and uniform work times (textbook examples)', () => {
    const plain = state(0.8, 1, 1);
    [plain.meanWait, plain.meanTime, plain.waiting, plain.inSystem, plain.utilisation].forEach((value, i) => near(value, [4, 5, 3.2, 4, 0.8][i] as number));
    const uniform = singleServer(0.8, 1, 1.8 ** 2 / 12) as SingleServer;
    [uniform.meanWait, uniform.meanTime, uniform.waiting, uniform.inSystem].forEach((value, i) => near(value, [2.54, 3.54, 2.032, 2.832][i] as number));
  });

  it('three servers at 2.4 erlangs, fourteen at ten (recomputed)', () => {
    const three = state(0.8, 1 / 3, 3);
    expect(three.waits).toBeCloseTo(0.647191, 6);
    expect(three.waiting).toBeCloseTo(2.588764, 6);
    expect(three.meanWait).toBeCloseTo(3.235955, 6);
    const fourteen: QueueInput = { arrivals: 10 / 180, service: 1 / 180, servers: 14 };
    expect((queue(fourteen) as Queue).waits).toBeCloseTo(0.174132, 6);
    expect((queue(fourteen) as Queue).meanWait).toBeCloseTo(7.8359, 4);
    expect(answeredWithin(fourteen, 20).value).toBeCloseTo(0.88835, 6);
  });

  it.each(erlangRows)('probability to wait at %d erlangs', (load, ...row) => {
    row.forEach((expected, i) => {
      const { value } = erlangC(load, erlangServers[i] as number);
      if (expected === null) expect(value).toBeNull();
      else expect(value).toBeCloseTo(expected, 5.9);
    });
  });
});

it('six machines, one mechanic (recomputed)', () => {
  const shop = finiteQueue({ machines: 6, servers: 1, calls: 1, service: 10 });
  near(shop.down[0], 0.4845149036, 1e-9);
  near(shop.meanDown, 0.8451490368, 1e-9);
  near(shop.waiting, 0.3296639405, 1e-9);
  near(shop.availability, 0.8591418272, 1e-9);
});
