import type { Identity, MemberRole } from '#shared/contracts/accounts.ts';
import type { Actor } from '#shared/policy/policy.ts';
import { cookieName, readCookie } from '#server/platform/auth/cookies.ts';
import type { Sessions } from '#server/platform/auth/sessions.ts';
import type { Clock } from '#server/platform/clock.ts';
import type { Config } from '#server/config.ts';
import type { accountReadModel } from './read-model.ts';
import type { displayStore } from './store-displays.ts';

/** Who sends a Cookie header. `handle` names the sign-in or link by which they came, for what must end when it is revoked; null: nobody. */
export interface Identified {
  actor: Actor;
  identity: Identity | null;
  handle: string | null;
}

export const sessionHandle = (session: string): string => `session:${session}`;
export const displayHandle = (link: string): string => `display:${link}`;

const SEEN_EVERY_MS = 10 * 60_000;
const NOBODY: Identified = { actor: { kind: 'nobody' }, identity: null, handle: null };

interface Parts {
  sessions: Sessions;
  readModel: ReturnType<typeof accountReadModel>;
  displays: ReturnType<typeof displayStore>;
  clock: Clock;
  config: Pick<Config, 'https' | 'port'>;
}

/** A person's sign-in goes before a display's link when a browser holds both. */
export function createIdentify({ sessions, readModel, displays, clock, config }: Parts): (cookies: string | undefined) => Promise<Identified> {
  const displayCookie = cookieName('display', config);

  async function byDisplay(cookies: string): Promise<Identified> {
    const token = readCookie(cookies, displayCookie);
    const found = token === null ? null : await readModel.display(token);
    if (found === null) return NOBODY;
    const { identity, seenAt } = found;
    if (clock.now() - (seenAt ?? 0) > SEEN_EVERY_MS) await displays.saw(identity.id, clock.now());
    return { actor: { kind: 'display', link: identity.id, centre: identity.centres[0]?.slug ?? '' }, identity, handle: displayHandle(identity.id) };
  }

  return async (cookies) => {
    if (cookies === undefined) return NOBODY;
    const session = await sessions.read(cookies);
    const identity = session === null ? null : await readModel.user(session.userId);
    return session === null || identity === null ? byDisplay(cookies) : { actor: userOf(identity), identity, handle: sessionHandle(session.publicId) };
  };
}

function userOf({ id, name, email, centres }: Identity): Actor {
  const memberships = centres.map(({ slug, role, leagues }) => ({ centre: slug, role: role as MemberRole, leagues }));
  return { kind: 'user', id, name, email: email ?? '', memberships };
}
