import type { Knex } from 'knex';
import type { FloorDelta } from '#shared/contracts/floor.ts';
import { roomName, type Topic } from '#shared/realtime/events.ts';
import type { Clock } from '../clock.ts';
import type { CentreRef } from '../http/route.ts';
import { readHead, readOutbox, sweepOutbox, type Touched } from '../journal/head-store.ts';
import type { Logger } from '../log.ts';
import type { Hub } from './hub.ts';

const TICK_MS = 100;
const HEARTBEAT_MS = 2_000;
/** Told rows stay a little, so that another node's relay reads them too. */
const TOLD_KEPT_MS = 10_000;
/** What a secretary's page rests on. */
const LEAGUE_TOPICS: readonly Topic[] = ['leagues', 'sessions'];

export interface RelayDeps {
  db: Knex;
  clock: Clock;
  log: Logger;
  centreBySlug: (slug: string) => Promise<CentreRef | null>;
  /** Ids of a centre's leagues: their rooms get hints about sessions. */
  leaguesOf: (centre: CentreRef) => Promise<readonly string[]>;
  /** What of the floor changed, as it is now: absolute values. */
  floorDelta: (centre: CentreRef, touched: Touched) => Promise<Partial<FloorDelta>>;
  gatewaysHeardAt: (centre: CentreRef) => Promise<number | null>;
}

/** Where the board of a centre stands: the last number that was told. */
interface Told {
  epoch: string;
  seq: number;
  heardAt: number | null;
}

export interface Relay {
  stop(): Promise<void>;
}

/**
 * Tells the screens of each watched centre what the outbox says was touched: every 100 ms, all that came since in one message, with
 * the present truth of the rows. The heartbeat goes out whether or not the database answers; it says which.
 */
export function startRelay(hub: Hub, deps: RelayDeps): Relay {
  const told = new Map<string, Told>();
  let database: 'ok' | 'away' = 'ok';
  let nextBeat = 0;
  let nextSweep = 0;
  let running: Promise<void> | null = null;
  let began = 0;

  async function tick(): Promise<void> {
    const slugs = hub.watched();
    for (const slug of told.keys()) if (!slugs.has(slug)) told.delete(slug);
    try {
      for (const slug of slugs) await tell(hub, deps, told, slug);
      if (performance.now() >= nextSweep) {
        nextSweep = performance.now() + TOLD_KEPT_MS;
        await sweepOutbox(deps.db, deps.clock.now() - TOLD_KEPT_MS);
      }
      database = 'ok';
    } catch (error) {
      if (database === 'ok') deps.log.warn({ err: error }, 'the relay waits');
      database = 'away';
    }
  }

  function beat(): void {
    if (performance.now() < nextBeat) return;
    nextBeat = performance.now() + HEARTBEAT_MS;
    for (const [slug, { epoch, seq, heardAt }] of told) {
      hub.emit(roomName('floor', slug), 'heartbeat', { epoch, seq, at: deps.clock.now(), database, gatewaysHeardAt: heardAt });
    }
  }

  const timer = setInterval(() => {
    if (!running) {
      began = performance.now();
      running = tick().finally(() => (running = null));
      // A tick that hangs on a frozen database must not hold the heartbeat that tells of it.
    } else if (performance.now() - began > HEARTBEAT_MS) database = 'away';
    beat();
  }, TICK_MS);
  return {
    async stop() {
      clearInterval(timer);
      await running;
    },
  };
}

/** One centre: where its board stands is remembered from the moment somebody watches. */
async function tell(hub: Hub, deps: RelayDeps, told: Map<string, Told>, slug: string): Promise<void> {
  const centre = await deps.centreBySlug(slug);
  if (!centre) return;
  const head = await readHead(deps.db, centre);
  const before = told.get(slug);
  const heardAt = await deps.gatewaysHeardAt(centre);
  if (!before || before.epoch !== head.epoch) {
    told.set(slug, { epoch: head.epoch, seq: head.seq, heardAt });
    if (before) hub.emit(roomName('floor', slug), 'resync', { reason: 'epoch' });
    return;
  }
  before.heardAt = heardAt;
  const rows = head.seq === before.seq ? [] : await readOutbox(deps.db, centre.id, before.seq);
  const last = rows.at(-1);
  if (!last) return;
  const touched: Touched = { lanes: [...new Set(rows.flatMap((row) => row.lanes))], topics: [...new Set(rows.flatMap((row) => row.topics))] };
  const delta = await deps.floorDelta(centre, touched);
  hub.emit(roomName('floor', slug), 'floor.delta', { ...delta, epoch: head.epoch, prevSeq: before.seq, seq: last.seq, at: deps.clock.now() });
  before.seq = last.seq;
  await hint(hub, deps, centre, { seq: last.seq, topics: touched.topics });
}

async function hint(hub: Hub, deps: RelayDeps, centre: CentreRef, { seq, topics }: { seq: number; topics: Topic[] }): Promise<void> {
  hub.emit(roomName('staff', centre.slug), 'hint', { seq, topics });
  const ofLeagues = topics.filter((topic) => LEAGUE_TOPICS.includes(topic));
  if (ofLeagues.length === 0) return;
  for (const league of await deps.leaguesOf(centre)) hub.emit(roomName('league', centre.slug, league), 'hint', { seq, topics: ofLeagues });
}
