import { describe, expect, it } from 'vitest';
import { addDays } from '#shared/domain/business-day.ts';
import { funnel } from '#shared/domain/numbers/funnel.ts';
import { cloudEvent, type DeviceEvent } from './events.ts';
import { HOUSE } from './invented-house.ts';
import { nightEvents } from './night.ts';
import { grainFrom } from './player.ts';

const ZONE = 'Europe/Berlin';
const SEED = 1;
const past = grainFrom(Infinity);
const eightWeeks = (today: string): DeviceEvent[] =>
  Array.from({ length: 56 }, (_, i) => nightEvents({ seed: SEED, date: addDays(today, i - 56), zone: ZONE, index: i - 56 }, past, null)).flat();

function lanesOf(events: readonly DeviceEvent[]): { lane: number; count: number; frames: number }[] {
  return Array.from({ length: HOUSE.lanes }, (_, i) => ({
    lane: i + 1,
    count: events.filter((e) => e.type === 'pinsetter.stopped' && e.data.lane === i + 1 && e.data.reason === 'fault').length,
    frames: events.reduce((sum, e) => (e.type === 'lane.counted' && e.data.lane === i + 1 ? sum + (e.data.frames ?? 0) : sum), 0),
  }));
}

describe('the invented house', () => {
  it.each(['2026-12-01', '2026-12-02', '2026-12-03', '2026-12-04', '2026-12-05', '2026-12-06', '2026-12-07'])(
    'has one lane, and only one, outside what chance allows over the eight weeks before %s',
    (today) => {
      const result = funnel(lanesOf(eightWeeks(today)));
      if (!('lanes' in result)) throw new Error(result.reason);
      expect(result.lanes.filter((l) => l.position === 'above-outer' || l.position === 'below-outer').map((l) => l.lane)).toEqual([9]);
    },
    60_000,
  );

  it('tells the same night twice, in order of time, each event by its own name', () => {
    const key = { seed: 7, date: '2026-05-14', zone: ZONE, index: 3 };
    const once = nightEvents(key, past, null);
    expect(nightEvents(key, past, null)).toEqual(once);
    expect(new Set(once.map((e) => `${e.source} ${e.id}`)).size).toBe(once.length);
    expect(once.every((e, i) => i === 0 || (once[i - 1]?.time ?? 0) <= e.time)).toBe(true);
    expect(nightEvents({ ...key, seed: 8 }, past, null)).not.toEqual(once);
  });

  it('counts the same frames whatever the grain', () => {
    const key = { seed: 7, date: '2026-05-14', zone: ZONE, index: 3 };
    const frames = (grain: (at: number) => number) => lanesOf(nightEvents(key, grain, null)).map((l) => l.frames);
    expect(frames(() => 25)).toEqual(frames(past));
  });

  it('shows a newcomer a stop, a machine at work and counting within two minutes of the first start', () => {
    const at = Date.parse('2026-05-14T16:45:00Z');
    const soon = nightEvents({ seed: SEED, date: '2026-05-14', zone: ZONE, index: 0 }, grainFrom(at - 900_000), { at }).filter((e) => e.time > at && e.time <= at + 120_000);
    const types = soon.map((e) => e.type);
    expect(types).toContain('pinsetter.stopped');
    expect(types).toContain('run.lane.dressed');
    expect(types.filter((t) => t === 'lane.counted').length).toBeGreaterThan(5);
  });

  it('puts a clock that is off on the wire, and instants as RFC 3339', () => {
    const event: DeviceEvent = { source: 's', id: 'i', time: 0, type: 'lane.opened', data: { lane: 1, until: 60_000 } };
    expect(cloudEvent(event, 5, 1000)).toMatchObject({ specversion: '1.0', time: '1970-01-01T00:00:01.000Z', sequence: '5', data: { until: '1970-01-01T00:01:01.000Z' } });
  });
});
