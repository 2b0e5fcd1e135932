import { accountContracts as c, type Identity } from '#shared/contracts/accounts.ts';
import type { Actor } from '#shared/policy/policy.ts';
import { Refusal } from '#server/platform/http/refusal.ts';
import { serve, type Route } from '#server/platform/http/route.ts';
import type { DisplayCommands } from './displays.ts';
import type { PeopleCommands } from './people.ts';
import type { SignInCommands } from './sign-in.ts';

interface Parts {
  signIn: SignInCommands;
  people: PeopleCommands;
  displays: DisplayCommands;
  identityOf: (cookies: string | undefined) => Promise<Identity | null>;
}

/** Every route of accounts. */
export function accountRoutes({ signIn, people, displays, identityOf }: Parts): Route[] {
  return [
    serve(c.signIn, ({ body, http }) => signIn.signIn(body, http)),
    serve(c.signOut, ({ http }) => signIn.signOut(http)),
    serve(c.me, async ({ http }) => (await identityOf(http.cookies)) ?? nobody()),
    serve(c.sessions, async ({ actor, http }) => ({ sessions: await signIn.sessions(user(actor), http) })),
    serve(c.endSession, ({ actor, params }) => signIn.endSession(user(actor), params.session)),
    serve(c.changePassword, ({ actor, body, http }) => signIn.changePassword(user(actor), body, http)),
    serve(c.people, async ({ centre }) => ({ people: await people.list(centre) })),
    serve(c.addPerson, ({ centre, body }) => people.add(centre, body), { secret: true }),
    serve(c.changePerson, ({ centre, params, body }) => people.change(centre, params.person, body)),
    serve(c.removePerson, ({ centre, params }) => people.remove(centre, params.person)),
    serve(c.displays, async ({ centre }) => ({ displays: await displays.list(centre) })),
    serve(c.addDisplay, ({ centre, actor, body }) => displays.add(centre, body.name, user(actor).name), { secret: true }),
    serve(c.removeDisplay, ({ centre, params }) => displays.revoke(centre, params.display)),
    serve(c.openDisplay, ({ params, http }) => displays.open(params.token, http)),
  ];
}

function nobody(): never {
  throw new Refusal(401, 'session.required');
}

/** The policy rows of these routes let nobody else through. */
const user = (actor: Actor): Actor & { kind: 'user' } => (actor.kind === 'user' ? actor : nobody());
