import type { MemberRole } from '#shared/contracts/accounts.ts';
import type { Actor } from '#shared/policy/policy.ts';
import type { Deps } from '#server/deps.ts';
import { failureLimit } from '#server/platform/auth/failure-limit.ts';
import { hashPassword } from '#server/platform/auth/passwords.ts';
import { createSessions } from '#server/platform/auth/sessions.ts';
import type { CentreRef, Route } from '#server/platform/http/route.ts';
import { displayCommands } from './displays.ts';
import { createIdentify, type Identified } from './identify.ts';
import { peopleCommands, type LeaguesOf } from './people.ts';
import { accountReadModel } from './read-model.ts';
import { accountRoutes } from './routes.ts';
import { signInCommands } from './sign-in.ts';
import { accountStore } from './store.ts';
import { displayStore } from './store-displays.ts';

export { randomPassword } from '#server/platform/auth/passwords.ts';
export type { Identified } from './identify.ts';
export type { LeaguesOf } from './people.ts';

export interface Accounts {
  routes: Route[];
  /** Who sends this Cookie header: for HTTP and sockets alike. */
  authenticate(cookies: string | undefined): Promise<Actor>;
  /** The same, with the handle of the sign-in or link, which `onRevoked` names when it ends. */
  identify(cookies: string | undefined): Promise<Identified>;
  /** A new account of no centre; returns its id. 409 `person.email-taken`. */
  createAccount(given: { name: string; email: string; password: string }): Promise<string>;
  /** Adds somebody to a centre; ends their sessions. `leagues`: ids that a secretary sees, taken as they are. */
  addMembership(given: { user: string; centre: Pick<CentreRef, 'id'>; role: MemberRole; leagues?: readonly string[] }): Promise<void>;
  /** A link that opens the wall; `path` holds its token and is returned only here. */
  createDisplayLink(given: { centre: CentreRef; name: string; by: string }): Promise<{ id: string; path: string }>;
  /** Addresses of those who have one of these roles in a centre: who gets its mails. */
  emails(centre: Pick<CentreRef, 'id'>, roles: readonly MemberRole[]): Promise<string[]>;
  /** Calls back with the handle of each sign-in or link that ends before its time; returns how to stop listening. */
  onRevoked(listener: (handle: string) => void): () => void;
  /** Stops the timers of the sign-in limits. */
  stop(): void;
}

/** People, their sign-ins and rights in centres; displays. */
export function createAccounts(deps: Pick<Deps, 'db' | 'clock' | 'log' | 'config'>, others: { leaguesOf: LeaguesOf }): Accounts {
  const { db, clock, log, config } = deps;
  const listeners = new Set<(handle: string) => void>();
  const revoked = (handle: string) => listeners.forEach((listener) => listener(handle));
  const store = accountStore(db);
  const readModel = accountReadModel(db);
  const displayRows = displayStore(db);
  const sessions = createSessions(db, clock, config);
  const limit = failureLimit();
  const identify = createIdentify({ sessions, readModel, displays: displayRows, clock, config });
  const signIn = signInCommands({ sessions, store, readModel, limit, revoked, log });
  const people = peopleCommands({ store, readModel, clock, leaguesOf: others.leaguesOf, endSessions: signIn.endAll });
  const displays = displayCommands({ displays: displayRows, readModel, clock, config, revoked });

  return {
    routes: accountRoutes({ signIn, people, displays, identityOf: async (cookies) => (await identify(cookies)).identity }),
    identify,
    authenticate: async (cookies) => (await identify(cookies)).actor,
    createAccount: async ({ name, email, password }) => store.create({ name, email: email.trim().toLowerCase(), passwordHash: await hashPassword(password) }, clock.now()),
    async addMembership({ user, centre, role, leagues }) {
      await store.addMembership(centre.id, user, { role, leagues: leagues ?? [] }, clock.now());
      await signIn.endAll(user);
    },
    async createDisplayLink({ centre, name, by }) {
      const { display, path } = await displays.add(centre, name, by);
      return { id: display.id, path };
    },
    emails: (centre, roles) => readModel.emails(centre.id, roles),
    onRevoked(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    stop: limit.stop,
  };
}
