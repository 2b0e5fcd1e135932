import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { PatternDetail, RevisionBody } from '#shared/contracts/runs.ts';
import { countRows } from '#tests/support/builders.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { good, type LeagueHouse, leagueHouse, refused } from '#tests/support/league-house.ts';

const clock = fixedClock('2026-05-14T12:00:00Z');
let database: TestDatabase;
let world: LeagueHouse;
beforeAll(async () => {
  database = await freshDatabase();
  world = await leagueHouse(database, clock);
});
beforeEach(() => void clock.set('2026-05-14T12:00:00Z'));
afterAll(async () => {
  await world.close();
  await database.close();
});

type Pass = RevisionBody['passes'][number];
const L = (n: number): Pass['fromBoard'] => ({ side: 'L', n });
const R = (n: number): Pass['fromBoard'] => ({ side: 'R', n });
/** 2 loads × 37 boards (2L–2R) × 50 µL = 3 700 µL. */
const aPass = (change: Partial<Pass> = {}): Pass => ({ direction: 'outbound', fromBoard: L(2), toBoard: R(2), loads: 2, ul: 50, product: 'A', fromFt: 0, toFt: 30, ...change });
const aBody = (change: Partial<RevisionBody> = {}): RevisionBody => ({ lengthFt: 40, passes: [aPass()], ...change });
const aPattern = (revision: RevisionBody, change: object = {}) => ({ code: 'ferry', name: 'Ferry', revision, ...change });
const sum = (list: readonly number[]): number => list.reduce((all, one) => all + one, 0);

async function house() {
  const given = await world.house();
  const add = (revision: RevisionBody, change: object = {}) => given.go(given.mechanic, 'POST', '/patterns', aPattern(revision, change));
  const revise = (revision: RevisionBody, note?: string) => given.go(given.mechanic, 'POST', '/patterns/ferry/revisions', { revision, note });
  const detail = async (code = 'ferry') => good(await given.go(given.desk, 'GET', `/patterns/${code}`)).body as PatternDetail;
  const rows = async () => [await countRows(database.db, 'pattern', given.centre), await countRows(database.db, 'pattern_revision', given.centre)];
  return { ...given, add, revise, detail, rows };
}

describe('the volume of a pattern', () => {
  // As operators work it out by hand (common practice): aL–bR covers 39 − (a − 1) − (b − 1) boards, times loads, times µL.
  it.each([
    ['2L–2R twice at 50 µL: 2 × 37 × 50', 2, 2, 2, 50, 3_700], ['2L–2R three times at 50 µL: 3 × 37 × 50', 2, 2, 3, 50, 5_550], ['2L–2R three times at 40 µL: 3 × 37 × 40', 2, 2, 3, 40, 4_440],
    ['8L–8R twice at 50 µL: 2 × 25 × 50', 8, 8, 2, 50, 2_500], ['2L–10R once at 30 µL: 29 × 30', 2, 10, 1, 30, 870],
  ])('is loads × boards × µL: %s', async (_, left, right, loads, ul, expected) => {
    const { add } = await house();
    const made = await add(aBody({ passes: [aPass({ fromBoard: L(left), toBoard: R(right), loads, ul })] }));
    expect(made.status).toBe(201);
    const detail = made.body as PatternDetail;
    expect(detail).toMatchObject({ code: 'ferry', name: 'Ferry', revision: 1, lengthFt: 40, volume: { aUl: expected, bUl: 0, totalUl: expected } });
    expect(detail.revisions[0]?.passUl).toEqual([expected]);
    // Each board covered holds loads × µL, the others stay dry; nothing is lost between the boards or the feet.
    const wet = 39 - (left - 1) - (right - 1);
    expect(detail.boardsNl).toEqual([...Array.from({ length: left - 1 }, () => 0), ...Array.from({ length: wet }, () => loads * ul * 1_000), ...Array.from({ length: right - 1 }, () => 0)]);
    expect(sum(detail.revisions[0]?.feetNl ?? [])).toBe(expected * 1_000);
  });

  it('adds up over passes, directions and both products, one-sided ranges too', async () => {
    const { add } = await house();
    const { body } = good(await add(aBody({ passes: [
      aPass(),
      aPass({ loads: 3, fromBoard: L(10), toBoard: R(10), toFt: 22, ul: 40 }), // 21 boards: 3 × 21 × 40 = 2 520
      aPass({ loads: 1, fromBoard: L(3), toBoard: L(7), product: 'B', ul: 20 }), // 5 boards: 1 × 5 × 20 = 100
      aPass({ loads: 0, ul: 0, fromFt: 30, toFt: 40 }), // buffs only
      aPass({ direction: 'return', loads: 2, fromBoard: L(12), toBoard: R(12), fromFt: 20, toFt: 8, ul: 50 }), // 17 boards: 2 × 17 × 50 = 1 700
    ] })));
    const detail = body as PatternDetail;
    expect(detail.revisions[0]?.passUl).toEqual([3_700, 2_520, 100, 0, 1_700]);
    expect(detail.volume).toEqual({ aUl: 7_920, bUl: 100, totalUl: 8_020 });
    expect(sum(detail.boardsNl)).toBe(8_020_000);
  });

  it('says who can lay it, and every reason where somebody can’t', async () => {
    const { add } = await house();
    const { revisions } = good(await add(aBody({ passes: [aPass({ ul: 42, product: 'B', fromBoard: L(1) }), aPass()] }))).body as PatternDetail;
    expect(revisions[0]?.machines).toMatchObject([{ machine: 'm1', canLay: false, reasons: [
      { code: 'machine.volume-step', pass: 1, params: { ul: 42, step: 5 } }, { code: 'machine.product-not-carried', pass: 1, params: { product: 'B' } }, { code: 'machine.board-out-of-reach', pass: 1, params: { first: 2, last: 38 } },
    ] }]);
  });
});

