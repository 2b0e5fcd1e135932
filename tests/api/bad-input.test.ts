import * as fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { none, type Contract } from '#shared/contracts/contract.ts';
import { allContracts } from '#shared/contracts/index.ts';
import { decide, POLICY } from '#shared/policy/policy.ts';
import { knowsRefusal } from '#shared/text/en/refusals.ts';
import { schemaOf } from '#server/platform/http/openapi.ts';
import { addressOf } from '../../src/lib/api.ts';
import { ask, type Answer } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { complaints } from '#tests/support/complaints.ts';
import { ownDatabase, type TestDatabase } from '#tests/support/db.ts';
import { fitting, JUNK, NASTY_TEXT, spoilt } from '#tests/support/json-arbitraries.ts';
import { SAMPLE_TIME, sampleHouse, type SampleHouse, type Who } from '#tests/support/sample-house.ts';
import { SAMPLES, type Asked } from '#tests/support/samples.ts';
import { startServer, type TestServer } from '#tests/support/server.ts';

/** Requests of a route with a body, and of one without; together more than five thousand. */
const WITH_BODY = 120;
const WITHOUT = 40;
/** Statuses that speak of the request alone. */
const INPUT = new Set([400, 413, 415, 422]);
/** Sent at once; after each batch that was refused the tables must be as before. */
const BATCH = 40;
/** The same requests at every run; another seed finds others. */
const SEED = 20_260_514;
/**
 * `outbox`: the relay deletes from it in the background; a row in it comes only with a new seq in `centre_head`, which is compared.
 * `gateway`: when one was last heard is noted in the background.
 */
const NOT_COMPARED = new Set(['outbox', 'gateway']);

let database: TestDatabase;
let server: TestServer;
let house: SampleHouse;
let tables: string[];
const complained = complaints();
const tally = new Map<string, Tally>();

beforeAll(async () => {
  database = await ownDatabase();
  const clock = fixedClock(SAMPLE_TIME);
  server = await startServer({ db: database.db, clock, log: complained.log, ingestRate: { perSecond: 1_000_000, burst: 1_000_000 } });
  house = await sampleHouse(server, clock);
  const rows = await database.db('information_schema.tables').where('table_schema', database.db.raw('database()')).select<{ name: string }[]>({ name: 'table_name' });
  tables = rows.map(({ name }) => name).filter((name) => !NOT_COMPARED.has(name));
});
afterAll(async () => {
  await server.close();
  await database.close();
});

/** MariaDB's own checksum over every row of every table. */
async function checksum(): Promise<string> {
  const [rows] = (await database.db.raw(`checksum table ${tables.map(() => '??').join(', ')}`, tables)) as [{ Table: string; Checksum: number }[]];
  return JSON.stringify(rows.map(({ Table, Checksum }) => [Table.split('.')[1], Checksum]));
}

/** The first who may do it. What is one's own account is tried on somebody whom no sample needs. */
function allowed(contract: Contract): Who {
  if (['public', 'account.own', 'identity.see'].includes(contract.permission)) return house.who('mechanic elsewhere');
  const found = house.everybody.find(({ actor }) => decide(contract.permission, actor, { centre: house.centre.slug, league: house.league.id }) === 'ok');
  if (!found) throw new Error(`nobody may ${contract.id}`);
  return found;
}

/** One request as it travels; `raw` is a body that isn't JSON of ours. */
interface Sent {
  params: Record<string, string | number>;
  query: Record<string, string>;
  body?: unknown;
  raw?: string;
}

const textual = fc.constantFrom(...NASTY_TEXT);

/** Everything that a route may be sent, around one sample: its body spoilt, made anew from the schema, both, or junk; path and query likewise. */
function requestsOf(contract: Contract, asked: Asked): fc.Arbitrary<Sent> {
  const params = asked.params ?? {};
  const query = asked.query ?? {};
  const queries = Object.keys((schemaOf(contract.query, 'input')['properties'] ?? {}));
  const base: Sent = { params, query, body: asked.body };
  const names = Object.keys(params);
  const spoilParams = names.length === 0 ? [] : [fc.tuple(fc.constantFrom(...names), fc.oneof(textual, fc.string({ maxLength: 30 }), fc.uuid())).map(([name, text]): Sent => ({ ...base, params: { ...params, [name]: text === '' ? ' ' : text } }))];
  const spoilQuery = queries.length === 0 ? [] : [fc.tuple(fc.constantFrom(...queries), fc.oneof(textual, fc.string())).map(([name, text]): Sent => ({ ...base, query: { ...query, [name]: text } }))];
  const bodies = contract.body === (none as unknown) ? [fc.constantFrom<unknown>([], 1, 'x', { a: 1 }, [[]]).map((body): Sent => ({ ...base, body }))] : bodiesOf(contract, base);
  return fc.oneof(...spoilParams, ...spoilQuery, ...(contract.method === 'GET' ? [fc.constant(base)] : bodies));
}

