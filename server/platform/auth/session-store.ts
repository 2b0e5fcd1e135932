import type { Knex } from 'knex';
import type { Adapter, DatabaseSession } from 'lucia';
import { fromRowTime, toRowTime } from '../db/row-times.ts';
import { fromBinary, toBinary } from '../db/uuid.ts';
import type { Clock } from '../clock.ts';
import { hashSecret } from './secrets.ts';

/** What a row knows besides the secret; instants in epoch ms. */
export interface SessionFacts {
  publicId: string;
  createdAt: number;
  seenAt: number;
  idleUntil: number;
  endsAt: number;
  idleMs: number;
  agent: string;
  address: string;
}

type Row = {
  id: Buffer; secret_hash: Buffer; user_id: Buffer; created_at: Date; seen_at: Date; idle_until: Date; ends_at: Date; idle_ms: number; agent: string; address: string;
};

/** Far beyond every limit of ours, so that lucia's own expiry, which reads the machine's clock, never decides. */
const NEVER_LUCIAS_MS = 365 * 24 * 3_600_000;

/**
 * Sessions in MariaDB for lucia, by the SHA-256 of their secret. The limits (idle, absolute) are kept here, by the clock that was
 * passed in: a session past one of them isn't found any more.
 */
export function sessionStore(db: Knex, clock: Clock) {
  const rows = () => db<Row>('user_session');
  const alive = () => rows().where('idle_until', '>', toRowTime(clock.now())).where('ends_at', '>', toRowTime(clock.now()));

  const adapter: Adapter = {
    async getSessionAndUser(secret) {
      const row = await alive().where('secret_hash', hashSecret(secret)).first();
      if (row === undefined) return [null, null];
      return [toLucia(secret, row), { id: fromBinary(row.user_id), attributes: {} }];
    },
    async getUserSessions(userId) {
      const found = await alive().where('user_id', toBinary(userId));
      return found.map((row) => toLucia('', row));
    },
    async setSession({ id, userId, attributes: facts }) {
      await rows().insert({
        id: toBinary(facts.publicId), secret_hash: hashSecret(id), user_id: toBinary(userId), created_at: toRowTime(facts.createdAt),
        seen_at: toRowTime(facts.seenAt), idle_until: toRowTime(facts.idleUntil), ends_at: toRowTime(facts.endsAt), idle_ms: facts.idleMs,
        agent: facts.agent, address: facts.address,
      });
    },
    // Lucia would set its own limit; ours is moved by `touch`.
    updateSessionExpiration: async () => undefined,
    async deleteSession(secret) {
      await rows().where('secret_hash', hashSecret(secret)).delete();
    },
    async deleteUserSessions(userId) {
      await rows().where('user_id', toBinary(userId)).delete();
    },
    async deleteExpiredSessions() {
      const now = toRowTime(clock.now());
      await rows().where('ends_at', '<=', now).orWhere('idle_until', '<=', now).delete();
    },
  };

  return {
    adapter,
    /** Somebody is there: the idle limit moves on. */
    async touch(publicId: string, idleMs: number): Promise<void> {
      const now = clock.now();
      await rows().where('id', toBinary(publicId)).update({ seen_at: toRowTime(now), idle_until: toRowTime(now + idleMs) });
    },
    /** True when it was there and this person's. */
    async deleteOwn(userId: string, publicId: string): Promise<boolean> {
      return (await rows().where({ id: toBinary(publicId), user_id: toBinary(userId) }).delete()) > 0;
    },
  };
}

function toLucia(secret: string, row: Row): DatabaseSession {
  const facts: SessionFacts = {
    publicId: fromBinary(row.id), createdAt: fromRowTime(row.created_at), seenAt: fromRowTime(row.seen_at), idleUntil: fromRowTime(row.idle_until),
    endsAt: fromRowTime(row.ends_at), idleMs: row.idle_ms, agent: row.agent, address: row.address,
  };
  return { id: secret, userId: fromBinary(row.user_id), expiresAt: new Date(Date.now() + NEVER_LUCIAS_MS), attributes: facts };
}
