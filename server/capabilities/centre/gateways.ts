import type * as z from 'zod/mini';
import type { gatewayView } from '#shared/contracts/floor.ts';
import { gatewayText } from '#shared/text/en/centre.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Logger } from '#server/platform/log.ts';
import { clockIsOff, type GatewayNews, isSilent, repeatedOtherwise } from './gateway-news.ts';
import type { GatewayStore, KeyHolder, StoredGateway } from './store-gateways.ts';
import { rememberKeys } from './key-memory.ts';

export type GatewayView = z.infer<typeof gatewayView> & { id: string };

/** News are written this often at most; a crash loses no more than that, and the next event tells them again. */
const WRITE_EVERY_MS = 1_000;

export interface Gateways {
  /** Whose key this is; null: nobody's. */
  holderOf(key: string): Promise<KeyHolder | null>;
  forgetKeys(): void;
  /** Notes what a gateway's request told, besides its events. */
  note(centre: CentreRef, gateway: { id: string; name: string }, change: (news: GatewayNews) => GatewayNews): Promise<void>;
  list(centre: CentreRef): Promise<StoredGateway[]>;
  views(centre: CentreRef, now: number): Promise<GatewayView[]>;
  /** When any gateway of the centre was last heard; null: never. */
  heardAt(centre: CentreRef): Promise<number | null>;
  /** A gateway was added or renamed: read them again. */
  changed(centre: CentreRef): void;
  stop(): Promise<void>;
}

interface Known {
  gateways: Map<string, StoredGateway>;
  unwritten: Set<string>;
}

/** What is known of gateways now, in memory; the database follows within a second. */
export function createGateways(store: GatewayStore, log: Logger): Gateways {
  const centres = new Map<string, Promise<Known>>();
  const keys = rememberKeys(store);
  const idOf = (centre: CentreRef) => centre.id.toString('hex');
  const timer = setInterval(() => void write(), WRITE_EVERY_MS);
  timer.unref();

  async function read(centre: CentreRef, before?: Known): Promise<Known> {
    const rows = await store.list(centre.id);
    const gateways = new Map(rows.map((row) => [row.id, { ...row, news: before?.gateways.get(row.id)?.news ?? row.news }]));
    return { gateways, unwritten: before?.unwritten ?? new Set() };
  }

  function known(centre: CentreRef): Promise<Known> {
    const id = idOf(centre);
    const there = centres.get(id) ?? read(centre);
    centres.set(id, there);
    // What couldn't be read is asked for again.
    there.catch(() => centres.delete(id));
    return there;
  }

  async function write(): Promise<void> {
    for (const [id, promise] of centres) {
      const centre = await promise.catch(() => null);
      for (const gateway of centre?.unwritten ?? []) {
        centre?.unwritten.delete(gateway);
        const news = centre?.gateways.get(gateway)?.news;
        if (news) await store.saveNews(Buffer.from(id, 'hex'), gateway, news).catch((error: unknown) => {
          centre.unwritten.add(gateway);
          log.debug({ err: error }, 'news of a gateway wait to be written');
        });
      }
    }
  }

  return {
    holderOf: keys.holderOf,
    forgetKeys: keys.forget,
    async note(centre, { id }, change) {
      const { gateways, unwritten } = await known(centre);
      const gateway = gateways.get(id);
      if (!gateway) return void centres.delete(idOf(centre));
      gateways.set(id, { ...gateway, news: change(gateway.news) });
      unwritten.add(id);
    },
    list: async (centre) => [...(await known(centre)).gateways.values()],
    views: async (centre, now) => [...(await known(centre)).gateways.values()].map((gateway) => viewOf(gateway, now)),
    async heardAt(centre) {
      const times = [...(await known(centre)).gateways.values()].flatMap((gateway) => gateway.news.heardAt ?? []);
      return times.length > 0 ? Math.max(...times) : null;
    },
    changed(centre) {
      const before = centres.get(idOf(centre));
      if (before) centres.set(idOf(centre), before.then((there) => read(centre, there)));
    },
    async stop() {
      clearInterval(timer);
      await write();
    },
  };
}

export function viewOf({ id, name, news }: StoredGateway, now: number): GatewayView {
  const ranges = Object.values(news.sequences).flatMap((sequence) => sequence.missing);
  const faults = [
    ...(clockIsOff(news) ? [gatewayText.clock(news.clockErrorMs ?? 0)] : []),
    ...(repeatedOtherwise(news, now) ? [gatewayText.changedRepeats(news.changedRepeats)] : []),
  ];
  return {
    id, name, heardAt: news.heardAt, silent: isSilent(news, now), clockErrorMs: news.clockErrorMs,
    missing: ranges.length > 0 ? gatewayText.missing(ranges) : null, faults,
  };
}
