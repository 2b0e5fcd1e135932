import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createDatabase } from '#server/platform/db/database.ts';
import { isDuplicate } from '#server/platform/db/errors.ts';
import { createTableOnce } from '#server/platform/db/schema.ts';
import { unitOfWork } from '#server/platform/db/unit-of-work.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await ownDatabase({ migrated: false });
  await createTableOnce(database.db, 'tally', (table) => {
    table.integer('id').primary();
    table.integer('total').notNullable();
    table.integer('twin').unique('tally_twin');
  });
});
afterAll(() => database.close());

let next = 0;
const newTally = async (): Promise<number> => {
  next += 1;
  await database.db('tally').insert({ id: next, total: 0 });
  return next;
};
const totalOf = async (id: number): Promise<number> => (await database.db('tally').where({ id }).first()).total;

/** Resolves for both only once both have come here: two transactions that have read before either writes. */
function meeting(): () => Promise<void> {
  let waiting = 2;
  let open = () => {};
  const both = new Promise<void>((resolve) => (open = resolve));
  return () => {
    waiting -= 1;
    if (waiting === 0) open();
    return both;
  };
}

async function addOne(trx: Knex.Transaction, id: number, locked: boolean): Promise<void> {
  const read = trx('tally').where({ id });
  const row = await (locked ? read.forUpdate().first() : read.first());
  await trx('tally').where({ id }).update({ total: row.total + 1 });
}

async function isolationKnown(): Promise<boolean> {
  const [rows] = (await database.db.raw("show variables like 'innodb_snapshot_isolation'")) as [unknown[]];
  return rows.length === 1;
}

describe.each([0, 1])('with innodb_snapshot_isolation=%i', (isolation) => {
  let db: Knex;
  beforeAll(async () => {
    const session: Record<string, number> = (await isolationKnown()) ? { innodb_snapshot_isolation: isolation } : {};
    db = createDatabase(database.url, { session });
  });
  afterAll(() => db.destroy());

  test('a locked read and a write lose no update under 20 at once', async () => {
    const id = await newTally();
    await Promise.all(Array.from({ length: 20 }, () => unitOfWork(db, (trx) => addOne(trx, id, true))));
    expect(await totalOf(id)).toBe(20);
  });

  test('a plain read and a write that meet: lost when off, refused and repeated when on', async () => {
    const id = await newTally();
    const meet = meeting();
    let tries = 0;
    const addPlainly = () =>
      unitOfWork(db, async (trx) => {
        tries += 1;
        const row = await trx('tally').where({ id }).first();
        if (tries <= 2) await meet();
        await trx('tally').where({ id }).update({ total: row.total + 1 });
      });
    await Promise.all([addPlainly(), addPlainly()]);
    const known = await isolationKnown();
    expect({ total: await totalOf(id), tries }).toEqual(isolation === 1 && known ? { total: 2, tries: 3 } : { total: 1, tries: 2 });
  });

  test('a deadlock rolls one back whole and repeats it', async () => {
    const [first, second] = [await newTally(), await newTally()];
    const meet = meeting();
    let tries = 0;
    const both = (one: number, other: number) =>
      unitOfWork(db, async (trx) => {
        tries += 1;
        const meets = tries <= 2;
        await addOne(trx, one, true);
        if (meets) await meet();
        await addOne(trx, other, true);
      });
    await Promise.all([both(first, second), both(second, first)]);
    expect(tries).toBe(3);
    expect([await totalOf(first), await totalOf(second)]).toEqual([2, 2]);
  });
});

test('what fails leaves nothing behind and is not repeated', async () => {
  const id = await newTally();
  let tries = 0;
  const work = unitOfWork(database.db, async (trx) => {
    tries += 1;
    await addOne(trx, id, true);
    throw new Error('lane 5 before lane 4');
  });
  await expect(work).rejects.toThrow('lane 5 before lane 4');
  expect({ tries, total: await totalOf(id) }).toEqual({ tries: 1, total: 0 });
});

test('a duplicate is the caller’s to answer, unless it names the key to look again on', async () => {
  const [first, second] = [await newTally(), await newTally()];
  await database.db('tally').where({ id: first }).update({ twin: 7 });
  let tries = 0;
  const take = (repeatOnDuplicate?: string[]) =>
    unitOfWork(
      database.db,
      async (trx) => {
        tries += 1;
        await trx('tally').where({ id: second }).update({ twin: tries > 1 ? 8 : 7 });
      },
      { repeatOnDuplicate },
    );
  const error: unknown = await take().catch((reason: unknown) => reason);
  expect([isDuplicate(error), isDuplicate(error, 'tally_twin'), isDuplicate(error, 'PRIMARY')]).toEqual([true, true, false]);
  expect(tries).toBe(1);
  tries = 0;
  await take(['tally_twin']);
  expect(tries).toBe(2);
});
