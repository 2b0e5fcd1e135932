import { createContext, use } from 'react';
import { type Permission, type Role, roleMay } from '#shared/policy/policy.ts';

/** The centre in the address, and who looks at it. Set by the layout; pages only read it. */
export interface CentreHere {
  slug: string;
  name: string;
  /** IANA time zone. */
  zone: string;
  /** Minutes after midnight at which its business day begins. */
  cut: number;
  role: Role;
  /** The user's own id and name; null for a display. */
  me: { id: string; name: string } | null;
}

export const CentreContext = createContext<CentreHere | null>(null);

/** The centre of this page, with `may(permission)` for what to show; the server decides all the same. */
export function useCentre(): CentreHere & { may: (permission: Permission) => boolean } {
  const centre = use(CentreContext);
  if (!centre) throw new Error('useCentre stands outside a centre');
  return { ...centre, may: (permission) => roleMay(centre.role, permission) };
}
