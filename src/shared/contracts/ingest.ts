import * as z from 'zod/mini';
import { EQUIPMENT, LANE_USES } from '../domain/equipment.ts';
import type { DeviceData } from '../domain/journal/fact.ts';
import { parseInstant } from '../domain/journal/rfc3339.ts';
import { centreParams, contract, instant, laneNumber } from './contract.ts';

/** RFC 3339 text in, epoch ms out; further digits of a second are cut off. */
const timestamp = z.pipe(
  z.string().check(z.maxLength(40), z.refine((text) => parseInstant(text) !== null)),
  z.transform((text: string) => parseInstant(text) ?? 0),
);
/** Half of a surrogate pair is no character: it can't be kept as UTF-8. */
const LONE_SURROGATE = /\p{Surrogate}/u;
const text = (max: number) => z.string().check(z.maxLength(max), z.refine((said) => !LONE_SURROGATE.test(said)));
const code = text(64).check(z.minLength(1));
/** What CloudEvents allows in an attribute of type String (§2): no control characters, no lone surrogates. */
const attribute = text(255).check(z.minLength(1), z.regex(/^[^\p{Cc}]*$/u));
const count = z.int().check(z.minimum(0), z.maximum(100_000));
/** Millilitres as machines say them, to the microlitre. */
const millilitres = z.number().check(z.minimum(0), z.maximum(100_000));
const optional = z.optional;
const lane = laneNumber;
/** Equipment of which a gateway hears faults. */
const FAULTY = ['ball-return', 'ball-lift', 'foul-unit', 'scoring', 'masking', 'power', 'bumpers', 'motion-sensor'] as const;
const run = { machine: code, run: code };

/** Data of every event type as validated. Unknown fields are ignored. */
export const deviceData = {
  'lane.opened': z.object({
    lane, use: optional(z.enum(LANE_USES)), bowlers: optional(z.int().check(z.minimum(0), z.maximum(99))), label: optional(text(120)), until: optional(timestamp),
    games: optional(z.int().check(z.minimum(0), z.maximum(999))), bumpers: optional(z.boolean()),
  }),
  'lane.closed': z.object({ lane }),
  'lane.moved': z.object({ from: lane, to: lane }),
  'lane.counted': z.object({
    lane, deliveries: optional(count), cycles: optional(count), frames: optional(count), games: optional(count), basis: optional(z.enum(['scored', 'estimated'])),
  }),
  'game.progress': z.object({ lane, game: z.int().check(z.minimum(0), z.maximum(999)), frame: z.int().check(z.minimum(0), z.maximum(99)) }),
  'pinsetter.on': z.object({ lane }),
  'pinsetter.off': z.object({ lane }),
  'pinsetter.stopped': z.object({
    lane, reason: optional(z.enum(['fault', 'power', 'unknown'])), code: optional(text(64)), text: optional(text(300)),
    pins: optional(z.array(z.int().check(z.minimum(1), z.maximum(10))).check(z.maxLength(10))),
  }),
  'pinsetter.restarted': z.object({ lane }),
  'equipment.faulted': z.object({ equipment: z.enum(FAULTY), lane, text: optional(text(300)) }),
  'equipment.restored': z.object({ equipment: z.enum(FAULTY), lane, text: optional(text(300)) }),
  'call.requested': z.object({ lane, equipment: optional(z.enum(EQUIPMENT)), text: optional(text(300)) }),
  'run.started': z.object({ ...run, pattern: optional(code), revision: optional(z.int().check(z.minimum(0), z.maximum(1_000_000))), lanes: optional(z.array(lane).check(z.maxLength(99))) }),
  'run.lane.dressed': z.object({
    ...run, lane, startedAt: timestamp, finishedAt: timestamp, conditionerMl: optional(z.object({ a: millilitres, b: optional(millilitres) })),
    cleanerMl: optional(millilitres), measured: optional(z.boolean()),
  }).check(z.refine((said) => said.startedAt <= said.finishedAt, { path: ['startedAt'] })),
  'run.lane.skipped': z.object({ ...run, lane, reason: text(300) }),
  'run.finished': z.object(run),
  'run.aborted': z.object({ ...run, lane: optional(lane), reason: text(300) }),
  'machine.levels': z.object({
    machine: code, tankAMl: optional(millilitres), tankBMl: optional(millilitres), cleanerMl: optional(millilitres), wasteMl: optional(millilitres),
    batteryPct: optional(z.number().check(z.minimum(0), z.maximum(100))),
  }),
  'gateway.started': z.object({ queued: optional(z.int().check(z.minimum(0), z.maximum(4_000_000_000))), uptimeS: optional(z.int().check(z.minimum(0), z.maximum(4_000_000_000))) }),
  'gateway.heartbeat': z.object({ queued: optional(z.int().check(z.minimum(0), z.maximum(4_000_000_000))), uptimeS: optional(z.int().check(z.minimum(0), z.maximum(4_000_000_000))) }),
} satisfies { [T in keyof DeviceData]: z.ZodMiniType<DeviceData[T], unknown> };

