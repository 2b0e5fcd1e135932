import { readdirSync, readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { allContracts, contractsOfSlices } from '#shared/contracts/index.ts';
import { POLICY } from '#shared/policy/policy.ts';
import { knowsRefusal } from '#shared/text/en/refusals.ts';
import { openApiRoute } from '#server/platform/http/openapi.ts';
import { ask } from '#tests/support/ask.ts';
import { fixedClock } from '#tests/support/clock.ts';
import { freshDatabase, type TestDatabase } from '#tests/support/db.ts';
import { startWeb, type Web } from '#tests/support/web.ts';

type Json = Record<string, unknown>;
interface Operation {
  operationId: string;
  parameters?: Json[];
  requestBody?: { content: Record<string, { schema: Json }> };
  responses: Record<string, { content?: Record<string, { schema: Json }> }>;
  security: Json[];
}
interface Document {
  openapi: string;
  paths: Record<string, Record<string, Operation>>;
  components: Record<string, Json>;
}

let database: TestDatabase;
let web: Web;
let document: Document;
const operations = () => Object.entries(document.paths).flatMap(([path, item]) => Object.entries(item).map(([method, operation]) => ({ path, method, operation })));

beforeAll(async () => {
  database = await freshDatabase();
  web = await startWeb(database.db, { clock: fixedClock('2026-11-30T18:45:00Z'), routes: [openApiRoute(allContracts, '9.8.7')] });
  document = (await ask(web.url, 'GET', '/api/openapi.json')).body as Document;
});
afterAll(async () => {
  await web.close();
  await database.close();
});

describe('the document', () => {
  it('is OpenAPI 3.1 and says every contract once', () => {
    expect(document.openapi).toMatch(/^3\.1\.\d+$/);
    expect(document).toMatchObject({ info: { title: 'Lanewright', version: '9.8.7' } });
    expect(operations().map(({ operation }) => operation.operationId).sort()).toEqual(allContracts.map(({ id }) => id).sort());
    expect(allContracts.length).toBeGreaterThan(50);
  });

  it('declares every parameter of a path, and no other in it', () => {
    for (const { path, operation } of operations()) {
      const inPath = [...path.matchAll(/\{(\w+)\}/g)].map((match) => match[1]);
      expect((operation.parameters ?? []).filter((p) => p['in'] === 'path').map((p) => p['name']), operation.operationId).toEqual(expect.arrayContaining(inPath));
      expect((operation.parameters ?? []).filter((p) => p['in'] === 'path')).toHaveLength(inPath.length);
    }
  });

  it('refers only to what it has', () => {
    const text = JSON.stringify(document);
    const references = [...text.matchAll(/"\$ref":"([^"]+)"/g)].map((match) => match[1] ?? '');
    expect(references.length).toBeGreaterThan(allContracts.length);
    for (const reference of new Set(references)) {
      expect(reference).toMatch(/^#\//);
      const found = reference.slice(2).split('/').reduce<unknown>((at, step) => (at as Json | undefined)?.[step], document);
      expect(found, reference).toBeTypeOf('object');
    }
  });

  it('has a schema for every body and answer, with its keywords in their places', () => {
    for (const { operation } of operations()) {
      const [status] = Object.keys(operation.responses).filter((key) => key !== 'default');
      expect(Number(status)).toBeGreaterThanOrEqual(200);
      for (const { schema } of [...Object.values(operation.requestBody?.content ?? {}), ...Object.values(operation.responses[status ?? '']?.content ?? {})]) check(schema, operation.operationId);
    }
  });

  it('tells integrators the way in: sign-in without a session, a key and CloudEvents for gateways', () => {
    expect(document.paths['/api/session']?.['post']?.security).toEqual([]);
    expect(document.paths['/api/session']?.['post']?.requestBody?.content['application/json']?.schema).toMatchObject({ type: 'object', required: ['email', 'password'] });
    const events = document.paths['/api/ingest/events']?.['post'];
    expect(events?.security).toEqual([{ gatewayKey: [] }]);
    expect(Object.keys(events?.requestBody?.content ?? {})).toEqual(['application/cloudevents+json', 'application/cloudevents-batch+json']);
    for (const path of ['/api/me', '/api/centres/{centre}/floor', '/api/centres/{centre}/nights/{date}']) expect(document.paths[path]?.['get'], path).toBeDefined();
  });
});

const TYPES = new Set(['object', 'array', 'string', 'number', 'integer', 'boolean', 'null']);

/** JSON Schema 2020-12 as far as we use it: a wrong type or a keyword in the wrong place would mislead a generator. */
function check(schema: Json, where: string): void {
  for (const type of [schema['type'] ?? []].flat() as string[]) expect(TYPES, where).toContain(type);
  if (schema['pattern'] !== undefined) expect(() => new RegExp(schema['pattern'] as string, 'u')).not.toThrow();
  const named = (schema['propertyNames'] as { enum?: string[] } | undefined)?.enum ?? Object.keys((schema['properties'] ?? {}));
  if (schema['required'] !== undefined) expect(named, where).toEqual(expect.arrayContaining(schema['required'] as string[]));
  for (const inner of Object.values((schema['properties'] ?? {}) as Record<string, Json>)) check(inner, where);
  for (const inner of (schema['anyOf'] ?? schema['oneOf'] ?? []) as Json[]) check(inner, where);
  if (schema['type'] === 'array' && schema['items'] !== undefined) check(schema['items'] as Json, where);
}

describe('the contracts', () => {
  const FOLDER = new URL('../../src/shared/contracts/', import.meta.url);

  it('are all registered: no file of contracts is left out', () => {
    const files = readdirSync(FOLDER).filter((name) => !['contract.ts', 'index.ts'].includes(name) && !name.endsWith('.test.ts'));
    const withContracts = files.filter((name) => /= contract\(|: contract\(/.test(readFileSync(new URL(name, FOLDER), 'utf8')));
    expect(Object.keys(contractsOfSlices).sort()).toEqual(withContracts.map((name) => name.replace('.ts', '')).sort());
  });

  it('have an id and a way of their own', () => {
    const ids = allContracts.map(({ id }) => id);
    const ways = allContracts.map(({ method, path }) => `${method} ${path}`);
    expect(new Set(ids).size).toBe(ids.length);
    expect(new Set(ways).size).toBe(ways.length);
  });

  it('name a row of the policy, and carry the centre in the path where the row is about one', () => {
    for (const { id, path, permission } of allContracts) {
      expect(POLICY, id).toHaveProperty([permission]);
      expect(path.startsWith('/api/centres/:centre'), id).toBe(typeof POLICY[permission].to !== 'string');
    }
  });

  it('have a sentence for every code with which they refuse', () => {
    const codes = new Set(allContracts.flatMap(({ refusals }) => refusals));
    expect([...codes].filter((code) => !knowsRefusal(code))).toEqual([]);
  });

  it('find the sentences of every slice', async () => {
    const folder = new URL('../../src/shared/text/en/', import.meta.url);
    const files = readdirSync(folder).filter((name) => name !== 'refusals.ts' && /export const refusals\b/.test(readFileSync(new URL(name, folder), 'utf8')));
    expect(files.length).toBeGreaterThan(5);
    for (const name of files) {
      const { refusals } = (await import(/* @vite-ignore */ new URL(name, folder).href)) as { refusals: Record<string, unknown> };
      expect(Object.keys(refusals).filter((code) => !knowsRefusal(code)), name).toEqual([]);
    }
  });
});
