import { weekdayOf } from '#shared/domain/business-day.ts';
import type { Person } from '#shared/domain/journal/fact.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { cloudEvent, type DeviceEvent } from '../../server/fakes/gateway/events.ts';
import { leaguesOn, WARM_UP_MINUTES } from '../../server/fakes/gateway/invented-house.ts';
import { type NightKey, wallInstant, words } from '../../server/fakes/gateway/timetable.ts';
import type { DemoDoors } from './doors.ts';

const AT_ONCE = 900;
/** The watch looks so long before a warm-up for the last time, and at it freezes what it saw. */
const LAST_LOOK_MS = 1000;
/** Loading waits for a busy machine: nobody looks on yet. */
const PATIENCE = { deadlineMs: 60_000 };

export interface Told {
  night: NightKey;
  events: readonly DeviceEvent[];
  /** The night up to here. */
  until: number;
}

export interface Gateways {
  [source: string]: { id: string; name: string };
}

/** Tells one night through the same door as every gateway, with the mechanics' answers, and the look at readiness as each league warms up. */
export async function tellNight(doors: DemoDoors, centre: CentreRef, gateways: Gateways, mechanics: readonly Person[], told: Told): Promise<void> {
  const { night, until } = told;
  const warmUps = leaguesOn(weekdayOf(night.date)).map((l) => wallInstant(night, l.start - WARM_UP_MINUTES));
  const looks = warmUps.flatMap((at) => [at - LAST_LOOK_MS, at]);
  const moments = [...new Set([...looks.filter((at) => at < until), until])].sort((a, b) => a - b);
  let from = -Infinity;
  for (const at of moments) {
    await send(doors, centre, gateways, told.events.filter((e) => e.time > from && e.time <= at), at);
    await doors.answer(centre, at, mechanics, words(night));
    if (at !== until) await doors.readiness.watch(centre, at, { mail: false });
    from = at;
  }
}

async function send(doors: DemoDoors, centre: CentreRef, gateways: Gateways, events: readonly DeviceEvent[], until: number): Promise<void> {
  for (const [source, gateway] of Object.entries(gateways)) {
    const mine = events.filter((e) => e.source === source);
    for (let i = 0; i < mine.length; i += AT_ONCE) {
      const some = mine.slice(i, i + AT_ONCE);
      const receivedAt = Math.max(some.at(-1)?.time ?? until, 0);
      const answer = await doors.ingest.ingest({ from: { gateway, centre }, elements: some.map((e) => cloudEvent(e, null)), receivedAt, gatewayTime: null }, PATIENCE);
      const refused = answer.setAside[0];
      if (refused) throw new Error(`the demo's own event ${refused.id} was set aside: ${refused.reason}`);
    }
  }
}
