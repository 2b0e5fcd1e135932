import { afterAll, beforeAll, expect, test } from 'vitest';
import { binaryId, createTableOnce, exact, flag, instant } from '#server/platform/db/schema.ts';
import { fromBinary, newId, toBinary } from '#server/platform/db/uuid.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';

/** What the driver turns each kind of column into; every store relies on it. */

type Kinds = {
  id: Buffer;
  name: string;
  source: string;
  at: Date;
  day: string;
  total: number | string;
  ratio: number;
  open: boolean | null;
  small: number;
  body: unknown;
};

let database: TestDatabase;
beforeAll(async () => {
  database = await ownDatabase({ migrated: false });
  await createTableOnce(database.db, 'kind', (table) => {
    binaryId(table, 'id').notNullable();
    table.primary(['id']);
    table.string('name', 60);
    exact(table, 'source', 120).unique();
    instant(table, 'at');
    table.date('day');
    table.bigInteger('total');
    table.decimal('ratio', 12, 4);
    flag(table, 'open');
    table.specificType('small', 'tinyint(4)');
    table.json('body');
  });
});
afterAll(() => database.close());

const rowOf = async (values: Partial<Record<keyof Kinds, unknown>>): Promise<Kinds> => {
  const id = toBinary(newId());
  await database.db('kind').insert({ id, ...values });
  return (await database.db<Kinds>('kind').where({ id }).first())!;
};

test('binary(16) is a Buffer, and an id survives the way there and back', async () => {
  const id = newId(Date.UTC(2031, 0, 7, 19, 41));
  await database.db('kind').insert({ id: toBinary(id) });
  const row = await database.db<Kinds>('kind').where({ id: toBinary(id) }).first();
  expect(Buffer.isBuffer(row!.id)).toBe(true);
  expect(fromBinary(row!.id)).toBe(id);
});

test('ids made later sort later as bytes', () => {
  const ids = Array.from({ length: 200 }, () => toBinary(newId()));
  expect([...ids].sort(Buffer.compare)).toEqual(ids);
  expect(Buffer.compare(toBinary(newId(1_000)), toBinary(newId(2_000)))).toBe(-1);
});

test('DATETIME(3) is a Date to the millisecond, in UTC whatever the zone of the process', async () => {
  const at = Date.UTC(2031, 2, 30, 1, 30, 0, 7);
  const row = await rowOf({ at: toRowTime(at) });
  expect(row.at).toBeInstanceOf(Date);
  expect(fromRowTime(row.at)).toBe(at);
  const [[text]] = (await database.db.raw("select date_format(at, '%Y-%m-%d %H:%i:%s.%f') as stored from kind where at = ?", [toRowTime(at)])) as [[{ stored: string }]];
  expect(text.stored).toBe('2031-03-30 01:30:00.007000');
});

test('DATE stays the text it is', async () => {
  expect((await rowOf({ day: '2031-10-26' })).day).toBe('2031-10-26');
});

test('BIGINT is a number while it is exact, a string beyond', async () => {
  expect((await rowOf({ total: Number.MAX_SAFE_INTEGER })).total).toBe(Number.MAX_SAFE_INTEGER);
  expect((await rowOf({ total: '9007199254740993' })).total).toBe('9007199254740993');
});

test('DECIMAL is a number, in sums as well', async () => {
  expect((await rowOf({ ratio: '12.3450' })).ratio).toBe(12.345);
  const sum = await database.db('kind').sum({ small: 'small' }).whereNotNull('ratio').first();
  expect(sum).toEqual({ small: null });
  const counted = await database.db('kind').sum({ ratio: 'ratio' }).first();
  expect(counted).toEqual({ ratio: 12.345 });
});

test('TINYINT(1) is a boolean, a wider TINYINT a number, NULL is null', async () => {
  expect((await rowOf({ open: true, small: 1 }))).toMatchObject({ open: true, small: 1 });
  expect((await rowOf({ open: false, small: 0 }))).toMatchObject({ open: false, small: 0 });
  expect((await rowOf({ open: null })).open).toBeNull();
});

test('JSON comes back as its value', async () => {
  const body = { lane: 12, faults: ['E-7'], text: 'naïve – Ünï', nothing: null };
  expect((await rowOf({ body: JSON.stringify(body) })).body).toEqual(body);
});

test('exact text tells case, accent and trailing space apart; ordinary text tells neither', async () => {
  for (const source of ['evt-a', 'EVT-A', 'évt-a', 'evt-a ']) await rowOf({ source, name: source });
  expect(await database.db('kind').where({ source: 'evt-a' })).toHaveLength(1);
  expect(await database.db('kind').where({ name: 'evt-a' })).toHaveLength(4);
});

test('text too long for its column and a date that is none are refused, not cut', async () => {
  await expect(rowOf({ name: 'x'.repeat(61) })).rejects.toMatchObject({ errno: 1406 });
  await expect(rowOf({ day: '2031-02-30' })).rejects.toMatchObject({ errno: 1292 });
});
