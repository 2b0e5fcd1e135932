import { centreContracts, type GatewaySettings } from '#shared/contracts/centre.ts';
import { notFound } from '#server/platform/http/refusal.ts';
import { type CentreRef, type Route, serve } from '#server/platform/http/route.ts';
import type { CentreCommands } from './commands.ts';
import { type Gateways, viewOf } from './gateways.ts';
import type { CentreStore } from './store.ts';
import type { GatewayStore } from './store-gateways.ts';

interface Parts {
  commands: CentreCommands;
  store: CentreStore;
  gatewayRows: GatewayStore;
  gateways: Gateways;
}

export function centreRoutes({ commands, store, gatewayRows, gateways }: Parts): Route[] {
  async function gatewaySettings(centre: CentreRef, now: number): Promise<GatewaySettings[]> {
    const [all, keys] = [await gateways.list(centre), await gatewayRows.keys(centre.id)];
    return all.map((gateway) => ({
      ...viewOf(gateway, now), createdAt: gateway.createdAt, queued: gateway.news.queued,
      keys: keys.filter((key) => key.gateway === gateway.id).map(({ id, createdAt }) => ({ id, createdAt })),
    }));
  }
  async function withKey(centre: CentreRef, id: string, key: string, now: number): Promise<{ gateway: GatewaySettings; key: string }> {
    const gateway = (await gatewaySettings(centre, now)).find((g) => g.id === id);
    if (!gateway) throw notFound('gateway.unknown');
    return { gateway, key };
  }
  return [
    serve(centreContracts.settings, async ({ centre, now }) => {
      const { slug, name, zone, cut, lanes: count, rules } = centre;
      const [opening, lanes, all] = [await store.opening(centre.id), await store.lanes(centre.id), await gatewaySettings(centre, now)];
      return { centre: { slug, name, zone, cut, opening, lanes: count }, lanes, gateways: all, rules };
    }),
    serve(centreContracts.save, async ({ centre, body }) => {
      await commands.save(centre, body);
      return { ok: true as const };
    }),
    serve(centreContracts.saveRules, ({ centre, body }) => commands.saveRules(centre, body)),
    serve(centreContracts.lane, ({ centre, params, body }) => commands.lane(centre, params.lane, body)),
    serve(centreContracts.addGateway, async ({ centre, body, now }) => {
      const { id, key } = await commands.addGateway(centre, body.name);
      return withKey(centre, id, key, now);
    }, { secret: true }),
    serve(centreContracts.addKey, async ({ centre, params, now }) => withKey(centre, params.gateway, await commands.addKey(centre, params.gateway), now), { secret: true }),
    serve(centreContracts.revokeKey, async ({ centre, params }) => {
      await commands.revoke(centre, params.gateway, params.key);
      return { ok: true as const };
    }),
  ];
}
