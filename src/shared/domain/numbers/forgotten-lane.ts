import type { Span } from './spans.ts';

/** A lane forgotten open counts as in use until this long after its last delivery. A centre can set another. */
export const FORGOTTEN_AFTER = 10 * 60 * 1000;

/**
 * The stretch a lane was really in use: from opening to closing, but at most FORGOTTEN_AFTER past its last delivery
 * (past its opening, when nobody bowled).
 * @param lastDelivery UTC epoch ms, or null without a delivery.
 */
export function usedSpan(open: Span, lastDelivery: number | null, after = FORGOTTEN_AFTER): Span {
  const last = Math.max(open.from, lastDelivery ?? open.from);
  return { from: open.from, to: Math.max(open.from, Math.min(open.to, last + after)) };
}
