import type { CentreSettings, LaneSettings } from '#shared/contracts/centre.ts';
import { isDate } from '#shared/domain/business-day.ts';
import { type HouseRules, rulesFaults } from '#shared/domain/house-rules.ts';
import type { Topic } from '#shared/realtime/events.ts';
import { conflict, invalid, notFound, Refusal } from '#server/platform/http/refusal.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import type { Decision, Ledger } from '#server/platform/journal/ledger.ts';
import type { Gateways } from './gateways.ts';
import { hashOfKey, newKey } from './keys.ts';
import type { CentreStore } from './store.ts';
import type { GatewayStore } from './store-gateways.ts';

const KEYS_AT_ONCE = 2;

/** Settings are no facts, but they change what is on screen: they go through the same door. */
export function centreCommands({ ledger, store, gatewayRows, gateways, forget }: {
  ledger: Ledger; store: CentreStore; gatewayRows: GatewayStore; gateways: Gateways; forget: () => void;
}) {
  const settle = <R>(centre: CentreRef, decide: (now: number, trx: Parameters<Parameters<Ledger['decide']>[1]>[2]) => Promise<Pick<Decision<R>, 'write'> & { answer: R }>, also: readonly Topic[] = []) =>
    ledger.decide<R>(centre, async (_house, now, trx) => {
      const { write, answer } = await decide(now, trx);
      return { facts: [], write, topics: ['settings', 'floor', ...also], result: () => answer };
    });

  return {
    async save(centre: CentreRef, settings: CentreSettings): Promise<void> {
      await settle(centre, async () => ({ write: (trx) => store.saveSettings(trx, centre.id, settings), answer: null }));
      forget();
    },
    async saveRules(centre: CentreRef, rules: HouseRules): Promise<HouseRules> {
      const faults = rulesFaults(rules).map(({ field, code }) => ({ pointer: `/${field}`, code, params: {} }));
      if (faults.length > 0) throw new Refusal(422, 'rules.contradict', {}, faults);
      await settle(centre, async () => ({ write: (trx) => store.saveRules(trx, centre.id, rules), answer: null }), ['calls', 'sessions', 'runs']);
      forget();
      return rules;
    },
    async lane(centre: CentreRef, number: number, change: Partial<LaneSettings>): Promise<LaneSettings> {
      if (change.certifiedUntil && !isDate(change.certifiedUntil)) throw invalid('date.invalid', '/certifiedUntil');
      return settle(centre, async () => {
        const lane = (await store.lanes(centre.id)).find((l) => l.lane === number);
        if (!lane) throw notFound('lane.unknown', { lane: number });
        const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined));
        const after: LaneSettings = { ...lane, ...given, lane: number };
        return { write: (trx) => store.saveLane(trx, centre.id, after), answer: after };
      });
    },
    async addGateway(centre: CentreRef, name: string): Promise<{ id: string; key: string }> {
      const key = newKey();
      let id = '';
      await settle(centre, async (now) => ({ write: async (trx) => void (id = await gatewayRows.add(trx, centre.id, name, hashOfKey(key), now)), answer: null }));
      gateways.changed(centre);
      return { id, key };
    },
    async addKey(centre: CentreRef, gateway: string): Promise<string> {
      const key = newKey();
      await settle(centre, async (now, trx) => {
        const live = await gatewayRows.lockKeys(trx, centre.id, gateway);
        if (live === null) throw notFound('gateway.unknown');
        if (live >= KEYS_AT_ONCE) throw conflict('gateway.two-keys');
        return { write: (t) => gatewayRows.addKey(t, centre.id, gateway, hashOfKey(key), now), answer: null };
      });
      return key;
    },
    async revoke(centre: CentreRef, gateway: string, key: string): Promise<void> {
      await settle(centre, async (now) => ({
        write: async (trx) => {
          if (!(await gatewayRows.revoke(trx, centre.id, gateway, key, now))) throw notFound('gateway.key-unknown');
        },
        answer: null,
      }));
      gateways.forgetKeys();
    },
  };
}

export type CentreCommands = ReturnType<typeof centreCommands>;