describe('revisions', () => {
  it('saving makes a new one; the ones before stay as they were, to the byte', async () => {
    const { add, revise, detail, mechanic } = await house();
    await add(aBody(), { note: 'From the old binder' });
    const before = (await detail()).revisions[0];
    clock.advance(3_600_000);
    expect((await revise(aBody({ passes: [aPass({ loads: 3 })] }), 'One load more')).status).toBe(201);
    const after = await detail();
    expect(after).toMatchObject({ revision: 2, volume: { totalUl: 5_550 } });
    expect(after.revisions.map((one) => [one.revision, one.at, one.by, one.note, one.volume.totalUl])).toEqual([
      [2, Date.parse('2026-05-14T13:00:00Z'), mechanic.name, 'One load more', 5_550], [1, Date.parse('2026-05-14T12:00:00Z'), mechanic.name, 'From the old binder', 3_700],
    ]);
    expect(after.revisions[1]).toEqual(before);
  });

  it('no request changes or removes a revision', async () => {
    const { add, go, manager, rows } = await house();
    await add(aBody());
    const before = await rows();
    for (const method of ['PUT', 'PATCH', 'DELETE']) for (const path of ['/patterns/ferry', '/patterns/ferry/revisions', '/patterns/ferry/revisions/1']) {
      expect([404, 405]).toContain((await go(manager, method, path, method === 'DELETE' ? undefined : { revision: aBody({ lengthFt: 42 }) })).status);
    }
    expect(await rows()).toEqual(before);
  });

  it('a run keeps the revision that it laid when there is a newer one', async () => {
    const { add, revise, go, mechanic, desk } = await house();
    await add(aBody());
    good(await go(mechanic, 'POST', '/runs', { machine: 'm1', pattern: 'ferry', startedAt: clock.now() - 600_000, finishedAt: clock.now(), lanes: [{ lane: 1, outcome: 'dressed' }] }));
    await revise(aBody({ lengthFt: 42 }));
    expect(good(await go(desk, 'GET', '/runs')).body).toMatchObject({ runs: [{ pattern: 'ferry', revision: 1, outcomes: [{ lane: 1, aUl: 3_700, measured: false }] }] });
  });

  it('the same again is no new revision, whatever the order of its fields', async () => {
    const { add, revise, rows } = await house();
    await add(aBody());
    const before = await rows();
    const turned = JSON.parse(JSON.stringify(aBody()), (_, value: unknown) => (typeof value === 'object' && value !== null && !Array.isArray(value) ? Object.fromEntries(Object.entries(value).reverse()) : value)) as RevisionBody;
    expect(refused(await revise(turned))).toMatchObject({ status: 409, code: 'pattern.unchanged', params: { revision: 1 } });
    expect(await rows()).toEqual(before);
  });

  it('of eight who save at once, each gets a number of its own', async () => {
    const { add, revise, detail } = await house();
    await add(aBody());
    const answers = await Promise.all(Array.from({ length: 8 }, (_, i) => revise(aBody({ passes: [aPass({ loads: 3 + i })] }))));
    expect(answers.map((answer) => answer.status)).toEqual(Array.from({ length: 8 }, () => 201));
    expect((await detail()).revisions.map((one) => one.revision)).toEqual([9, 8, 7, 6, 5, 4, 3, 2, 1]);
  });
});

