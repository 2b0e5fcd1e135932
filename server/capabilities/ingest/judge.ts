import type * as z from 'zod/mini';
import { deviceData, eventAttributes, isDeviceType } from '#shared/contracts/ingest.ts';
import type { DeviceData, FactData, FactType } from '#shared/domain/journal/fact.ts';
import type { DeviceEntry } from '#server/platform/journal/ledger.ts';
import { contentHash } from './canonical.ts';

const TOO_OLD_MS = 7 * 24 * 3_600_000;
const IN_FUTURE_MS = 5 * 60_000;
/** Columns of the journal. */
const TYPE_MAX = 64;
const REASON_MAX = 64;

/** What an event is judged by besides itself. */
export interface Circumstances {
  gateway: { id: string; name: string };
  lanes: number;
  receivedAt: number;
  /** The gateway's clock minus ours, ms, where its times must be corrected; else 0. */
  clockError: number;
}

export type Judged = { type: FactType; time: number; data: FactData[FactType] } | { reason: string };

/**
 * One element of a batch: an event to apply, or one that is set aside with its reason: for its form, its time, or a lane that isn't
 * there; never for the state of a lane. Throws RangeError for what is nested too deep.
 */
export function judge(element: unknown, at: Circumstances): DeviceEntry & { sequence: number | null } {
  const hash = contentHash(element);
  const attributes = eventAttributes.safeParse(element);
  const said = (typeof element === 'object' && element !== null ? element : {}) as Record<string, unknown>;
  const keyed = identity(said, hash);
  const sentTime = attributes.success ? attributes.data.time : at.receivedAt;
  const judged = attributes.success ? judgeEvent(attributes.data, at) : { reason: reasonOf(element, keyed.named, attributes.error) };
  const applied = 'data' in judged;
  return {
    source: keyed.source, id: keyed.id, type: applied ? judged.type : String(said['type'] ?? '').slice(0, TYPE_MAX),
    time: applied ? judged.time : sentTime, timeSent: at.clockError !== 0 && attributes.success ? sentTime : undefined, raw: element, hash,
    gateway: at.gateway, data: applied ? judged.data : null, reason: applied ? null : judged.reason.slice(0, REASON_MAX), sequence: numberOf(said['sequence']),
  };
}

/** The pair that names an event for ever; without a usable one, its content does. */
function identity(said: Record<string, unknown>, hash: Buffer): { source: string; id: string; named: boolean } {
  const { source, id } = eventAttributes.shape;
  const goodSource = source.safeParse(said['source']);
  const goodId = id.safeParse(said['id']);
  if (goodSource.success && goodId.success) return { source: goodSource.data, id: goodId.data, named: true };
  return { source: goodSource.success ? goodSource.data : '', id: `sha256:${hash.toString('hex')}`, named: false };
}

function reasonOf(element: unknown, named: boolean, error: z.core.$ZodError): string {
  if (typeof element !== 'object' || element === null || Array.isArray(element)) return 'event.not-an-object';
  return !named && !Object.hasOwn(element, 'id') ? 'event.id-missing' : `event.invalid:${pointer(error)}`;
}

const pointer = (error: z.core.$ZodError): string => `/${(error.issues[0]?.path ?? []).map(String).join('/')}`;

/** An event with fitting attributes: its type, data, lanes and time. */
export function judgeEvent(event: { type: string; time: number; data?: unknown }, at: Omit<Circumstances, 'gateway'>, window = TOO_OLD_MS): Judged {
  if (!isDeviceType(event.type)) return { reason: 'type.unknown' };
  const parsed = deviceData[event.type].safeParse(event.data ?? {});
  if (!parsed.success) return { reason: `data.invalid:${pointer(parsed.error)}` };
  const data = corrected(parsed.data, at.clockError);
  if (lanesOf(data).some((lane) => lane > at.lanes)) return { reason: 'lane.unknown' };
  const time = event.time - at.clockError;
  // A dressed lane stands at the end of its dressing, which can't lie after it was told.
  const place = 'finishedAt' in data ? data.finishedAt : time;
  if (place > time) return { reason: 'data.invalid:/finishedAt' };
  if (Math.min(place, time) < Math.max(1, at.receivedAt - window)) return { reason: 'time.too-old' };
  if (time > at.receivedAt + IN_FUTURE_MS) return { reason: 'time.in-future' };
  return { type: event.type, time: place, data };
}

type AnyData = DeviceData[keyof DeviceData];

function corrected(data: AnyData, error: number): AnyData {
  return 'finishedAt' in data && error !== 0 ? { ...data, startedAt: data.startedAt - error, finishedAt: data.finishedAt - error } : data;
}

function lanesOf(data: AnyData): number[] {
  const said = data as { lane?: number; from?: number; to?: number; lanes?: number[] };
  return [said.lane, said.from, said.to, ...(said.lanes ?? [])].filter((lane) => lane !== undefined);
}

function numberOf(sequence: unknown): number | null {
  const number = typeof sequence === 'string' && /^\d{1,15}$/.test(sequence) ? Number(sequence) : sequence;
  return typeof number === 'number' && Number.isSafeInteger(number) && number >= 0 ? number : null;
}
