import type { Knex } from 'knex';
import type { Centre } from '#server/capabilities/centre/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

let made = 0;
/** A slug that no other test of this database uses. */
export const freshSlug = (): string => `house-${process.pid}-${(made += 1)}-${Math.random().toString(36).slice(2, 8)}`;

export interface CentreGiven {
  lanes?: number;
  zone?: string;
  cut?: number;
  name?: string;
  slug?: string;
  family?: 'free-fall' | 'string';
  certifiedUntil?: string | null;
}

/** A centre of the test's own; what isn't given doesn't matter to the test. */
export const aCentre = (centre: Centre, given: CentreGiven = {}): Promise<CentreRef> =>
  centre.add({ slug: freshSlug(), name: 'Test House', zone: 'UTC', lanes: 8, ...given });

/** Rows of a table that belong to a centre. */
export async function countRows(db: Knex, table: string, centre: CentreRef): Promise<number> {
  const [rows] = (await db.raw('select count(*) as n from ?? where centre_id = ?', [table, centre.id])) as [{ n: number }[]];
  return rows[0]?.n ?? 0;
}

