import type { Identity, MemberRole, OwnSession } from '#shared/contracts/accounts.ts';
import type { FailureLimit } from '#server/platform/auth/failure-limit.ts';
import { hashPassword, PASSWORD_MIN, verifyPassword, weaknessOf } from '#server/platform/auth/passwords.ts';
import { sessionLimits } from '#server/platform/auth/session-limits.ts';
import type { Sessions } from '#server/platform/auth/sessions.ts';
import { invalid, notFound, Refusal } from '#server/platform/http/refusal.ts';
import type { HttpSide } from '#server/platform/http/route.ts';
import type { Logger } from '#server/platform/log.ts';
import { browserOf } from './browser.ts';
import { sessionHandle } from './identify.ts';
import type { accountReadModel } from './read-model.ts';
import type { accountStore } from './store.ts';

interface Parts {
  sessions: Sessions;
  store: ReturnType<typeof accountStore>;
  readModel: ReturnType<typeof accountReadModel>;
  limit: FailureLimit;
  revoked: (handle: string) => void;
  log: Logger;
}

type SignedIn = { id: string };

/** Signing in and out, one's own sessions and password. */
export function signInCommands({ sessions, store, readModel, limit, revoked, log }: Parts) {
  /** The account whose password this is; counts what fails. */
  async function proven(email: string, password: string, address: string, wrong: Refusal): Promise<string> {
    const id = await limit.attempt({ account: email, address }, async () => {
      const account = await store.byEmail(email);
      return (await verifyPassword(account?.passwordHash ?? null, password)) ? (account?.id ?? null) : null;
    });
    if (id !== null) return id;
    log.info({ address }, 'wrong password');
    throw wrong;
  }

  async function endOthers(user: string, keep: string | null): Promise<void> {
    for (const { publicId } of await sessions.list(user)) {
      if (publicId === keep) continue;
      await sessions.revoke(user, publicId);
      revoked(sessionHandle(publicId));
    }
  }

  return {
    async signIn(given: { email: string; password: string }, http: HttpSide): Promise<Identity> {
      const id = await proven(given.email, given.password, http.address, new Refusal(401, 'session.wrong'));
      const identity = await readModel.user(id);
      if (identity === null) throw new Refusal(401, 'session.wrong');
      const before = await sessions.close(http.cookies);
      if (before.session !== null) revoked(sessionHandle(before.session));
      await sessions.sweep();
      const roles = identity.centres.map((centre) => centre.role as MemberRole);
      const { cookie } = await sessions.open(id, sessionLimits(roles), { agent: http.agent, address: http.address });
      http.setCookie(cookie);
      return identity;
    },

    async signOut(http: HttpSide): Promise<{ ok: true }> {
      const { cookie, session } = await sessions.close(http.cookies);
      if (session !== null) revoked(sessionHandle(session));
      http.setCookie(cookie);
      return { ok: true };
    },

    async sessions(user: SignedIn, http: HttpSide): Promise<OwnSession[]> {
      const current = await sessions.read(http.cookies);
      return (await sessions.list(user.id)).map((s) => ({
        id: s.publicId, createdAt: s.createdAt, seenAt: s.seenAt, until: Math.min(s.idleUntil, s.endsAt), program: s.agent, ...browserOf(s.agent), address: s.address, current: s.publicId === current?.publicId,
      }));
    },

    async endSession(user: SignedIn, session: string): Promise<{ ok: true }> {
      if (!(await sessions.revoke(user.id, session))) throw notFound('session.unknown');
      revoked(sessionHandle(session));
      return { ok: true };
    },

    async changePassword(user: SignedIn & { name: string; email: string }, given: { present: string; next: string }, http: HttpSide): Promise<{ ok: true }> {
      await proven(user.email, given.present, http.address, invalid('password.wrong', '/present'));
      const weakness = weaknessOf(given.next, [user.name, user.email]);
      if (weakness !== null) throw invalid(weakness, '/next', { min: PASSWORD_MIN });
      await store.setPassword(user.id, await hashPassword(given.next));
      await endOthers(user.id, (await sessions.read(http.cookies))?.publicId ?? null);
      return { ok: true };
    },

    /** Ends whatever somebody has open, so that a role that changed is proven again. */
    async endAll(user: string): Promise<void> {
      for (const session of await sessions.revokeAll(user)) revoked(sessionHandle(session));
    },
  };
}

export type SignInCommands = ReturnType<typeof signInCommands>;
