import { intersect, subtract, total, union, type Span } from './spans.ts';

export type Downtime = {
  /** Down while the centre was open, ms. */
  total: number;
  /** Down while somebody wanted the lane (booked or occupied), ms; a part of `total`. */
  wanted: number;
  /** The stretches behind `total`: disjoint and sorted. */
  spans: Span[];
};

/**
 * Downtime of one lane: the union, never the sum, of its stretches from stop to restart or back in service,
 * clipped to opening hours. A stretch that hasn't ended must be closed by the caller at the time of asking.
 */
export function downtime(input: { down: readonly Span[]; opening: readonly Span[]; wanted: readonly Span[] }): Downtime {
  const spans = intersect(input.down, input.opening);
  return { total: total(spans), wanted: total(intersect(spans, input.wanted)), spans };
}

/**
 * League time lost on a pair, ms: the moments of the league's session in which at least one lane of the pair was down,
 * once for the pair, less those in which the league bowled on (on the other lane).
 */
export function leagueTimeLost(input: {
  left: readonly Span[];
  right: readonly Span[];
  league: readonly Span[];
  bowledOn: readonly Span[];
}): number {
  return total(subtract(intersect(union(input.left, input.right), input.league), input.bowledOn));
}
