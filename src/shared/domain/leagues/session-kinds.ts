/** What a session can be; only a league has a season. */
export const SESSION_KINDS = ['league', 'tournament', 'party', 'open', 'practice', 'coaching', 'maintenance'] as const;
export type SessionKind = (typeof SESSION_KINDS)[number];

/** Kinds that a desk books for one evening. */
export const BOOKING_KINDS = ['tournament', 'party', 'open', 'practice', 'coaching', 'maintenance'] as const satisfies readonly SessionKind[];

/** Kinds whose readiness is watched: people who came to compete. */
export const WATCHED_KINDS: readonly SessionKind[] = ['league', 'tournament'];
