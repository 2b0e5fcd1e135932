import * as fc from 'fast-check';

type Json = Record<string, unknown>;

/** What breaks parsers, columns and sums: limits of kinds, other kinds, text that isn't quite text. */
const NASTY: readonly unknown[] = [
  null, true, false, 0, -0, -1, 1, 1.5, 1e21, -1e21, 2 ** 31, 2 ** 53, 2 ** 53 + 2, 1e308, Number.MIN_VALUE, 1_000_000_000_000_000,
  '', ' ', '\u0000', 'a\u0000b', '\ud800', 'x\udc00y', '\u202e', '\ufeff', '💥', 'é', 'e\u0301', '\r\n', '\u2028', '%', '_', "' or 1=1 -- ", '"; drop table lane; --', '${7*7}', '../../etc/passwd',
  '<script>alert(1)</script>', '=1+1', 'x'.repeat(61), 'x'.repeat(256), 'x'.repeat(5_000), 'null', 'NaN', '1e5', '007', '2026-02-30', '2026-13-01', '0000-00-00', '9999-12-31', '-271821-04-19',
  '00000000-0000-0000-0000-000000000000', 'ffffffff-ffff-ffff-ffff-ffffffffffff', 'constructor', '__proto__', 'toString', 'hasOwnProperty',
  [], {}, [null], [[]], [[[[[[[[]]]]]]]], { length: 1 }, { constructor: 1 }, JSON.parse('{"__proto__": {"admin": true}}'), Array.from({ length: 200 }, (_, i) => i), { toString: 'x', valueOf: 1 },
];
const nasty = fc.constantFrom(...NASTY);

/** Values that fit a JSON Schema of ours, or nearly: patterns are filled by kind, limits are met exactly now and then. */
export function fitting(schema: Json): fc.Arbitrary<unknown> {
  if ('const' in schema) return fc.constant(schema['const']);
  if (Array.isArray(schema['enum'])) return fc.constantFrom(...(schema['enum'] as unknown[]));
  const either = (schema['anyOf'] ?? schema['oneOf']) as Json[] | undefined;
  if (either) return fc.oneof(...either.map(fitting));
  const type = schema['type'];
  if (Array.isArray(type)) return fc.oneof(...type.map((one) => fitting({ ...schema, type: one as string })));
  switch (type) {
    case 'object':
      return anObject(schema);
    case 'array':
      return fc.array(fitting((schema['items'] ?? {}) as Json), { minLength: Number(schema['minItems'] ?? 0), maxLength: Math.min(Number(schema['maxItems'] ?? 4), Number(schema['minItems'] ?? 0) + 3) });
    case 'string':
      return aString(schema);
    case 'integer':
      return limits(schema, fc.integer({ min: within(schema['minimum'], -2_000_000), max: within(schema['maximum'], 2_000_000) }));
    case 'number':
      return limits(schema, fc.double({ min: within(schema['minimum'], -1e6), max: within(schema['maximum'], 1e6), noNaN: true }));
    case 'boolean':
      return fc.boolean();
    case 'null':
      return fc.constant(null);
    default:
      return fc.jsonValue({ maxDepth: 2 });
  }
}

const within = (limit: unknown, otherwise: number): number => (typeof limit === 'number' && Number.isFinite(limit) && Math.abs(limit) <= 2 ** 53 ? limit : otherwise);
const limits = (schema: Json, some: fc.Arbitrary<number>): fc.Arbitrary<number> =>
  fc.oneof({ weight: 3, arbitrary: some }, { weight: 1, arbitrary: fc.constantFrom(within(schema['minimum'], -1), within(schema['maximum'], 1_790_000_000_000)) });

function anObject(schema: Json): fc.Arbitrary<unknown> {
  const properties = (schema['properties'] ?? {}) as Record<string, Json>;
  const required = (schema['required'] ?? []) as string[];
  const names = (schema['propertyNames'] as { enum?: string[] } | undefined)?.enum;
  if (names) return fc.record(Object.fromEntries(names.map((name) => [name, fitting((schema['additionalProperties'] ?? {}) as Json)])));
  const fields = Object.fromEntries(Object.entries(properties).map(([name, inner]) => [name, fitting(inner)]));
  return fc.record(fields, { requiredKeys: required.filter((name) => name in fields) });
}

