/** Who may do what: one table. Every contract and every room names a row; the server decides, the client only hides. */

export const ROLES = ['manager', 'desk', 'mechanic', 'secretary', 'display'] as const;
export type Role = (typeof ROLES)[number];

export interface Membership {
  centre: string;
  role: Exclude<Role, 'display'>;
  /** Ids of the leagues that a secretary sees; empty for the others. */
  leagues: readonly string[];
}

export type Actor =
  | { kind: 'nobody' }
  | { kind: 'user'; id: string; name: string; email: string; memberships: readonly Membership[] }
  | { kind: 'display'; link: string; centre: string }
  | { kind: 'gateway'; gateway: string; centre: string; name: string }
  | { kind: 'job'; name: string };

/** What is touched: a centre by its slug and, where it is one league's matter, that league's id. */
export interface Resource {
  centre?: string;
  league?: string;
}

export type Verdict = 'ok' | 'unauthenticated' | 'hidden' | 'forbidden';

const everybody = ['manager', 'desk', 'mechanic', 'secretary', 'display'] as const;
const staff = ['manager', 'desk', 'mechanic'] as const;

interface CentreRow {
  to: readonly Role[];
  ownLeague?: boolean;
}
/** `identified`: somebody signed in or a display; `signed-in`: a person. */
type Row = { to: 'public' } | { to: 'identified' } | { to: 'signed-in' } | { to: 'gateway' } | CentreRow;

export const POLICY = {
  'public': { to: 'public' },
  'identity.see': { to: 'identified' },
  'account.own': { to: 'signed-in' },
  'events.report': { to: 'gateway' },
  'floor.see': { to: everybody },
  'lane.operate': { to: ['manager', 'desk'] },
  'lane.service': { to: staff },
  'call.see': { to: staff },
  'call.raise': { to: staff },
  'call.work': { to: ['manager', 'mechanic'] },
  /** Dangers are the desk's to answer too; the command refuses it a machine call. */
  'call.answer': { to: staff },
  /** Only the manager records that a lock left behind was removed by the centre's procedure. */
  'lockout.left-behind': { to: ['manager'] },
  'run.see': { to: staff },
  'run.record': { to: ['manager', 'mechanic'] },
  'pattern.edit': { to: ['manager', 'mechanic'] },
  'league.see': { to: [...staff, 'secretary'], ownLeague: true },
  'league.edit': { to: ['manager', 'desk'] },
  'readiness.see': { to: [...staff, 'secretary'], ownLeague: true },
  'readiness.confirm': { to: ['secretary'], ownLeague: true },
  'readiness.settle': { to: ['manager', 'desk'] },
  'figures.see': { to: ['manager'] },
  'settings.see': { to: ['manager', 'mechanic'] },
  'settings.edit': { to: ['manager'] },
  'people.manage': { to: ['manager'] },
} as const satisfies Record<string, Row>;

export type Permission = keyof typeof POLICY;

/**
 * Nobody signed in where somebody must be: `unauthenticated` (401). Another centre's thing, or another league's for a
 * secretary: `hidden` (404), as if it weren't there. The wrong role in one's own centre: `forbidden` (403).
 */
export function decide(permission: Permission, actor: Actor, resource: Resource): Verdict {
  const row: Row = POLICY[permission];
  if (row.to === 'public') return 'ok';
  if (actor.kind === 'nobody') return 'unauthenticated';
  if (actor.kind === 'job') return 'ok';
  if (row.to === 'gateway') return actor.kind === 'gateway' ? 'ok' : 'forbidden';
  if (row.to === 'identified') return actor.kind === 'user' || actor.kind === 'display' ? 'ok' : 'forbidden';
  if (row.to === 'signed-in') return actor.kind === 'user' ? 'ok' : 'forbidden';
  return decideInCentre(row, actor, resource);
}

function decideInCentre(row: CentreRow, actor: Actor, resource: Resource): Verdict {
  const place = placeOf(actor, resource.centre);
  if (!place) return 'hidden';
  if (!row.to.includes(place.role)) return 'forbidden';
  if (row.ownLeague && place.role === 'secretary' && resource.league !== undefined && !place.leagues.includes(resource.league)) return 'hidden';
  return 'ok';
}

function placeOf(actor: Actor, centre: string | undefined): { role: Role; leagues: readonly string[] } | null {
  if (actor.kind === 'display') return actor.centre === centre ? { role: 'display', leagues: [] } : null;
  if (actor.kind !== 'user') return null;
  return actor.memberships.find((m) => m.centre === centre) ?? null;
}

/** Role of somebody in a centre, for what the client shows. */
export const roleIn = (actor: Actor, centre: string): Role | null => placeOf(actor, centre)?.role ?? null;

/** What a role sees in the navigation; the server decides all the same. */
export const roleMay = (role: Role, permission: Permission): boolean => {
  const row: Row = POLICY[permission];
  return typeof row.to === 'string' ? row.to !== 'gateway' : row.to.includes(role);
};
