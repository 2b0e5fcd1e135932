import type { Knex } from 'knex';
import type { Identity, MemberRole, Person } from '#shared/contracts/accounts.ts';
import { hashSecret } from '#server/platform/auth/secrets.ts';
import { fromRowTime } from '#server/platform/db/row-times.ts';
import { fromBinary, toBinary } from '#server/platform/db/uuid.ts';

type Centre = Identity['centres'][number];
type UserRow = { id: Buffer; name: string; email: string; slug: string | null; centre: string; zone: string; cut: number; role: MemberRole; league: Buffer | null };
type LinkRow = { id: Buffer; name: string; seen_at: Date | null; slug: string; centre: string; zone: string; cut: number };
type PersonRow = { id: Buffer; name: string; email: string; role: MemberRole; created_at: Date; league: Buffer | null };

/** Who somebody is, and who belongs to a centre: one query each. */
export function accountReadModel(db: Knex) {
  return {
    async user(id: string): Promise<Identity | null> {
      const rows = await db('user as u')
        .leftJoin('membership as m', 'm.user_id', 'u.id')
        .leftJoin('centre as c', 'c.id', 'm.centre_id')
        .leftJoin('membership_league as l', (join) => join.on('l.centre_id', 'm.centre_id').andOn('l.user_id', 'm.user_id'))
        .where('u.id', toBinary(id))
        .orderBy([{ column: 'c.name' }, { column: 'l.league_id' }])
        .select<UserRow[]>('u.id', 'u.name', 'u.email', 'c.slug', { centre: 'c.name', cut: 'c.cut' }, 'c.zone', 'm.role', { league: 'l.league_id' });
      const [first] = rows;
      return first === undefined ? null : { kind: 'user', id, name: first.name, email: first.email, centres: centresOf(rows) };
    },

    /** A display by its link's token, unless revoked. */
    async display(token: string): Promise<{ identity: Identity; seenAt: number | null } | null> {
      const row = await db('display_link as d')
        .join('centre as c', 'c.id', 'd.centre_id')
        .where('d.token_hash', hashSecret(token))
        .whereNull('d.revoked_at')
        .first<LinkRow | undefined>('d.id', 'd.name', 'd.seen_at', 'c.slug', { centre: 'c.name', cut: 'c.cut' }, 'c.zone');
      if (row === undefined) return null;
      const centre: Centre = { slug: row.slug, name: row.centre, zone: row.zone, cut: row.cut, role: 'display', leagues: [] };
      return { identity: { kind: 'display', id: fromBinary(row.id), name: row.name, email: null, centres: [centre] }, seenAt: fromRowTime(row.seen_at) };
    },

    /** Addresses of those who have one of these roles in a centre. */
    async emails(centre: Buffer, roles: readonly MemberRole[]): Promise<string[]> {
      const rows = await db('membership as m').join('user as u', 'u.id', 'm.user_id').where('m.centre_id', centre).whereIn('m.role', roles).orderBy('u.email').select<{ email: string }[]>('u.email');
      return rows.map((row) => row.email);
    },

    async people(centre: Buffer): Promise<Person[]> {
      const rows = await db('membership as m')
        .join('user as u', 'u.id', 'm.user_id')
        .leftJoin('membership_league as l', (join) => join.on('l.centre_id', 'm.centre_id').andOn('l.user_id', 'm.user_id'))
        .where('m.centre_id', centre)
        .orderBy([{ column: 'u.name' }, { column: 'u.id' }, { column: 'l.league_id' }])
        .select<PersonRow[]>('u.id', 'u.name', 'u.email', 'm.role', 'm.created_at', { league: 'l.league_id' });
      const people = new Map<string, Person>();
      for (const row of rows) {
        const id = fromBinary(row.id);
        const known = people.get(id) ?? { id, name: row.name, email: row.email, role: row.role, leagues: [], since: fromRowTime(row.created_at) };
        if (row.league !== null) known.leagues.push(fromBinary(row.league));
        people.set(id, known);
      }
      return [...people.values()];
    },
  };
}

function centresOf(rows: readonly UserRow[]): Centre[] {
  const centres = new Map<string, Centre>();
  for (const { slug, centre, zone, cut, role, league } of rows) {
    if (slug === null) continue;
    const known = centres.get(slug) ?? { slug, name: centre, zone, cut, role, leagues: [] };
    if (league !== null) known.leagues.push(fromBinary(league));
    centres.set(slug, known);
  }
  return [...centres.values()];
}
