import type { Permission, Role } from '#shared/policy/policy.ts';
import { roleMay } from '#shared/policy/policy.ts';
import type { wording } from '#shared/text/en/app.ts';

export type PageName = keyof typeof wording.nav;
interface Entry {
  page: PageName;
  permission: Permission;
}

/** Order of the navigation; the policy table says who sees what. */
const ENTRIES: readonly Entry[] = [
  { page: 'floor', permission: 'floor.see' },
  { page: 'calls', permission: 'call.see' },
  { page: 'runs', permission: 'run.see' },
  { page: 'readiness', permission: 'readiness.see' },
  { page: 'leagues', permission: 'league.see' },
  { page: 'patterns', permission: 'run.see' },
  { page: 'numbers', permission: 'figures.see' },
];

export const pagesOf = (role: Role): PageName[] => ENTRIES.filter((e) => roleMay(role, e.permission)).map((e) => e.page);

/** Where a role starts: the secretary with readiness, the mechanic with calls on a phone, everybody else on the floor. */
export const homeOf = (role: Role): string => (role === 'display' ? 'wall' : role === 'secretary' ? 'readiness' : 'floor');
