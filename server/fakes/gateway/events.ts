import type { DeviceData } from '../../../src/shared/domain/journal/fact.ts';

export type DeviceType = keyof DeviceData;

/** A device event before it is put on the wire: `time` is true time in epoch ms. */
export type DeviceEvent = { [T in DeviceType]: { source: string; id: string; time: number; type: T; data: DeviceData[T] } }[DeviceType];

/** Names the events of one teller: `<night>-<what>-<n>`, unique for ever and the same at every replay. */
export function teller(source: string, prefix: string): <T extends DeviceType>(time: number, type: T, data: DeviceData[T]) => DeviceEvent {
  let n = 0;
  return (time, type, data) => {
    n += 1;
    return { source, id: `${prefix}-${n}`, time: Math.round(time), type, data } as DeviceEvent;
  };
}

const INSTANTS = new Set(['until', 'startedAt', 'finishedAt']);

/** CloudEvents 1.0 (JSON format §3) of an event, by a clock that is `skewMs` ahead of true time. */
export function cloudEvent(event: DeviceEvent, sequence: number | null, skewMs = 0): Record<string, unknown> {
  const stamp = (ms: number): string => new Date(ms + skewMs).toISOString();
  const data = Object.fromEntries(Object.entries(event.data).map(([key, value]) => [key, INSTANTS.has(key) ? stamp(Number(value)) : value]));
  return {
    specversion: '1.0', id: event.id, source: event.source, type: event.type, time: stamp(event.time), datacontenttype: 'application/json',
    ...(sequence === null ? {} : { sequence: String(sequence) }), data,
  };
}