function bodiesOf(contract: Contract, base: Sent): fc.Arbitrary<Sent>[] {
  const fresh = fitting(schemaOf(contract.body, 'input'));
  const send = (body: unknown): Sent => ({ ...base, body });
  return [
    spoilt(base.body).map(send), spoilt(base.body).map(send), spoilt(base.body).chain(spoilt).map(send), fresh.map(send), fresh.chain(spoilt).map(send), fc.jsonValue({ maxDepth: 3 }).map(send),
    fc.constantFrom(...JUNK).map((raw): Sent => ({ ...base, raw })),
  ];
}

async function send(contract: Contract, headers: Record<string, string>, sent: Sent): Promise<Answer> {
  const wellFormed = Object.fromEntries(Object.entries(sent.params).map(([name, value]) => [name, String(value).replace(/\p{Surrogate}/gu, '?')]));
  const path = addressOf(contract.path, { centre: house.centre.slug, ...wellFormed }, sent.query);
  const type = POLICY[contract.permission].to === 'gateway' ? { 'content-type': 'application/cloudevents+json' } : {};
  const body = contract.method === 'GET' ? undefined : (sent.raw ?? (sent.body === undefined ? undefined : JSON.stringify(sent.body)));
  return ask(server.url, contract.method, path, { headers: { ...headers, ...(body === undefined ? {} : { 'content-type': 'application/json' }), ...type }, body });
}

function judge(contract: Contract, sent: Sent, answer: Answer): void {
  const said = `${contract.id} ${JSON.stringify(sent).slice(0, 600)} → ${answer.status} ${JSON.stringify(answer.body)?.slice(0, 400)}`;
  expect(answer.status, `${said}\n${complained.said.at(-1) ?? ''}`).toBeLessThan(500);
  if (answer.status < 400) return;
  const problem = answer.body as { code: string; status: number; title: string; errors: { code: string; detail: string }[] };
  expect(answer.headers.get('content-type'), said).toMatch(/^application\/problem\+json/);
  expect(problem.status, said).toBe(answer.status);
  expect(knowsRefusal(problem.code), said).toBe(true);
  for (const field of problem.errors) expect(field.detail, said).not.toBe(field.code);
}

/** Sends a batch at once and says which of it was refused as input: that is so whatever the state of things. */
async function batch(contract: Contract, headers: Record<string, string>, list: readonly Sent[]): Promise<{ accepted: number; refused: Sent[] }> {
  const answers = await Promise.all(list.map((sent) => send(contract, headers, sent)));
  answers.forEach((answer, i) => judge(contract, list[i] as Sent, answer));
  return { accepted: answers.filter(({ status }) => status < 400).length, refused: list.filter((_, i) => INPUT.has(answers[i]?.status ?? 0)) };
}

interface Tally {
  sent: number;
  accepted: number;
  /** Requests that were refused while no table changed. */
  harmless: number;
}

/** One sample, requests around it, and a look at the tables. Where some were served, those that weren't are sent again by themselves. */
async function around(contract: Contract, who: Who, seed: number, seen: Tally): Promise<void> {
  const asked = await (SAMPLES[contract.id] as NonNullable<(typeof SAMPLES)[string]>)(house, who);
  const headers = { ...who.headers, ...(asked.cookie ? { cookie: asked.cookie } : {}), 'x-forwarded-for': `198.51.100.${1 + (seen.sent % 250)}` };
  const list = fc.sample(requestsOf(contract, asked), { numRuns: BATCH, seed });
  let before = await checksum();
  const first = await batch(contract, headers, list);
  seen.sent += list.length;
  seen.accepted += first.accepted;
  if (first.accepted > 0 && contract.method !== 'GET') {
    before = await checksum();
    const again = await batch(contract, headers, first.refused);
    seen.sent += first.refused.length;
    expect(again.accepted, `${contract.id}: what was refused as input was taken when sent again`).toBe(0);
    seen.harmless += first.refused.length;
  } else seen.harmless += list.length;
  expect(await checksum(), `${contract.id} wrote something although it refused: ${JSON.stringify(list).slice(0, 2_000)}`).toBe(before);
}

describe.each(allContracts.map((contract) => [contract.id, contract] as const))('%s', (id, contract) => {
  it('answers whatever it is sent with no 5xx, and leaves every table alone when it refuses', async () => {
    const seen: Tally = { sent: 0, accepted: 0, harmless: 0 };
    const count = contract.body === (none as unknown) ? WITHOUT : WITH_BODY;
    for (let round = 0; seen.sent < count; round += 1) await around(contract, allowed(contract), SEED + round, seen);
    tally.set(id, seen);
    expect(seen.harmless).toBeGreaterThan(0);
  });
});

it('exercised every route, with more than five thousand requests', () => {
  expect([...tally.keys()].sort()).toEqual(allContracts.map(({ id }) => id).sort());
  expect([...tally.values()].reduce((sum, { sent }) => sum + sent, 0)).toBeGreaterThan(5_000);
  expect(complained.said).toEqual([]);
});

it('a table that changed is noticed', async () => {
  const before = await checksum();
  await database.db('lane').where({ centre_id: house.centre.id, lane: 1 }).update({ family: 'string' });
  expect(await checksum()).not.toBe(before);
});
