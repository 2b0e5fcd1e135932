import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { FactData, FactType, Person } from '#shared/domain/journal/fact.ts';
import { createCentre, type Centre } from '#server/capabilities/centre/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { conflict } from '#server/platform/http/refusal.ts';
import { createLedger } from '#server/platform/journal/create-ledger.ts';
import type { DeviceEntry, Ledger } from '#server/platform/journal/ledger.ts';
import { createLog } from '#server/platform/log.ts';
import { aCentre, countRows } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';

const clock = fixedClock('2026-05-14T18:00:00Z');
const HOUR = 3_600_000;
const mechanic: Person = { kind: 'user', id: 'm', name: 'Mo' };
let made = 0;

function entry<T extends FactType>(type: T, data: FactData[T], time: number, more: Partial<DeviceEntry> = {}): DeviceEntry {
  const id = `e${(made += 1)}`;
  const raw = { id, type, data };
  return { source: 'test', id, type, time, raw, hash: createHash('sha256').update(JSON.stringify(raw)).digest(), gateway: { id: 'g', name: 'G' }, data, reason: null, ...more };
}

describe('ledger', () => {
  let database: TestDatabase;
  let ledger: Ledger;
  let slice: Centre;
  let centre: CentreRef;
  const another = () => createLedger({ db: database.db, clock });
  const now = () => clock.now();

  beforeAll(async () => {
    database = await freshDatabase();
    ledger = another();
    slice = createCentre({ db: database.db, ledger, clock, log: createLog('silent') });
    centre = await aCentre(slice);
  });
  afterAll(async () => {
    await slice.stop();
    await database.close();
  });

  it('records events once and folds them', async () => {
    const stop = entry('pinsetter.stopped', { lane: 3, pins: [7, 10] }, now());
    expect(await ledger.submit(centre, [stop, entry('lane.counted', { lane: 3, deliveries: 2 }, now())], now())).toEqual([{ outcome: 'accepted' }, { outcome: 'accepted' }]);
    expect(await ledger.submit(centre, [stop, { ...stop, hash: Buffer.alloc(32) }], now())).toEqual([{ outcome: 'duplicate', changed: false }, { outcome: 'duplicate', changed: true }]);
    const { state, seq } = await ledger.read(centre);
    expect(seq).toBe(1);
    expect(state.floor[2]).toMatchObject({ deliveriesSince: 2, stop: { pins: [7, 10] } });
    expect(Object.keys(state.calls.open)).toEqual(['lane:3/pinsetter']);
    expect(await countRows(database.db, 'journal', centre)).toBe(2);
    expect(await countRows(database.db, 'call', centre)).toBe(1);
    expect(await countRows(database.db, 'outbox', centre)).toBe(1);
  });

  it('answers one of fifty who say "mine"', async () => {
    const { state } = await ledger.read(centre);
    const { id: call, lastAt: after } = state.calls.open['lane:3/pinsetter']!;
    const asked = Array.from({ length: 50 }, () => ledger.decide(centre, (house) => {
      if (house.state.calls.open['lane:3/pinsetter']?.acknowledged) throw conflict('call.already-acknowledged');
      return { facts: [{ type: 'call.acknowledged', data: { call }, by: mechanic, after }], result: ({ seq }) => seq };
    }));
    const answers = await Promise.allSettled(asked);
    expect(answers.filter((a) => a.status === 'fulfilled')).toHaveLength(1);
    expect(answers.filter((a) => a.status === 'rejected' && (a.reason as { status: number }).status === 409)).toHaveLength(49);
    expect((await ledger.facts(centre, now() - HOUR, now() + HOUR)).filter((f) => f.type === 'call.acknowledged')).toHaveLength(1);
  });

  it('takes a refusal, and a failed write, out of the unit that others share', async () => {
    const before = await countRows(database.db, 'journal', centre);
    const [a, b, c] = await Promise.allSettled([
      ledger.decide(centre, () => ({ facts: [{ type: 'lane.out-of-service', data: { lane: 5, reason: 'belt' }, by: mechanic }], result: () => 'a' })),
      ledger.decide(centre, () => ({
        facts: [{ type: 'lane.out-of-service', data: { lane: 6, reason: 'belt' }, by: mechanic }],
        write: async (trx) => {
          await trx('lane').where({ centre_id: centre.id, lane: 1 }).update({ family: 'string' });
          throw conflict('no');
        },
        result: () => 'b',
      })),
      ledger.submit(centre, [entry('lane.opened', { lane: 1, use: 'open' }, now())], now()),
    ]);
    expect([a.status, b.status, c.status]).toEqual(['fulfilled', 'rejected', 'fulfilled']);
    expect(await countRows(database.db, 'journal', centre)).toBe(before + 2);
    expect((await slice.lanes(centre))[0]).toMatchObject({ family: 'free-fall' });
    const { state } = await ledger.read(centre);
    expect([state.floor[4]?.outOfService?.reason, state.floor[5]?.outOfService]).toEqual(['belt', null]);
  });

  it('reads the same house in another process, from checkpoint and journal', async () => {
    const other = await another().read(centre);
    const own = await ledger.read(centre);
    expect(other).toEqual(own);
  });

  it('catches up with what another process records', async () => {
    const other = another();
    await other.read(centre);
    await ledger.submit(centre, [entry('lane.counted', { lane: 1, deliveries: 3 }, now())], now());
    await other.submit(centre, [entry('lane.counted', { lane: 1, deliveries: 4 }, now())], now());
    expect((await other.read(centre)).state.floor[0]?.deliveriesSince).toBe(7);
    await new Promise((done) => setTimeout(done, 120));
    expect(await ledger.read(centre)).toEqual(await other.read(centre));
  });

  it('refolds late facts of this day and of days that are out of memory, in the tables too', async () => {
    const house = await aCentre(slice);
    const day = (n: number, hour: number) => Date.UTC(2026, 4, 7 + n, hour);
    for (let n = 0; n < 6; n += 1) {
      await ledger.submit(house, [
        entry('lane.opened', { lane: 2, use: 'open' }, day(n, 12)), entry('lane.counted', { lane: 2, deliveries: 10, frames: 5 }, day(n, 13)),
        entry('pinsetter.stopped', { lane: 2 }, day(n, 14)), entry('pinsetter.restarted', { lane: 2 }, day(n, 15)), entry('lane.closed', { lane: 2 }, day(n, 16)),
      ], day(n, 17));
    }
    const counts = () => database.db('quarter_counter').where({ centre_id: house.id }).orderBy(['quarter_at', 'kind']).select('kind', 'deliveries', 'quarter_at');
    expect(await counts()).toHaveLength(6);
    const late = [entry('lane.counted', { lane: 2, deliveries: 1 }, day(1, 13)), entry('lane.opened', { lane: 2, use: 'party' }, day(2, 11)), entry('lane.closed', { lane: 2 }, day(3, 13) - 60_000)];
    for (const one of late) await ledger.submit(house, [one], day(5, 18));
    const rows = await counts() as { kind: string; deliveries: number }[];
    expect(rows.map((r) => `${r.kind} ${r.deliveries}`)).toEqual(['open 10', 'open 11', 'open 10', 'unassigned 10', 'open 10', 'open 10']);
    expect((await ledger.read(house)).state.floor[1]?.framesEver).toBe(30);
    expect(await another().read(house)).toEqual(await ledger.read(house));
    expect(await countRows(database.db, 'lane_use', house)).toBe(7);
  });

  it('tells within two seconds that it waits too long', async () => {
    const trx = await database.db.transaction();
    await trx('centre_head').where({ centre_id: centre.id }).forUpdate();
    const begun = performance.now();
    await expect(ledger.submit(centre, [entry('lane.closed', { lane: 1 }, now())], now())).rejects.toMatchObject({ status: 503, code: 'database.away' });
    expect(performance.now() - begun).toBeLessThan(2_000);
    await trx.rollback();
    await ledger.submit(centre, [entry('lane.closed', { lane: 1 }, now())], now());
  });
});
