import type { Role } from '#shared/policy/policy.ts';

export interface SessionLimits {
  /** Ends after this long without a request, ms. */
  idleMs: number;
  /** Ends this long after sign-in in any case, ms. */
  absoluteMs: number;
}

const HOUR = 3_600_000;
const DAY = 24 * HOUR;

/**
 * By what a stranger at the screen could do (own judgement; OWASP ASVS 5.0, 7.3 asks for both limits by risk). Desk and manager sit at
 * screens that others pass; a mechanic's phone lasts a shift and the next days; a secretary looks once a week.
 */
const LIMITS: Record<Exclude<Role, 'display'>, SessionLimits> = {
  manager: { idleMs: 4 * HOUR, absoluteMs: DAY },
  desk: { idleMs: 12 * HOUR, absoluteMs: DAY },
  mechanic: { idleMs: 2 * DAY, absoluteMs: 7 * DAY },
  secretary: { idleMs: 14 * DAY, absoluteMs: 90 * DAY },
};

/** The strictest of somebody's roles; without any, as strict as a manager. */
export function sessionLimits(roles: readonly Exclude<Role, 'display'>[]): SessionLimits {
  const limits = (roles.length > 0 ? roles : (['manager'] as const)).map((role) => LIMITS[role]);
  return { idleMs: Math.min(...limits.map((l) => l.idleMs)), absoluteMs: Math.min(...limits.map((l) => l.absoluteMs)) };
}
