import { CloudEvent } from 'cloudevents';
import type { IngestAnswer } from '#server/capabilities/ingest/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { TestServer } from './server.ts';

/** What a test says of an event; source, id and form come from the CloudEvents SDK, the independent client. */
export interface EventGiven {
  type: string;
  data?: unknown;
  time?: number | string;
  id?: string;
  source?: string;
  sequence?: string;
}

export interface DeviceAnswer {
  status: number;
  body: IngestAnswer & { code?: string; title?: string; errors?: unknown[] };
  headers: Headers;
}

export interface Device {
  key: string;
  gateway: string;
  /** One element as it travels. */
  event(given: EventGiven): Record<string, unknown>;
  /** A batch. */
  send(given: readonly EventGiven[], headers?: Record<string, string>): Promise<DeviceAnswer>;
  /** One event by itself. */
  sendOne(given: EventGiven, headers?: Record<string, string>): Promise<DeviceAnswer>;
  /** Anything at all. */
  post(body: string | Buffer, headers?: Record<string, string>): Promise<DeviceAnswer>;
}

let made = 0;

/** A gateway of a centre with its key, which speaks the public interface alone. `now` gives the time of events that say none. */
export async function aDevice(server: TestServer, centre: CentreRef, now: () => number = () => server.deps.clock.now()): Promise<Device> {
  const { id: gateway, key } = await server.slices.centre.addGateway(centre, `Gateway ${(made += 1)}`);
  return deviceAt(server.url, key, gateway, now);
}

/** The same with a key at hand. */
export function deviceAt(url: string, key: string, gateway: string, now: () => number): Device {
  const post = async (body: string | Buffer, headers: Record<string, string> = {}): Promise<DeviceAnswer> => {
    const response = await fetch(`${url}/api/ingest/events`, {
      method: 'POST', body: body as BodyInit, headers: { Authorization: `Bearer ${key}`, 'Content-Type': 'application/cloudevents-batch+json', ...headers },
    });
    return { status: response.status, body: (await response.json()) as DeviceAnswer['body'], headers: response.headers };
  };
  const event = ({ type, data = {}, time = now(), id, source = 'test/gateway', sequence }: EventGiven): Record<string, unknown> => {
    const when = typeof time === 'number' ? new Date(time).toISOString() : time;
    const made = new CloudEvent({ type, source, data: data as object, time: when, ...(id === undefined ? {} : { id }), ...(sequence === undefined ? {} : { sequence }) });
    return made.toJSON();
  };
  return {
    key, gateway, event, post,
    send: (given, headers) => post(JSON.stringify(given.map(event)), headers),
    sendOne: (given, headers) => post(JSON.stringify(event(given)), { 'Content-Type': 'application/cloudevents+json', ...headers }),
  };
}
