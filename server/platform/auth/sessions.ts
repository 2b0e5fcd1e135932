import type { Knex } from 'knex';
import { Lucia, TimeSpan } from 'lucia';
import type { Config } from '../../config.ts';
import type { Clock } from '../clock.ts';
import { newId } from '../db/uuid.ts';
import { cookieName } from './cookies.ts';
import type { SessionLimits } from './session-limits.ts';
import { sessionStore, type SessionFacts } from './session-store.ts';

declare module 'lucia' {
  interface Register {
    Lucia: Lucia<SessionFacts>;
    DatabaseSessionAttributes: SessionFacts;
  }
}

/** A session as its owner and the sockets know it: never its secret. */
export interface KnownSession extends SessionFacts {
  userId: string;
}

export interface Sessions {
  /** A new session at every sign-in; returns the `Set-Cookie` value. */
  open(userId: string, limits: SessionLimits, from: { agent: string; address: string }): Promise<{ cookie: string; session: string }>;
  /** The live session of a Cookie header, or null. Counts as a sign of life. */
  read(cookies: string | undefined): Promise<KnownSession | null>;
  /** Ends the session of a Cookie header; returns its public id (null: there was none) and the cookie that clears it. */
  close(cookies: string | undefined): Promise<{ cookie: string; session: string | null }>;
  list(userId: string): Promise<KnownSession[]>;
  /** Ends one session of this person; false: no such. */
  revoke(userId: string, session: string): Promise<boolean>;
  /** Ends all of a person's sessions and returns their public ids. */
  revokeAll(userId: string): Promise<string[]>;
  /** Removes rows past their limits. */
  sweep(): Promise<void>;
}

/** A sign of life is written at most this often within the idle limit: reading the floor shall not write. */
const TOUCH_EVERY = 1 / 50;
const AGENT_MAX = 200;
/** Lucia's period is only the cookie's Max-Age: the longest absolute limit. The server decides earlier. */
const COOKIE_DAYS = 90;

/** Sign-in sessions on lucia; the only file that calls it. */
export function createSessions(db: Knex, clock: Clock, config: Pick<Config, 'https' | 'port'>): Sessions {
  const store = sessionStore(db, clock);
  const lucia = new Lucia(store.adapter, {
    sessionExpiresIn: new TimeSpan(COOKIE_DAYS, 'd'),
    sessionCookie: { name: cookieName('session', config), attributes: { secure: config.https, sameSite: 'lax', path: '/' } },
    getSessionAttributes: (facts) => facts,
  });
  const secretIn = (cookies: string | undefined) => lucia.readSessionCookie(cookies ?? '');
  const known = ({ id: _secret, expiresAt: _expiresAt, fresh: _fresh, ...facts }: Awaited<ReturnType<typeof lucia.getUserSessions>>[number]): KnownSession => facts;

  async function read(cookies: string | undefined): Promise<KnownSession | null> {
    const secret = secretIn(cookies);
    if (secret === null || secret === '') return null;
    const { session } = await lucia.validateSession(secret);
    if (session === null) return null;
    const facts = known(session);
    if (clock.now() - facts.seenAt > facts.idleMs * TOUCH_EVERY) await store.touch(facts.publicId, facts.idleMs);
    return facts;
  }

  const list = async (userId: string) => (await lucia.getUserSessions(userId)).map(known);

  return {
    read,
    list,
    async open(userId, limits, from) {
      const now = clock.now();
      const facts = { publicId: newId(now), createdAt: now, seenAt: now, idleUntil: now + limits.idleMs, endsAt: now + limits.absoluteMs, idleMs: limits.idleMs, agent: from.agent.slice(0, AGENT_MAX), address: from.address };
      const { id: secret } = await lucia.createSession(userId, facts);
      return { cookie: lucia.createSessionCookie(secret).serialize(), session: facts.publicId };
    },
    async close(cookies) {
      const secret = secretIn(cookies);
      const session = await read(cookies);
      if (secret !== null && session !== null) await lucia.invalidateSession(secret);
      return { cookie: lucia.createBlankSessionCookie().serialize(), session: session?.publicId ?? null };
    },
    revoke: (userId, session) => store.deleteOwn(userId, session),
    async revokeAll(userId) {
      const ended = await list(userId);
      await lucia.invalidateUserSessions(userId);
      return ended.map((session) => session.publicId);
    },
    sweep: () => lucia.deleteExpiredSessions(),
  };
}
