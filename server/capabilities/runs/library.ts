import type { Database } from '#server/platform/db/database.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { machinesOf, patternsOf, revisionsOf, type Machine, type Pattern, type Revision } from './store.ts';

/** A centre's patterns and machines: small, read often, changed seldom. */
export interface Library {
  patterns: Pattern[];
  revisions: Revision[];
  machines: Machine[];
}

const TRUST_MS = 2_000;

/** Remembers each centre's library for two seconds, or until this process changes it. */
export function createLibraries(db: Database) {
  const kept = new Map<string, { until: number; read: Promise<Library> }>();
  const load = async (id: Buffer): Promise<Library> => {
    const [patterns, revisions, machines] = await Promise.all([patternsOf(db, id), revisionsOf(db, id), machinesOf(db, id)]);
    return { patterns, revisions, machines };
  };
  return {
    async of(centre: CentreRef): Promise<Library> {
      const before = kept.get(centre.slug);
      if (before && performance.now() < before.until) return before.read;
      const read = load(centre.id);
      kept.set(centre.slug, { until: performance.now() + TRUST_MS, read });
      read.catch(() => kept.delete(centre.slug));
      return read;
    },
    forget: (centre: CentreRef): void => { kept.delete(centre.slug); },
  };
}

/** A revision of a pattern; without a number the newest. */
export function revisionIn(library: Library, code: string, revision: number | null): Revision | undefined {
  const all = library.revisions.filter((r) => r.code === code);
  return revision === null ? all.at(-1) : all.find((r) => r.revision === revision);
}
