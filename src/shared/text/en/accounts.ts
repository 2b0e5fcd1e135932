import type { Role } from '../../policy/policy.ts';
import { waitText } from './http.ts';
import type { Sentences } from './sentences.ts';

export const signInText = {
  title: 'Sign in to your centre',
  email: 'Email address',
  password: 'Password',
  submit: 'Sign in',
  submitting: 'Signing in',
  noAccount: 'No account? The manager of your centre makes one for you.',
} as const;

export const accountText = {
  title: 'Your account', loading: 'Fetching where you are signed in', password: 'Password', present: 'Present password', next: 'New password', nextHint: 'Twelve characters or more; several words are easiest to remember.',
  endsOthers: 'Changing it ends all other sign-ins.', change: 'Change password', changed: 'The password is changed; all other sign-ins have ended.', signIns: 'Where you are signed in', here: 'this browser',
  /** `Chrome on Linux`; what is no browser by its own name. */
  browser: ({ browser, system, program }: { browser: string | null; system: string | null; program: string }) => (browser ? `${browser}${system ? ` on ${system}` : ''}` : program || 'A program without a name'),
  end: 'Sign out there',
  since: (when: string) => `since ${when}`, seen: (when: string) => `last used ${when}`,
} as const;

export const roleText: Record<Role, string> = { manager: 'Manager', desk: 'Desk', mechanic: 'Mechanic', secretary: 'League secretary', display: 'Display' };

export const refusals: Sentences = {
  'session.wrong': () => 'Email address and password don’t fit together.',
  'session.too-many-tries': ({ retryAfterS }) => `Too many wrong tries. Try again in ${waitText(Number(retryAfterS ?? 60))}.`,
  'session.unknown': () => 'This sign-in has ended already.',
  'display.unknown': () => 'This display link is unknown or was revoked. The manager can make a new one.',
  'person.email-taken': () => 'There is an account with this address already.',
  'person.unknown': () => 'Nobody of this centre is meant. The list may have changed: load it again.',
  'person.already-here': () => 'Somebody with this address belongs to the centre already.',
  'person.last-manager': () => 'A centre keeps one manager at least. Make somebody else manager first.',
  'person.leagues-of-secretary-only': () => 'Only a league secretary has leagues of their own.',
  'league.not-here': () => 'This league isn’t one of the centre’s.',
  'password.wrong': () => 'This isn’t your present password.',
  'password.too-short': ({ min }) => `At least ${String(min ?? 12)} characters.`,
  'password.too-common': () => 'Too easy to guess. Take several words that have nothing to do with each other.',
  'password.about-you': () => 'Your name or address is the first thing others try. Take something else.',
};
