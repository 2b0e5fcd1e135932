import { randomUUID } from 'node:crypto';
import type { MemberRole } from '#shared/contracts/accounts.ts';
import type { Accounts } from '#server/capabilities/accounts/index.ts';
import type { CentreRef } from '#server/platform/http/route.ts';

/** An account of the test's own, with what it takes to sign in. */
export interface TestPerson {
  id: string;
  name: string;
  email: string;
  password: string;
}

/** Makes an account; with `centre`, one that belongs there as `role`. */
export async function makePerson(accounts: Accounts, place?: { centre: CentreRef; role: MemberRole; leagues?: readonly string[] }): Promise<TestPerson> {
  const tag = randomUUID().slice(0, 8);
  const name = `${place?.role ?? 'Somebody'} ${tag}`;
  const given = { name, email: `${place?.role ?? 'somebody'}-${tag}@house.test`, password: `wood ink film ${tag}` };
  const id = await accounts.createAccount(given);
  if (place) await accounts.addMembership({ user: id, ...place });
  return { id, ...given };
}

/** Signs in over HTTP and returns the Cookie header of that browser. */
export async function signIn(url: string, person: TestPerson): Promise<string> {
  const response = await fetch(`${url}/api/session`, {
    method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ email: person.email, password: person.password }),
  });
  if (response.status !== 200) throw new Error(`${person.email} couldn't sign in: ${response.status} ${await response.text()}`);
  return cookieOf(response);
}

/** What a browser would send back of an answer's Set-Cookie headers. */
export function cookieOf(response: Response): string {
  return response.headers.getSetCookie().map((cookie) => cookie.split(';')[0]).join('; ');
}

/** A person of a role who is signed in. */
export async function signedIn(url: string, accounts: Accounts, place: { centre: CentreRef; role: MemberRole; leagues?: readonly string[] }): Promise<TestPerson & { cookie: string }> {
  const person = await makePerson(accounts, place);
  return { ...person, cookie: await signIn(url, person) };
}

/** Opens a new display link and returns the display's Cookie header. */
export async function openDisplay(url: string, accounts: Accounts, centre: CentreRef): Promise<{ id: string; cookie: string }> {
  const { id, path } = await accounts.createDisplayLink({ centre, name: 'Wall', by: 'test' });
  const response = await fetch(`${url}${path}`, { redirect: 'manual' });
  if (response.status !== 303) throw new Error(`The link doesn't open: ${response.status}`);
  return { id, cookie: cookieOf(response) };
}
