import type { Knex } from 'knex';
import { systemClock } from '#server/platform/clock.ts';
import { newId } from '#server/platform/db/uuid.ts';
import { aCentre } from '#tests/support/builders.ts';
import { aDevice } from '#tests/support/device.ts';
import { startServer } from '#tests/support/server.ts';
import { type Figure, figure } from './figure.ts';

const CLIENTS = 8;
const SINGLES = 2_000;
const BATCHES = 40;
const BATCH = 500;
const NO_LIMIT = { perSecond: 1e6, burst: 1e6 };

/** `n` pieces of work, `CLIENTS` at a time; pieces a second. */
async function rate(n: number, work: (i: number) => Promise<unknown>): Promise<number> {
  const began = performance.now();
  let next = 0;
  await Promise.all(Array.from({ length: CLIENTS }, async () => {
    while (next < n) await work((next += 1));
  }));
  return (n * 1000) / (performance.now() - began);
}

const counted = (i: number, at: number) => ({ type: 'lane.counted', time: at + i, id: newId(), data: { lane: (i % 32) + 1, deliveries: 1, frames: 1 } });

/** Events a second by HTTP, singly and in batches, against bare multi-row inserts of rows like the journal's into the same database. */
export async function benchIngest(db: Knex): Promise<Figure[]> {
  const server = await startServer({ db, clock: systemClock, ingestRate: NO_LIMIT });
  try {
    const centre = await aCentre(server.slices.centre, { lanes: 32 });
    const device = await aDevice(server, centre);
    await device.sendOne(counted(0, Date.now()));
    const now = Date.now() - 60_000;
    const must = async (answer: ReturnType<typeof device.send>) => {
      const { status, body } = await answer;
      if (status !== 200) throw new Error(`${status} ${JSON.stringify(body)}`);
    };
    const singles = await rate(SINGLES, (i) => must(device.sendOne(counted(i, now))));
    const batches = (await rate(BATCHES, (b) => must(device.send(Array.from({ length: BATCH }, (_, i) => counted(b * BATCH + i, now)))))) * BATCH;
    await db.raw('create table if not exists bench_rows (id binary(16) primary key, at datetime(3), body json) engine=InnoDB');
    const insert = (count: number) => () => {
      const rows = Array.from({ length: count }, () => [Buffer.from(newId().replaceAll('-', ''), 'hex'), new Date(), JSON.stringify({ lane: 1, deliveries: 1, frames: 1 })]);
      return db.raw(`insert into bench_rows values ${rows.map(() => '(?,?,?)').join(',')}`, rows.flat());
    };
    const bareSingles = await rate(SINGLES, insert(1));
    const bareBatches = (await rate(BATCHES, insert(BATCH))) * BATCH;
    await db.raw('drop table bench_rows');
    return [
      figure('ingest by HTTP, one event a post ÷ bare single-row inserts', 'events/s', singles, bareSingles),
      figure(`ingest by HTTP, ${BATCH} a post ÷ bare multi-row inserts`, 'events/s', batches, bareBatches),
    ];
  } finally {
    await server.close();
  }
}
