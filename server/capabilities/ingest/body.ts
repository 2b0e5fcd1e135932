import type { IncomingMessage } from 'node:http';
import { INGEST_LIMITS } from '#shared/contracts/ingest.ts';
import { Refusal } from '#server/platform/http/refusal.ts';

const SINGLE = 'application/cloudevents+json';
const BATCH = 'application/cloudevents-batch+json';

const tooLarge = (what: string, max: number): Refusal => new Refusal(413, 'events.too-large', { what, max });

/** The elements of a request's body. Refuses what isn't CloudEvents as a whole, or too large. */
export async function readBody(request: IncomingMessage): Promise<readonly unknown[]> {
  const media = mediaOf(request);
  const body = parse(await bytesOf(request));
  if (media === SINGLE) {
    if (!isEvent(body.value)) throw new Refusal(400, 'events.not-cloudevents');
    if (body.bytes > INGEST_LIMITS.eventBytes) throw tooLarge('bytes an event', INGEST_LIMITS.eventBytes);
    return [body.value];
  }
  if (!Array.isArray(body.value)) throw new Refusal(400, 'events.not-cloudevents');
  if (body.value.length > INGEST_LIMITS.events) throw tooLarge('events', INGEST_LIMITS.events);
  // Only a body that is larger than one event may hold one that is too large.
  if (body.bytes > INGEST_LIMITS.eventBytes && body.value.some((element) => sizeOf(element) > INGEST_LIMITS.eventBytes)) throw tooLarge('bytes an event', INGEST_LIMITS.eventBytes);
  return body.value as unknown[];
}

const isEvent = (value: unknown): boolean => typeof value === 'object' && value !== null && !Array.isArray(value) && Object.hasOwn(value, 'specversion');

function sizeOf(element: unknown): number {
  try {
    return Buffer.byteLength(JSON.stringify(element));
  } catch {
    throw new Refusal(400, 'events.not-cloudevents');
  }
}

function mediaOf(request: IncomingMessage): string {
  const [type = '', ...parameters] = (request.headers['content-type'] ?? '').toLowerCase().split(';').map((part) => part.trim());
  const charset = parameters.find((parameter) => parameter.startsWith('charset='))?.slice('charset='.length).replaceAll('"', '');
  const encoding = request.headers['content-encoding'] ?? 'identity';
  if ((type !== SINGLE && type !== BATCH) || (charset !== undefined && charset !== 'utf-8') || encoding !== 'identity') throw new Refusal(415, 'events.type');
  return type;
}

async function bytesOf(request: IncomingMessage): Promise<Buffer> {
  const limit = INGEST_LIMITS.bytes;
  if (Number(request.headers['content-length'] ?? 0) > limit) throw tooLarge('bytes', limit);
  const pieces: Buffer[] = [];
  let bytes = 0;
  return new Promise((resolve, reject) => {
    request.on('data', (piece: Buffer) => {
      bytes += piece.length;
      if (bytes > limit) reject(tooLarge('bytes', limit));
      else pieces.push(piece);
    });
    request.on('end', () => resolve(pieces.length === 1 && pieces[0] ? pieces[0] : Buffer.concat(pieces)));
    request.on('error', reject);
    request.on('close', () => reject(new Refusal(400, 'request.invalid')));
  });
}

const utf8 = new TextDecoder('utf-8', { fatal: true });

function parse(body: Buffer): { value: unknown; bytes: number } {
  try {
    return { value: JSON.parse(utf8.decode(body)) as unknown, bytes: body.length };
  } catch {
    throw new Refusal(400, 'events.not-json');
  }
}
