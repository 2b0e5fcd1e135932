import type { Knex } from 'knex';
import type { DisplayLink } from '#shared/contracts/accounts.ts';
import { fromRowTime, toRowTime } from '#server/platform/db/row-times.ts';
import { unitOfWork } from '#server/platform/db/unit-of-work.ts';
import { fromBinary, newId, toBinary } from '#server/platform/db/uuid.ts';
import { hashSecret, newToken } from '#server/platform/auth/secrets.ts';

type Row = { centre_id: Buffer; id: Buffer; name: string; token_hash: Buffer; created_at: Date; created_by: string; seen_at: Date | null; revoked_at: Date | null };

/** Links that open the wall; a token is kept as its SHA-256 only. */
export function displayStore(db: Knex) {
  const live = (at: Knex) => at<Row>('display_link').whereNull('revoked_at');
  return {
    async list(centre: Buffer): Promise<DisplayLink[]> {
      return (await live(db).where('centre_id', centre).orderBy('id')).map(linkOf);
    },
    /** The token is in this answer and nowhere else. */
    add: (centre: Buffer, name: string, by: string, now: number): Promise<{ display: DisplayLink; token: string }> =>
      unitOfWork(db, async (trx) => {
        const token = newToken();
        const row: Row = {
          centre_id: centre, id: toBinary(newId(now)), name, token_hash: hashSecret(token), created_at: new Date(now), created_by: by, seen_at: null, revoked_at: null,
        };
        await trx<Row>('display_link').insert(row);
        return { display: linkOf(row), token };
      }),
    /** False: no such link in this centre, or revoked before. */
    revoke: (centre: Buffer, id: string, now: number): Promise<boolean> =>
      unitOfWork(db, async (trx) => (await live(trx).where({ centre_id: centre, id: toBinary(id) }).update({ revoked_at: toRowTime(now) })) > 0),
    async saw(id: string, now: number): Promise<void> {
      await db<Row>('display_link').where('id', toBinary(id)).update({ seen_at: toRowTime(now) });
    },
  };
}

const linkOf = (row: Row): DisplayLink => ({
  id: fromBinary(row.id), name: row.name, createdAt: fromRowTime(row.created_at), createdBy: row.created_by, seenAt: fromRowTime(row.seen_at),
});