describe('what contradicts itself is refused with a code beside its field, and nothing is written', () => {
  const pass = (change: Partial<Pass>): Partial<RevisionBody> => ({ passes: [aPass(), aPass(change)] });
  const REFUSED: [string, Partial<RevisionBody>, string, string][] = [
    ['70 ft', { lengthFt: 70 }, 'pattern.length-out-of-range', '/revision/lengthFt'],
    ['5 ft', { lengthFt: 5, passes: [aPass({ toFt: 5 })] }, 'pattern.length-out-of-range', '/revision/lengthFt'],
    ['a length in hundredths', { lengthFt: 40.25 }, 'pattern.length-out-of-range', '/revision/lengthFt'],
    ['board 40', pass({ toBoard: R(40) }), 'pass.board-out-of-range', '/revision/passes/1/toBoard'],
    ['board 0', pass({ fromBoard: L(0) }), 'pass.board-out-of-range', '/revision/passes/1/fromBoard'],
    ['a range that crosses itself', pass({ fromBoard: L(30), toBoard: R(30) }), 'pass.boards-crossed', '/revision/passes/1/toBoard'],
    ['feet beyond its length', pass({ toFt: 41 }), 'pass.feet-beyond-length', '/revision/passes/1/toFt'],
    ['feet beyond the head pin', pass({ toFt: 61 }), 'pass.feet-out-of-range', '/revision/passes/1/toFt'],
    ['feet before the foul line', pass({ fromFt: -1 }), 'pass.feet-out-of-range', '/revision/passes/1/fromFt'],
    ['feet against the travel', pass({ fromFt: 20, toFt: 10 }), 'pass.feet-against-direction', '/revision/passes/1/toFt'],
    ['no feet at all', pass({ fromFt: 20, toFt: 20 }), 'pass.feet-empty', '/revision/passes/1/toFt'],
    ['31 loads', pass({ loads: 31 }), 'pass.loads-out-of-range', '/revision/passes/1/loads'],
    ['a load of nothing', pass({ ul: 0 }), 'pass.load-volume-out-of-range', '/revision/passes/1/ul'],
    ['301 µL a board', pass({ ul: 301 }), 'pass.load-volume-out-of-range', '/revision/passes/1/ul'],
    ['61 in/s', pass({ speed: 610 }), 'pass.speed-out-of-range', '/revision/passes/1/speed'],
    ['1 001 turns a minute', pass({ rpm: 1001 }), 'pass.rpm-out-of-range', '/revision/passes/1/rpm'],
    ['outbound after return', { passes: [aPass({ direction: 'return', fromFt: 20, toFt: 5 }), aPass()] }, 'pass.outbound-after-return', '/revision/passes/1/direction'],
    ['cleaner backwards', { cleanerZones: [{ fromFt: 20, toFt: 10, ulPerFt: 300, waterParts: 4 }] }, 'zone.feet-reversed', '/revision/cleanerZones/0/toFt'],
    ['cleaner twice', { cleanerZones: [{ fromFt: 0, toFt: 30, ulPerFt: 300, waterParts: 4 }, { fromFt: 29, toFt: 60, ulPerFt: 300, waterParts: 4 }] }, 'zone.overlap', '/revision/cleanerZones/1/fromFt'],
    ['cleaner beyond the pin deck', { cleanerZones: [{ fromFt: 0, toFt: 64, ulPerFt: 300, waterParts: 4 }] }, 'zone.feet-out-of-range', '/revision/cleanerZones/0/toFt'],
    ['51 parts of water', { cleanerZones: [{ fromFt: 0, toFt: 60, ulPerFt: 300, waterParts: 51 }] }, 'zone.ratio-out-of-range', '/revision/cleanerZones/0/waterParts'],
    ['no cleaner in a zone', { cleanerZones: [{ fromFt: 0, toFt: 60, ulPerFt: 0, waterParts: 4 }] }, 'zone.volume-out-of-range', '/revision/cleanerZones/0/ulPerFt'],
  ];
  it.each(REFUSED)('%s', async (_, change, code, pointer) => {
    const { add, revise, rows } = await house();
    const before = await rows();
    const answer = await add(aBody(change));
    expect(refused(answer)).toMatchObject({ status: 422, code: 'pattern.invalid', at: pointer });
    expect((answer.body as { errors: { code: string }[] }).errors[0]?.code).toBe(code);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    expect(await rows()).toEqual(before);
    good(await add(aBody()));
    expect(refused(await revise(aBody(change)))).toMatchObject({ status: 422, code: 'pattern.invalid', at: pointer });
    expect(await rows()).toEqual(before.map((count) => count + 1));
  });

  it('several at once are all told, each beside its own field', async () => {
    const { add } = await house();
    const answer = await add(aBody({ lengthFt: 70, passes: [aPass({ toBoard: R(40) }), aPass({ fromBoard: L(30), toBoard: R(30), loads: 40 })] }));
    expect((answer.body as { errors: { pointer: string; code: string; params: object }[] }).errors).toMatchObject([
      { pointer: '/revision/lengthFt', code: 'pattern.length-out-of-range', params: { min: 10, max: 60 } },
      { pointer: '/revision/passes/0/toBoard', code: 'pass.board-out-of-range', params: { pass: 1, min: 1, max: 39 } },
      { pointer: '/revision/passes/1/toBoard', code: 'pass.boards-crossed', params: { pass: 2 } },
      { pointer: '/revision/passes/1/loads', code: 'pass.loads-out-of-range', params: { pass: 2 } },
    ]);
  });

  it('the head pin’s 60 ft, boards 1–39 and one board alone are the edge, and fine', async () => {
    const { add } = await house();
    const { volume } = good(await add(aBody({ lengthFt: 60, passes: [aPass({ fromBoard: L(1), toBoard: R(1), toFt: 60 }), aPass({ fromBoard: L(20), toBoard: R(20), toFt: 60 })] }))).body as PatternDetail;
    // 2 × 39 × 50 + 2 × 1 × 50: board 20 is the middle one from either side.
    expect(volume.totalUl).toBe(4_000);
  });

  it('a code that is taken, beside the code; a pattern that nobody knows', async () => {
    const { add, go, mechanic, rows } = await house();
    const before = await rows();
    expect(refused(await add(aBody(), { code: 'owls' }))).toMatchObject({ status: 409, code: 'pattern.code-taken', at: '/code', params: { pattern: 'owls' } });
    expect(refused(await go(mechanic, 'POST', '/patterns/nowhere/revisions', { revision: aBody() }))).toMatchObject({ status: 404, code: 'pattern.unknown' });
    expect(await rows()).toEqual(before);
  });

  it.each([
    ['a pattern without passes', { passes: [] }, '/revision/passes'], ['a third of a load', { passes: [{ ...aPass(), loads: 0.3 }] }, '/revision/passes/0/loads'], ['a side that isn’t', { passes: [{ ...aPass(), toBoard: { side: 'M', n: 2 } }] }, '/revision/passes/0/toBoard/side'],
  ])('%s: the form itself says no', async (_, change, pointer) => {
    const { go, mechanic, rows } = await house();
    const before = await rows();
    const answer = await go(mechanic, 'POST', '/patterns', aPattern({ ...aBody(), ...change } as RevisionBody));
    expect(refused(answer)).toMatchObject({ status: 422, at: pointer });
    expect(await rows()).toEqual(before);
  });
});