function aString(schema: Json): fc.Arbitrary<string> {
  const pattern = String(schema['pattern'] ?? '');
  if (pattern.includes('[0-9a-f]{8}')) return fc.uuid();
  if (pattern.includes('-\\d{2}-\\d{2}')) return fc.tuple(fc.integer({ min: 1999, max: 3000 }), fc.integer({ min: 0, max: 13 }), fc.integer({ min: 0, max: 32 })).map(([y, m, d]) => `${String(y).padStart(4, '0')}-${String(m).padStart(2, '0')}-${String(d).padStart(2, '0')}`);
  if (pattern.includes('@')) return fc.emailAddress();
  const maxLength = Math.min(Number(schema['maxLength'] ?? 20), 200);
  return fc.oneof(fc.string({ maxLength, unit: 'binary' }), fc.stringMatching(/^[a-z0-9-]{1,12}$/), fc.constant('x'.repeat(Math.min(Number(schema['maxLength'] ?? 20), 20_000))));
}

/** One value with something in it put out of order: a leaf replaced, a key lost, a key too many, the whole thing something else. */
export function spoilt(value: unknown): fc.Arbitrary<unknown> {
  const places = placesOf(value);
  return fc.tuple(fc.constantFrom(...places), nasty, fc.constantFrom('replace', 'replace', 'replace', 'remove', 'add', 'wrap')).map(([place, bad, how]) => changed(value, place, bad, how));
}

type Place = readonly (string | number)[];

function placesOf(value: unknown, at: Place = []): Place[] {
  if (typeof value !== 'object' || value === null) return [at];
  const entries: [string | number, unknown][] = Array.isArray(value) ? value.map((inner, i) => [i, inner]) : Object.entries(value);
  return [at, ...entries.flatMap(([key, inner]) => placesOf(inner, [...at, key]))];
}

function changed(value: unknown, [first, ...rest]: Place, bad: unknown, how: string): unknown {
  if (first === undefined) return how === 'wrap' ? [value] : how === 'add' && typeof value === 'object' && value !== null && !Array.isArray(value) ? { ...value, [JSON.stringify(bad).slice(0, 40)]: bad } : bad;
  if (Array.isArray(value)) return value.flatMap((inner: unknown, i) => (i !== first ? [inner] : rest.length === 0 && how === 'remove' ? [] : [changed(inner, rest, bad, how)]));
  const entries = Object.entries(value as object);
  return Object.fromEntries(entries.flatMap(([key, inner]) => (key !== first ? [[key, inner]] : rest.length === 0 && how === 'remove' ? [] : [[key, changed(inner, rest, bad, how)]])));
}

/** Bodies that are no JSON of ours at all, as they travel. */
export const JUNK: readonly string[] = [
  '', ' ', '{', '}', '[', '{"a":', 'nul', 'undefined', '{"a":1,}', "{'a':1}", '1e400', '-', '"', '"\\ud800"', '[1e400]', '{"a":1e999}', '\u0000', '[', '['.repeat(20_000), '{"a":'.repeat(5_000), '{"__proto__":null}',
  `{"a":"${'x'.repeat(90_000)}"}`, '\ufeff{}', '{"a":1}{"a":1}', 'true', '0', '""', '[]', '{}',
];

/** What a path or query may hold where an id, a number or a date is asked for. */
export const NASTY_TEXT: readonly string[] = [
  '0', '-1', '1.5', '100', '1e3', '0x10', ' 7', '7 ', '+7', 'NaN', 'Infinity', '99999999999999999999', 'abc', 'é', '💥', '\u0000', 'a\nb', '%', '%2e%2e', '..%2f', "'", '"', '`', '[object Object]', 'null', 'undefined', 'true',
  'x'.repeat(300), 'x'.repeat(3_000), '2026-02-30', '2026-00-00', '0000-01-01', '9999-12-31', '10000-01-01', '00000000-0000-0000-0000-000000000000', '0197A000-0000-7000-8000-00000000DEAD', 'constructor', '__proto__',
];