export type DeviceType = keyof DeviceData;
export const isDeviceType = (type: string): type is DeviceType => Object.hasOwn(deviceData, type);

/** Attributes of an event (CloudEvents 1.0 §3.1) that must fit for it to be one of ours. `time` is asked for besides. */
export const eventAttributes = z.object({
  specversion: z.literal('1.0'),
  source: attribute,
  id: attribute,
  type: attribute,
  time: timestamp,
  /** CloudEvents' sequence extension: a number of the source's own, as text. */
  sequence: optional(z.unknown()),
  data: optional(z.unknown()),
});

/** Limits of a request and of what it holds. */
export const INGEST_LIMITS = { events: 1_000, bytes: 1_048_576, eventBytes: 65_536 } as const;

const cloudEvent = z.looseObject({ specversion: z.string(), source: z.string(), id: z.string(), type: z.string(), time: z.string() });

export const setAsideEvent = z.object({
  source: z.string(), id: z.string(), type: z.string(), time: instant, receivedAt: instant, reason: z.string(), /** The reason as a sentence. */ says: z.string(),
  gateway: z.nullable(z.string()), /** The element as it was sent. */ sent: z.unknown(),
});
const named = z.object({ source: z.string().check(z.maxLength(255)), id: z.string().check(z.minLength(1), z.maxLength(255)) });

export const ingestContracts = {
  events: contract({
    id: 'ingest.events', method: 'POST', path: '/api/ingest/events', permission: 'events.report',
    summary: 'What a gateway heard: one CloudEvent (application/cloudevents+json) or a batch (application/cloudevents-batch+json); Authorization: Bearer <gateway key>',
    body: z.union([cloudEvent, z.array(z.unknown()).check(z.maxLength(INGEST_LIMITS.events))]),
    response: z.object({ accepted: z.int(), duplicates: z.int(), setAside: z.array(z.object({ index: z.int(), id: z.string(), reason: z.string() })) }),
    refusals: ['gateway.key-required', 'gateway.key-revoked', 'gateway.too-many', 'events.too-large', 'events.type', 'events.not-json', 'events.not-cloudevents', 'events.gateway-time'],
  }),
  setAside: contract({
    id: 'ingest.setAside', method: 'GET', path: '/api/centres/:centre/settings/set-aside', permission: 'settings.see',
    summary: 'Events that were set aside, newest first, at most 500', params: centreParams, response: z.object({ events: z.array(setAsideEvent) }),
  }),
  apply: contract({
    id: 'ingest.applySetAside', method: 'POST', path: '/api/centres/:centre/settings/set-aside/apply', permission: 'settings.edit',
    summary: 'Apply events that were set aside, with their own time, now that the cause is mended', params: centreParams,
    body: z.object({ events: z.array(named).check(z.minLength(1), z.maxLength(500)) }),
    response: z.object({ applied: z.int(), still: z.array(z.object({ source: z.string(), id: z.string(), reason: z.string(), says: z.string() })) }),
  }),
};
