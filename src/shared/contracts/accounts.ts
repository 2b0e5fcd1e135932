import * as z from 'zod/mini';
import { centreParams, contract, instant, line, none, ok, uuid } from './contract.ts';

/** Roles that a person can have in a centre. */
export const MEMBER_ROLES = ['manager', 'desk', 'mechanic', 'secretary'] as const;
export type MemberRole = (typeof MEMBER_ROLES)[number];

/** Lower case, so that an address is one person. */
export const email = z.string().check(z.trim(), z.toLowerCase(), z.maxLength(254), z.regex(/^[^\s@\p{Cc}]+@[^\s@\p{Cc}]+\.[^\s@\p{Cc}]+$/u));
/** A password as typed at sign-in; whether a new one is strong enough is judged where it is set. */
const typedPassword = z.string().check(z.minLength(1), z.maxLength(200));
/** Of a display link; one that is no token is as unknown as one that was never made. */
const token = z.string().check(z.maxLength(100));

export const identity = z.object({
  kind: z.enum(['user', 'display']),
  /** A person's id, or the link's. */
  id: uuid,
  name: z.string(),
  email: z.nullable(z.string()),
  centres: z.array(z.object({ slug: z.string(), name: z.string(), zone: z.string(), /** Minutes after midnight at which its business day begins. */ cut: z.int(), role: z.enum([...MEMBER_ROLES, 'display']), leagues: z.array(uuid) })),
});
export type Identity = z.infer<typeof identity>;

export const ownSession = z.object({
  id: uuid, createdAt: instant, seenAt: instant, /** When it ends if nothing is heard of it. */ until: instant, /** As it names itself. */ program: z.string(), browser: z.nullable(z.string()), system: z.nullable(z.string()), address: z.string(), current: z.boolean(),
});
export type OwnSession = z.infer<typeof ownSession>;

export const person = z.object({ id: uuid, name: z.string(), email: z.string(), role: z.enum(MEMBER_ROLES), leagues: z.array(uuid), since: instant });
export type Person = z.infer<typeof person>;

export const displayLink = z.object({ id: uuid, name: z.string(), createdAt: instant, createdBy: z.string(), seenAt: z.nullable(instant) });
export type DisplayLink = z.infer<typeof displayLink>;

const place = z.object({ role: z.enum(MEMBER_ROLES), leagues: z._default(z.array(uuid).check(z.maxLength(20)), []) });
const people = '/api/centres/:centre/people';
const personParams = z.extend(centreParams, { person: uuid });
const displays = '/api/centres/:centre/displays';
const placeRefusals = ['person.leagues-of-secretary-only', 'league.not-here'];

export const accountContracts = {
  signIn: contract({
    id: 'session.open', method: 'POST', path: '/api/session', permission: 'public', summary: 'Sign in: a new session in an HttpOnly cookie',
    body: z.object({ email, password: typedPassword }), response: identity, refusals: ['session.wrong', 'session.too-many-tries'],
  }),
  signOut: contract({ id: 'session.close', method: 'DELETE', path: '/api/session', permission: 'public', summary: 'Sign out; without a session it changes nothing', response: ok }),
  me: contract({ id: 'me.see', method: 'GET', path: '/api/me', permission: 'identity.see', summary: 'Who is signed in, and in which centres', response: identity }),
  sessions: contract({
    id: 'me.sessions', method: 'GET', path: '/api/me/sessions', permission: 'account.own', summary: 'Where one is signed in', response: z.object({ sessions: z.array(ownSession) }),
  }),
  endSession: contract({
    id: 'me.endSession', method: 'DELETE', path: '/api/me/sessions/:session', permission: 'account.own', summary: 'End one of one’s own sessions',
    params: z.object({ session: uuid }), response: ok, refusals: ['session.unknown'],
  }),
  changePassword: contract({
    id: 'me.changePassword', method: 'PUT', path: '/api/me/password', permission: 'account.own', summary: 'Change one’s own password; ends all other sessions',
    body: z.object({ present: typedPassword, next: typedPassword }), response: ok,
    refusals: ['password.wrong', 'password.too-short', 'password.too-common', 'password.about-you', 'session.too-many-tries'],
  }),
  people: contract({
    id: 'people.list', method: 'GET', path: people, permission: 'people.manage', summary: 'Who belongs to the centre', params: centreParams, response: z.object({ people: z.array(person) }),
  }),
  addPerson: contract({
    id: 'people.add', method: 'POST', path: people, permission: 'people.manage', summary: 'Add somebody; a new account gets a random password, shown in this answer only', params: centreParams, status: 201,
    body: z.extend(place, { name: line(80), email }),
    response: z.object({ person, /** Null: the account exists and keeps its password. */ password: z.nullable(z.string()) }),
    refusals: ['person.already-here', ...placeRefusals],
  }),
  changePerson: contract({
    id: 'people.change', method: 'PUT', path: `${people}/:person`, permission: 'people.manage', summary: 'Give another role, or other leagues; ends the person’s sessions',
    params: personParams, body: place, response: person, refusals: ['person.unknown', 'person.last-manager', ...placeRefusals],
  }),
  removePerson: contract({
    id: 'people.remove', method: 'DELETE', path: `${people}/:person`, permission: 'people.manage', summary: 'Remove somebody from the centre; ends the person’s sessions',
    params: personParams, response: ok, refusals: ['person.unknown', 'person.last-manager'],
  }),
  displays: contract({
    id: 'displays.list', method: 'GET', path: displays, permission: 'people.manage', summary: 'Links that open the wall', params: centreParams, response: z.object({ displays: z.array(displayLink) }),
  }),
  addDisplay: contract({
    id: 'displays.add', method: 'POST', path: displays, permission: 'people.manage', summary: 'Make a link that opens the wall; its address is shown in this answer only', params: centreParams, status: 201,
    body: z.object({ name: line(60) }), response: z.object({ display: displayLink, /** Path of the link: `/d/…`. */ path: z.string() }),
  }),
  removeDisplay: contract({
    id: 'displays.revoke', method: 'DELETE', path: `${displays}/:display`, permission: 'people.manage', summary: 'Revoke a link: screens that it opened lose the wall at once',
    params: z.extend(centreParams, { display: uuid }), response: ok, refusals: ['display.unknown'],
  }),
  openDisplay: contract({
    id: 'displays.open', method: 'GET', path: '/d/:token', permission: 'public', summary: 'Swap a link’s token for an HttpOnly cookie and go to the wall',
    params: z.object({ token }), status: 303, response: none, refusals: ['display.unknown'],
  }),
};
