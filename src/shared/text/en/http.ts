import type { CodeParams, Sentences } from './sentences.ts';

const seconds = (params: CodeParams) => Number(params['retryAfterS'] ?? 1);
export const waitText = (s: number): string => (s < 90 ? `${s} ${s === 1 ? 'second' : 'seconds'}` : `${Math.ceil(s / 60)} minutes`);

/** What every route may answer, and what the client says when it gets no answer. */
export const refusals: Sentences = {
  'input.invalid': () => 'Some fields can’t be taken as they are. See what stands beside them.',
  'session.required': () => 'Sign in first.',
  'forbidden': () => 'Your role doesn’t include this. Ask the manager.',
  'cross-site': () => 'This came from another site and was refused. Open Lanewright itself and try there.',
  'centre.unknown': () => 'There is no such centre, or you don’t belong to it.',
  'route.unknown': () => 'Nothing is at this address.',
  'method.not-allowed': ({ method, allowed }) => `${String(method)} doesn’t work here; ${String(allowed)} does.`,
  'path.invalid': () => 'The address is not well formed.',
  'request.invalid': () => 'The request can’t be read.',
  'body.not-json': () => 'The body is not JSON.',
  'body.type': () => 'The body must be JSON in UTF-8 (Content-Type: application/json).',
  'body.too-large': ({ maxKb }) => `The body is larger than ${String(maxKb)} kB.`,
  'idempotency.key-invalid': () => 'The Idempotency-Key must be 1 to 200 printable ASCII characters without spaces.',
  'idempotency.mismatch': () => 'This Idempotency-Key was used for another request. Use a new one.',
  'idempotency.under-way': () => 'The same request is under way. Ask again in a moment.',
  'idempotency.answer-lost': () => 'This was done already, but its answer isn’t kept. Look at the present state.',
  'database.away': (params) => `The database is away. Nothing is lost; try again in ${waitText(seconds(params))}.`,
  'database.busy': () => 'Too many changes at once. Try again.',
  'network.away': () => 'The server was not reached. Try again when the page is live.',
  'unexpected': ({ request }) => `Something broke on the server. It is in the log as ${String(request)}.`,
};

/** What stands beside one field. */
export const fields: Sentences = {
  'field.required': () => 'This is needed.',
  'field.type': ({ expected }) => `This must be ${({ number: 'a number', int: 'a whole number', string: 'text', boolean: 'yes or no', array: 'a list', object: 'an object', record: 'an object', null: 'left out' } as Record<string, string>)[String(expected)] ?? String(expected)}.`,
  'field.format': () => 'This is not in the form asked for.',
  'field.choice': ({ allowed }) => `Choose one of: ${String(allowed)}.`,
  'field.too-short': ({ min }) => `At least ${String(min)} characters.`,
  'field.too-long': ({ max }) => `At most ${String(max)} characters.`,
  'field.too-small': ({ min }) => `Not below ${String(min)}.`,
  'field.too-large': ({ max }) => `Not above ${String(max)}.`,
  'field.too-few': ({ min }) => `At least ${String(min)} entries.`,
  'field.too-many': ({ max }) => `At most ${String(max)} entries.`,
  'field.invalid': () => 'This can’t be taken.',
};
