import { hashOfKey } from './keys.ts';
import type { GatewayStore, KeyHolder } from './store-gateways.ts';

/** A key that was revoked by another process is refused after this long; one revoked here, at once. */
const TRUST_MS = 1_000;
const REMEMBERED = 1_000;

/** Whose keys are whose, so that not every event asks the database. */
export function rememberKeys(store: Pick<GatewayStore, 'byKey'>) {
  const keys = new Map<string, { until: number; holder: KeyHolder | null }>();
  let forgotten = 0;
  return {
    async holderOf(key: string): Promise<KeyHolder | null> {
      const hash = hashOfKey(key);
      const id = hash.toString('base64');
      const there = keys.get(id);
      if (there && performance.now() < there.until) return there.holder;
      const asked = forgotten;
      const holder = await store.byKey(hash);
      // Revoked while the database was asked: what it said may be older.
      if (asked !== forgotten) return store.byKey(hash);
      if (keys.size >= REMEMBERED) keys.clear();
      keys.set(id, { until: performance.now() + TRUST_MS, holder });
      return holder;
    },
    forget(): void {
      forgotten += 1;
      keys.clear();
    },
  };
}
