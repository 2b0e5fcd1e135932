import type { Role } from '../../policy/policy.ts';

/** Words of the frame around every page. */
export const wording = {
  product: 'Lanewright',
  close: 'Close',
  undo: 'Undo',
  dismiss: 'Dismiss',
  loading: 'Loading',
  skip: 'Skip to the page',
  mainNavigation: 'Main',
  account: 'Account',
  signOut: 'Sign out',
  settings: 'Settings',
  more: 'More',
  theme: 'Light or dark',
  themes: { system: 'As the system', light: 'Light', dark: 'Dark' },
  letterKeys: 'One-letter keys on the floor',
  live: 'live',
  starting: 'connecting',
  reconnecting: 'reconnecting',
  stale: 'not live',
  otherCentres: 'Other centres',
  retry: 'Try again',
  toFloor: 'To the floor',
  nav: {
    floor: 'Floor', calls: 'Calls', runs: 'Runs', patterns: 'Patterns', readiness: 'Readiness', leagues: 'Leagues', numbers: 'Numbers', settings: 'Settings',
  },
  /** The same, where a thumb's width is all there is. */
  navShort: {
    floor: 'Floor', calls: 'Calls', runs: 'Runs', patterns: 'Patterns', readiness: 'Ready', leagues: 'Leagues', numbers: 'Numbers', settings: 'Settings',
  },
  roles: { manager: 'Manager', desk: 'Desk', mechanic: 'Mechanic', secretary: 'League secretary', display: 'Display' } satisfies Record<Role, string>,
} as const;

export const appText = {
  openCalls: (count: number) => `${count} open ${count === 1 ? 'call' : 'calls'}`,
  asOf: (time: string) => `as of ${time}`,
  noNewsSince: (time: string) => `No news since ${time}`,
  noNewsYet: 'No news from the server yet',
  serverAway: 'The server does not answer.',
  serverAwayMore: 'What you see may be old, and nothing you press is kept. This page recovers by itself.',
  databaseAway: 'The database is away.',
  databaseAwayMore: 'What you see may be old, and nothing you press is kept. This page recovers by itself.',
  broken: 'This part of the page broke.',
  brokenMore: 'Nothing was lost: what you did before is stored. Load the page again; if it breaks again, tell the manager what you pressed.',
  notFound: 'Nothing is at this address.',
  notFoundMore: 'It may belong to another centre or league, or the link is old.',
  noCentre: 'You belong to no centre yet.',
  noCentreMore: 'A manager adds you to a centre; then it appears here.',
  chooseCentre: 'Choose a centre',
  centreAndRole: (centre: string, role: string) => `${centre} · ${role}`,
  away: 'Not sent: the server was not reached. Try again when the page is live.',
  documentTitle: (page: string, centre: string) => `${page} – ${centre} – Lanewright`,
} as const;