describe('whose patterns', () => {
  it('another centre’s aren’t there; desk reads and doesn’t write; the secretary does neither', async () => {
    const { add, go, desk, manager, secretary, centre } = await house();
    good(await add(aBody()));
    const other = await world.house();
    expect((await other.go(other.mechanic, 'GET', '/patterns/ferry')).status).toBe(404);
    expect((await go(other.mechanic, 'GET', '/patterns/ferry')).status).toBe(404);
    expect((await go(other.mechanic, 'POST', '/patterns', aPattern(aBody(), { code: 'mine' }))).status).toBe(404);
    expect((good(await go(desk, 'GET', '/patterns')).body as { patterns: { code: string }[] }).patterns.map((one) => one.code).sort()).toEqual(['ferry', 'house', 'owls']);
    const before = await countRows(database.db, 'pattern', centre);
    expect((await go(desk, 'POST', '/patterns', aPattern(aBody(), { code: 'mine' }))).status).toBe(403);
    const mara = await secretary([]);
    for (const path of ['/patterns', '/patterns/ferry']) expect((await go(mara, 'GET', path)).status).toBe(403);
    expect(await countRows(database.db, 'pattern', centre)).toBe(before);
    expect((await go(manager, 'POST', '/patterns', aPattern(aBody(), { code: 'mine' }))).status).toBe(201);
  });

  it('names the leagues that want one', async () => {
    const { league, detail } = await house();
    await league();
    expect((await detail('owls')).usedBy).toEqual(['Night Owls']);
    expect((await detail('house')).usedBy).toEqual([]);
  });
});
