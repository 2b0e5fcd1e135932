import { join } from 'node:path';
import { businessDayAt } from '../../../src/shared/domain/business-day.ts';
import type { DeviceEvent } from './events.ts';
import { nightEvents } from './night.ts';
import type { DemoPlan } from './plan-file.ts';
import { type Line, pause, sendAll } from './sender.ts';
import { openSpool, type Spool } from './spool.ts';

const DAY_MS = 86_400_000;
const HEARTBEAT_MS = 30_000;
const TICK_MS = 500;
const REPLAY_TICK_MS = 100;
/** Counter readings of the past every quarter of an hour, from a quarter of an hour before the start nearly every ball. */
export const grainFrom = (fineFrom: number) => (instant: number): number => (instant < fineFrom ? 900 : 8);

export interface Tonight {
  plan: DemoPlan;
  url: string;
  dataDir: string;
  /** Aborted: end soon; what waits stays on disk. */
  stop: AbortSignal;
}

/** The night of an instant as the house will live it; the first one is anchored to the first start. */
export function nightAt(plan: DemoPlan, instant: number, seed = plan.seed): { events: DeviceEvent[]; to: number; from: number } {
  const day = businessDayAt(instant, plan.zone);
  const index = Math.round((Date.parse(day.date) - Date.parse(plan.firstDate)) / DAY_MS);
  const first = day.date === plan.firstDate;
  const fineFrom = first ? plan.anchorAt - 15 * 60_000 : day.from + 13 * 3_600_000;
  const events = nightEvents({ seed, date: day.date, zone: plan.zone, index }, grainFrom(fineFrom), first ? { at: plan.anchorAt } : null);
  return { events, from: day.from, to: day.to };
}

/** Lives on: tells what has happened since it last told, then goes on as time goes on, night after night. */
export async function live(tonight: Tonight): Promise<void> {
  const { plan } = tonight;
  await Promise.all(plan.gateways.map((gateway) => liveOf(tonight, gateway)));
}

async function liveOf({ plan, url, dataDir, stop }: Tonight, gateway: DemoPlan['gateways'][number]): Promise<void> {
  const line: Line = { url, key: gateway.key, skewMs: gateway.skewMs };
  let night = nightAt(plan, Date.now());
  // What happened before the first start has been told when the house was made.
  const spool = openSpool(join(dataDir, 'gateway', `${gateway.source.split(':').at(-1)}.json`), Math.max(night.from, plan.anchorAt));
  const boot = Date.now();
  let heartbeat = 0;
  spool.take([own(gateway.source, boot, 'gateway.started', { queued: spool.size, uptimeS: 0 })], spool.until);
  while (!stop.aborted) {
    const now = Date.now();
    if (now >= night.to) night = nightAt(plan, now);
    const due = night.events.filter((e) => e.source === gateway.source && e.time > spool.until && e.time <= now);
    const beat = now - heartbeat >= HEARTBEAT_MS;
    if (beat) heartbeat = now;
    const told = beat ? [...due, own(gateway.source, now, 'gateway.heartbeat', { queued: spool.size, uptimeS: Math.round((now - boot) / 1000) })] : due;
    if (told.length > 0) spool.take(told, now);
    await sendAll(spool, line, stop);
    await pause(TICK_MS, stop);
  }
}

const own = (source: string, time: number, type: 'gateway.started' | 'gateway.heartbeat', data: { queued: number; uptimeS: number }): DeviceEvent =>
  ({ source, id: `${type}-${time}`, time, type, data });

/** One night again, at `speed` times its pace, from an instant on; stops at now. The same seed sends the same events. */
export async function replay({ plan, url, dataDir, stop }: Tonight, options: { seed: number; speed: number; from: number }): Promise<number> {
  const night = nightAt(plan, options.from, options.seed);
  const begun = Date.now();
  const spools = new Map<string, Spool>();
  const reached = () => Math.min(Date.now(), options.from + (Date.now() - begun) * options.speed);
  let sent = 0;
  for (let until = options.from - 1; until < Math.min(Date.now(), night.to) && !stop.aborted; ) {
    const now = Math.min(reached(), night.to);
    for (const gateway of plan.gateways) {
      const spool = spools.get(gateway.source) ?? openSpool(join(dataDir, 'gateway', `replay-${options.seed}-${gateway.source.split(':').at(-1)}-${begun}.json`), options.from);
      spools.set(gateway.source, spool);
      const due = night.events.filter((e) => e.source === gateway.source && e.time > until && e.time <= now).map((e) => ({ ...e, id: `${e.id}~${options.seed}` }));
      if (due.length > 0) spool.take(due, now);
      sent += due.length;
      await sendAll(spool, { url, key: gateway.key, skewMs: gateway.skewMs }, stop);
    }
    until = now;
    await pause(REPLAY_TICK_MS, stop);
  }
  return sent;
}
