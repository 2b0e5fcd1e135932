import * as z from 'zod/mini';
import { apiContracts } from '#shared/contracts/api.ts';
import { none, type Contract, type ResponseOf } from '#shared/contracts/contract.ts';
import { POLICY } from '#shared/policy/policy.ts';
import { serve, type Route } from './route.ts';

type Json = Record<string, unknown>;
type Schema = z.ZodMiniType;

/** Codes that routes give besides their own, by status. */
const EVERYWHERE: Record<string, readonly string[]> = {
  400: ['request.invalid', 'path.invalid', 'body.not-json'],
  401: ['session.required'],
  403: ['forbidden', 'cross-site'],
  404: ['centre.unknown'],
  405: ['method.not-allowed'],
  409: ['idempotency.under-way', 'idempotency.answer-lost'],
  413: ['body.too-large'],
  415: ['body.type'],
  422: ['input.invalid', 'idempotency.mismatch', 'idempotency.key-invalid'],
  500: ['unexpected'],
  503: ['database.away', 'database.busy'],
};

/** The OpenAPI 3.1 document of these contracts; nothing in it is written by hand that a contract says. */
export function openApi(contracts: readonly Contract[], version: string): Json {
  const paths: Record<string, Json> = {};
  for (const contract of contracts) {
    const path = contract.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [contract.method.toLowerCase()]: operation(contract) };
  }
  return {
    openapi: '3.1.1',
    jsonSchemaDialect: 'https://json-schema.org/draft/2020-12/schema',
    info: {
      title: 'Lanewright', version,
      description: `Refusals are application/problem+json (RFC 9457) with a stable \`code\`. Codes of every route: ${Object.entries(EVERYWHERE).map(([status, codes]) => `${status} ${codes.join(', ')}`).join(' · ')}.`,
    },
    servers: [{ url: '/' }],
    paths,
    components: {
      schemas: { Problem: PROBLEM },
      responses: { Problem: { description: 'Refused, or broken', content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } } },
      parameters: {
        IdempotencyKey: { name: 'Idempotency-Key', in: 'header', required: false, description: 'A repeat with the same key within 24 hours has the effect of once', schema: { type: 'string', pattern: '^[\\x21-\\x7e]{1,200}$' } },
      },
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'lanewright-session', description: 'Given by POST /api/session, HttpOnly. The name has the port behind it on plain http, and __Host- before it on HTTPS.' },
        gatewayKey: { type: 'http', scheme: 'bearer', description: 'A gateway’s key, made in Settings or by `npm run gateway:key`' },
      },
    },
  };
}

/** The route that answers with the document; made once, as contracts don't change while the program runs. */
export function openApiRoute(contracts: readonly Contract[], version: string): Route {
  const document = openApi(contracts, version) as ResponseOf<typeof apiContracts.document>;
  return serve(apiContracts.document, async () => document);
}

function operation(contract: Contract): Json {
  const { id, summary, permission, method, status } = contract;
  const changes = method !== 'GET';
  const row = POLICY[permission];
  const parameters = [...parametersIn('path', contract.params), ...parametersIn('query', contract.query), ...(changes && row.to !== 'public' && row.to !== 'gateway' ? [{ $ref: '#/components/parameters/IdempotencyKey' }] : [])];
  return {
    operationId: id, summary, tags: [id.split('.')[0]], 'x-permission': permission,
    ...(contract.refusals.length > 0 ? { description: `Refuses with: ${contract.refusals.map((code) => `\`${code}\``).join(', ')}` } : {}),
    security: row.to === 'public' ? [] : [{ [row.to === 'gateway' ? 'gatewayKey' : 'session']: [] }],
    ...(parameters.length > 0 ? { parameters } : {}),
    ...(changes && contract.body !== (none as Schema) ? { requestBody: { required: true, content: contentOf(contract) } } : {}),
    responses: { [status]: success(contract), default: { $ref: '#/components/responses/Problem' } },
  };
}

function contentOf(contract: Contract): Json {
  const schema = schemaOf(contract.body, 'input');
  if (POLICY[contract.permission].to !== 'gateway') return { 'application/json': { schema } };
  // CloudEvents' own media types: one event, or several.
  const [one, many] = (schema['anyOf'] as Json[] | undefined) ?? [schema, schema];
  return { 'application/cloudevents+json': { schema: one }, 'application/cloudevents-batch+json': { schema: many } };
}

function success({ response, summary, status }: Contract): Json {
  if (response !== (none as Schema)) return { description: summary, content: { 'application/json': { schema: schemaOf(response, 'output') } } };
  return { description: summary, ...(status === 303 ? { headers: { Location: { schema: { type: 'string' } } } } : {}) };
}

function parametersIn(place: 'path' | 'query', schema: Schema): Json[] {
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as { properties?: Record<string, Json>; required?: string[] };
  return Object.entries(properties).map(([name, property]) => ({ name, in: place, required: place === 'path' || required.includes(name), schema: property }));
}

/** JSON Schema 2020-12 of one part of a contract: what is taken (`input`) or given (`output`). */
export function schemaOf(schema: Schema, io: 'input' | 'output'): Json {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return rest;
}

const code = { type: 'string', description: 'Stable: `call.already-cleared`' };
const params = { type: 'object', additionalProperties: { type: ['string', 'number'] } };
const PROBLEM: Json = {
  type: 'object',
  required: ['type', 'title', 'status', 'code', 'params', 'errors', 'instance'],
  properties: {
    type: { type: 'string', format: 'uri' }, title: { type: 'string' }, status: { type: 'integer' }, code, params,
    errors: {
      type: 'array',
      items: {
        type: 'object', required: ['in', 'pointer', 'code', 'params', 'detail'],
        properties: { in: { enum: ['body', 'path', 'query'] }, pointer: { type: 'string', description: 'JSON pointer (RFC 6901) into that part' }, code, params, detail: { type: 'string' } },
      },
    },
    instance: { type: 'string', format: 'uri', description: 'The request’s id in the log' },
  },
};
