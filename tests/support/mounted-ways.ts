import type { Deps } from '#server/deps.ts';
import { createApp } from '#server/app.ts';
import { compose } from '#server/compose.ts';
import { INGEST_PATH } from '#server/capabilities/ingest/index.ts';

interface Layer {
  route?: { path: string | RegExp; methods: Record<string, boolean>; stack: { method?: string }[] };
}

/** `METHOD path` of everything that the program answers below /api and /d, read from Express itself. */
export function mountedWays(deps: Deps): string[] {
  const whole = compose(deps, null);
  const app = createApp(deps, whole, { ready: () => true });
  const { stack } = (app as unknown as { router: { stack: Layer[] } }).router;
  const ways = stack.flatMap(({ route }) => {
    if (!route || typeof route.path !== 'string' || !/^\/(api|d)\//.test(route.path)) return [];
    // `app.all` answers 405 for the methods that nothing takes; the gateways' door does so itself.
    if (route.path === INGEST_PATH) return [`POST ${route.path}`];
    return route.stack.length > 2 ? [] : [...new Set(route.stack.map(({ method }) => method?.toUpperCase() ?? ''))].map((method) => `${method} ${String(route.path)}`);
  });
  void whole.stop();
  return ways;
}
