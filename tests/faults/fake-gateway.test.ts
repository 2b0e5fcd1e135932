import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, describe, expect, it } from 'vitest';
import { businessDayAt } from '#shared/domain/business-day.ts';
import { systemClock } from '#server/platform/clock.ts';
import { aCentre } from '#tests/support/builders.ts';
import { eveningZone } from '#tests/support/league-evening.ts';
import { served } from '#tests/support/served.ts';
import { HOUSE, SOURCES } from '../../server/fakes/gateway/invented-house.ts';
import type { DemoPlan } from '../../server/fakes/gateway/plan-file.ts';
import { live, nightAt, replay } from '../../server/fakes/gateway/player.ts';
import { sendAll } from '../../server/fakes/gateway/sender.ts';
import { openSpool } from '../../server/fakes/gateway/spool.ts';

const { server, database } = await served({ clock: systemClock, ingestRate: { perSecond: 1e6, burst: 1e6 } });
const dataDir = mkdtempSync(join(tmpdir(), 'lanewright-gateway-'));
let between: Server | null = null;
afterEach(() => void between?.close());
afterAll(() => rmSync(dataDir, { recursive: true, force: true }));

/** A house for the gateways, with a key each. */
async function plan(zone = 'UTC', first: Pick<DemoPlan, 'firstDate' | 'anchorAt'> = { firstDate: '2020-01-01', anchorAt: 0 }): Promise<{ plan: DemoPlan; centreId: Buffer }> {
  const centre = await aCentre(server.slices.centre, { lanes: HOUSE.lanes, zone, family: 'free-fall' });
  const { key } = await server.slices.centre.addGateway(centre, 'Back room');
  const { key: second } = await server.slices.centre.addGateway(centre, 'Lane machines');
  const gateways = [{ source: SOURCES.backRoom, key, skewMs: 0 }, { source: SOURCES.laneCare, key: second, skewMs: 0 }];
  return { plan: { centre: centre.slug, zone, seed: 1, ...first, gateways }, centreId: centre.id };
}

const told = async (centreId: Buffer): Promise<string[]> =>
  (await database.db('journal').where({ centre_id: centreId }).orderBy(['source', 'id']).select<{ source: string; id: string; data: string | null }[]>('source', 'id', 'data')).map((row) => `${row.source} ${row.id} ${String(row.data)}`);

const from = (): number => businessDayAt(Date.now() - 86_400_000, 'UTC').from + 17.5 * 3_600_000;
const go = async (one: DemoPlan, url: string, seed: number): Promise<number> => replay({ plan: one, url, dataDir, stop: new AbortController().signal }, { seed, speed: 1e9, from: from() });

describe('the fake gateway', () => {
  it('tells the same night for the same seed, another for another, and nothing that hasn’t happened', async () => {
    const [a, b, c] = [await plan(), await plan(), await plan()];
    const sent = [await go(a.plan, server.url, 7), await go(b.plan, server.url, 7), await go(c.plan, server.url, 8)];
    const nights = [await told(a.centreId), await told(b.centreId), await told(c.centreId)];
    expect(nights[0]?.length).toBe(sent[0]);
    expect(sent[0]).toBeGreaterThan(200);
    expect(nights[1]).toEqual(nights[0]);
    expect(nights[2]).not.toEqual(nights[0]);
    const [{ late }] = (await database.db('journal').where({ centre_id: a.centreId }).where('time_at', '>', new Date()).count({ late: '*' })) as [{ late: number }];
    expect(late).toBe(0);
  });

  it('tells nothing again of what was told when its house was made', async () => {
    const [now, zone] = [Date.now(), eveningZone(Date.now())];
    const { plan: one, centreId } = await plan(zone, { firstDate: businessDayAt(now, zone).date, anchorAt: now });
    expect(nightAt(one, now).events.filter((event) => event.time <= now).length).toBeGreaterThan(100);
    await live({ plan: one, url: server.url, dataDir: join(dataDir, 'first'), stop: AbortSignal.timeout(1_500) });
    const times = await database.db('journal').where({ centre_id: centreId }).pluck<Date[]>('time_at');
    expect(times.length).toBeGreaterThan(0);
    expect(Math.min(...times.map(Number))).toBeGreaterThanOrEqual(now);
  });

  it('keeps on disk what nobody has acknowledged, also across its own end, and sends it once when somebody listens', async () => {
    const { plan: one, centreId } = await plan();
    const file = join(dataDir, 'gateway', 'away.json');
    const [gateway] = one.gateways;
    const events = Array.from({ length: 5 }, (_, i) => ({ source: gateway!.source, id: `kept-${i}`, time: Date.now() - 1000, type: 'lane.counted' as const, data: { lane: 1, deliveries: 1 } }));
    openSpool(file, 0).take(events, Date.now());
    // Somebody listens but dies before answering: the events may have arrived or not.
    between = createServer((request) => request.socket.destroy()).listen(0, '127.0.0.1');
    await new Promise((done) => between?.once('listening', done));
    const stop = new AbortController();
    setTimeout(() => stop.abort(), 300);
    await sendAll(openSpool(file, 0), { url: `http://127.0.0.1:${(between.address() as AddressInfo).port}`, key: gateway!.key, skewMs: 0 }, stop.signal);
    expect((JSON.parse(readFileSync(file, 'utf8')) as { waiting: unknown[] }).waiting).toHaveLength(5);
    const again = openSpool(file, 0);
    await sendAll(again, { url: server.url, key: gateway!.key, skewMs: 0 }, new AbortController().signal);
    expect(again.size).toBe(0);
    expect(await told(centreId)).toHaveLength(5);
    expect(readdirSync(join(dataDir, 'gateway')).filter((name) => name.endsWith('.new'))).toEqual([]);
  });
});
