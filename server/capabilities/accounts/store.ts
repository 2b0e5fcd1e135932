import type { Knex } from 'knex';
import type { MemberRole } from '#shared/contracts/accounts.ts';
import { isDuplicate } from '#server/platform/db/errors.ts';
import { toRowTime } from '#server/platform/db/row-times.ts';
import { unitOfWork } from '#server/platform/db/unit-of-work.ts';
import { fromBinary, newId, toBinary } from '#server/platform/db/uuid.ts';
import { conflict, notFound } from '#server/platform/http/refusal.ts';

export interface Place {
  role: MemberRole;
  leagues: readonly string[];
}

/** An account with what is needed to judge a password. */
export interface Account {
  id: string;
  name: string;
  email: string;
  passwordHash: string;
}

type UserRow = { id: Buffer; email: string; name: string; password_hash: string; created_at: Date };
type MembershipRow = { centre_id: Buffer; user_id: Buffer; role: MemberRole; created_at: Date };

/** Writes accounts and memberships. Every change is one unit of work. */
export function accountStore(db: Knex) {
  const accountOf = (row: UserRow | undefined): Account | null =>
    row === undefined ? null : { id: fromBinary(row.id), name: row.name, email: row.email, passwordHash: row.password_hash };

  /** The account of this address, made where there is none. */
  async function accountFor(trx: Knex.Transaction, given: { name: string; email: string; passwordHash: string }, now: number): Promise<{ id: string; made: boolean }> {
    const known = accountOf(await trx<UserRow>('user').where('email', given.email).forUpdate().first());
    if (known !== null) return { id: known.id, made: false };
    const id = newId(now);
    await trx<UserRow>('user').insert({ id: toBinary(id), email: given.email, name: given.name, password_hash: given.passwordHash, created_at: toRowTime(now) });
    return { id, made: true };
  }

  return {
    byEmail: async (email: string): Promise<Account | null> => accountOf(await db<UserRow>('user').where('email', email).first()),
    byId: async (id: string): Promise<Account | null> => accountOf(await db<UserRow>('user').where('id', toBinary(id)).first()),

    /** A new account without a centre; 409 `person.email-taken`. */
    create: (given: { name: string; email: string; passwordHash: string }, now: number): Promise<string> =>
      unitOfWork(db, async (trx) => {
        const { id, made } = await accountFor(trx, given, now);
        if (!made) throw conflict('person.email-taken');
        return id;
      }, { repeatOnDuplicate: ['user_email'] }),

    setPassword: (id: string, passwordHash: string): Promise<void> =>
      unitOfWork(db, async (trx) => {
        await trx<UserRow>('user').where('id', toBinary(id)).update({ password_hash: passwordHash });
      }),

    /** Account (found or made) and membership together; 409 `person.already-here`. */
    addPerson: (centre: Buffer, given: { name: string; email: string; passwordHash: string }, place: Place, now: number): Promise<{ id: string; made: boolean }> =>
      unitOfWork(db, async (trx) => {
        const account = await accountFor(trx, given, now);
        await insertMembership(trx, centre, account.id, place, now);
        return account;
      }, { repeatOnDuplicate: ['user_email'] }),

    addMembership: (centre: Buffer, user: string, place: Place, now: number): Promise<void> => unitOfWork(db, (trx) => insertMembership(trx, centre, user, place, now)),

    changePlace: (centre: Buffer, user: string, place: Place): Promise<void> =>
      unitOfWork(db, async (trx) => {
        await lockedMember(trx, centre, user, place.role !== 'manager');
        await memberships(trx, centre, user).update({ role: place.role });
        await trx('membership_league').where({ centre_id: centre, user_id: toBinary(user) }).delete();
        await insertLeagues(trx, centre, user, place.leagues);
      }),

    removePerson: (centre: Buffer, user: string): Promise<void> =>
      unitOfWork(db, async (trx) => {
        await lockedMember(trx, centre, user, true);
        await memberships(trx, centre, user).delete();
      }),
  };
}

const memberships = (trx: Knex, centre: Buffer, user: string) => trx<MembershipRow>('membership').where({ centre_id: centre, user_id: toBinary(user) });

/** Locks the centre's memberships, so that two managers can't remove each other at once. */
async function lockedMember(trx: Knex.Transaction, centre: Buffer, user: string, leaves: boolean): Promise<void> {
  const members = await trx<MembershipRow>('membership').where('centre_id', centre).forUpdate();
  const member = members.find((row) => row.user_id.equals(toBinary(user)));
  if (member === undefined) throw notFound('person.unknown');
  const managers = members.filter((row) => row.role === 'manager').length;
  if (leaves && member.role === 'manager' && managers === 1) throw conflict('person.last-manager');
}

async function insertMembership(trx: Knex.Transaction, centre: Buffer, user: string, place: Place, now: number): Promise<void> {
  try {
    await trx<MembershipRow>('membership').insert({ centre_id: centre, user_id: toBinary(user), role: place.role, created_at: toRowTime(now) });
  } catch (error) {
    if (isDuplicate(error, 'PRIMARY')) throw conflict('person.already-here');
    throw error;
  }
  await insertLeagues(trx, centre, user, place.leagues);
}

async function insertLeagues(trx: Knex.Transaction, centre: Buffer, user: string, leagues: readonly string[]): Promise<void> {
  const rows = [...new Set(leagues)].map((league) => ({ centre_id: centre, user_id: toBinary(user), league_id: toBinary(league) }));
  if (rows.length > 0) await trx('membership_league').insert(rows);
}
