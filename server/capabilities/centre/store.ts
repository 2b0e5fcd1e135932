import type { Knex } from 'knex';
import type { CentreSettings, LaneSettings, OpeningHours } from '#shared/contracts/centre.ts';
import { type HouseRules, USUAL_RULES } from '#shared/domain/house-rules.ts';
import { newId, toBinary } from '#server/platform/db/uuid.ts';
import type { CentreRef } from '#server/platform/http/route.ts';
import { openJournal } from '#server/platform/journal/head-store.ts';

interface CentreRow {
  id: Buffer;
  slug: string;
  name: string;
  zone: string;
  cut: number;
  lanes: number;
  opening: OpeningHours;
  rules: Partial<HouseRules> | null;
}

interface LaneRow {
  lane: number;
  family: LaneSettings['family'];
  certified_until: string | null;
  stop_coverage: LaneSettings['stopCoverage'];
}

export interface NewCentre extends CentreSettings {
  slug: string;
  lanes: number;
  family: LaneSettings['family'];
  certifiedUntil: string | null;
}

export type CentreColumns = Pick<CentreRow, 'id' | 'slug' | 'name' | 'zone' | 'cut' | 'lanes' | 'rules'>;
export const refOf = ({ id, slug, name, zone, cut, lanes, rules }: CentreColumns): CentreRef => ({ id, slug, name, zone, cut, lanes, rules: { ...USUAL_RULES, ...rules } });
const laneOf = (row: LaneRow): LaneSettings => ({ lane: row.lane, family: row.family, certifiedUntil: row.certified_until, stopCoverage: row.stop_coverage });

export function centreStore(db: Knex) {
  return {
    async bySlug(slug: string): Promise<CentreRef | null> {
      const row = (await db('centre').where({ slug }).first()) as CentreRow | undefined;
      return row ? refOf(row) : null;
    },
    async all(): Promise<CentreRef[]> {
      const rows = (await db('centre').orderBy('id')) as CentreRow[];
      return rows.map(refOf);
    },
    async opening(centre: Buffer): Promise<OpeningHours> {
      const row = await db('centre').where({ id: centre }).first<Pick<CentreRow, 'opening'>>('opening');
      return row.opening;
    },
    async lanes(centre: Buffer): Promise<LaneSettings[]> {
      const rows = (await db('lane').where({ centre_id: centre }).orderBy('lane')) as LaneRow[];
      return rows.map(laneOf);
    },
    /** A centre with its lanes and an open journal, all or nothing. */
    async add(given: NewCentre, now: number): Promise<CentreRef> {
      const id = toBinary(newId());
      const { slug, name, zone, cut, lanes, opening } = given;
      await db.transaction(async (trx) => {
        await trx('centre').insert({ id, slug, name, zone, cut, lanes, opening: JSON.stringify(opening), created_at: new Date(now) });
        const rows = Array.from({ length: lanes }, (_, i) => ({
          centre_id: id, lane: i + 1, family: given.family, certified_until: given.certifiedUntil, stop_coverage: 'heard',
        }));
        await trx('lane').insert(rows);
        await openJournal(trx, id);
      });
      return { id, slug, name, zone, cut, lanes, rules: USUAL_RULES };
    },
    async saveSettings(trx: Knex, centre: Buffer, { name, zone, cut, opening }: CentreSettings): Promise<void> {
      await trx('centre').where({ id: centre }).update({ name, zone, cut, opening: JSON.stringify(opening) });
    },
    async saveRules(trx: Knex, centre: Buffer, rules: HouseRules): Promise<void> {
      await trx('centre').where({ id: centre }).update({ rules: JSON.stringify(rules) });
    },
    async saveLane(trx: Knex, centre: Buffer, lane: LaneSettings): Promise<void> {
      const change = { family: lane.family, certified_until: lane.certifiedUntil, stop_coverage: lane.stopCoverage };
      await trx('lane').where({ centre_id: centre, lane: lane.lane }).update(change);
    },
  };
}

export type CentreStore = ReturnType<typeof centreStore>;
