import type { Fact } from './fact.ts';
import { compareFacts } from './order.ts';

/** (state, fact) → state, for facts in their order; never changes what it is given. */
export type Fold<S> = (state: S, fact: Fact) => S;

/** A few facts that follow one another, and the state before the first of them: a late fact refolds from here. */
interface Segment<S> {
  before: S;
  facts: readonly Fact[];
}

/**
 * Facts in their one order, folded. Never changed in place: states share what a fold didn't touch, so one kept every few facts
 * costs little, and an older timeline stays good for whoever holds it (a unit of work that fails drops its own and nothing else).
 */
export interface Timeline<S> {
  base: S;
  segments: readonly Segment<S>[];
  /** After all facts. */
  state: S;
}

/** Facts of a segment: what a fact that is a little late costs at least, against states kept. */
const SEGMENT = 32;

export const startTimeline = <S>(base: S): Timeline<S> => ({ base, segments: [], state: base });

export const factsOf = <S>(timeline: Timeline<S>): Fact[] => timeline.segments.flatMap((segment) => segment.facts);

/**
 * Puts facts in their places: those newer than all others are folded on, an older one folds anew from the newest state kept
 * before it. Facts that are there already (same time, source and id) change nothing. `refolded`: facts that were folded again.
 */
export function insert<S>(timeline: Timeline<S>, fold: Fold<S>, facts: readonly Fact[]): { timeline: Timeline<S>; refolded: number } {
  const fresh = distinct([...facts].sort(compareFacts));
  const first = fresh[0];
  if (!first) return { timeline, refolded: 0 };
  const newest = timeline.segments.at(-1)?.facts.at(-1);
  if (!newest || compareFacts(newest, first) < 0) return { timeline: grown(timeline, fold, fresh), refolded: 0 };
  const place = segmentOf(timeline.segments, first);
  const later = timeline.segments.slice(place).flatMap((segment) => segment.facts);
  const before = timeline.segments[place]?.before ?? timeline.base;
  const start = { base: timeline.base, segments: timeline.segments.slice(0, place), state: before };
  return { timeline: grown(start, fold, distinct(merged(later, fresh))), refolded: later.length };
}

/** The same facts upon another base. */
export function rebased<S>(timeline: Timeline<S>, fold: Fold<S>, base: S): Timeline<S> {
  return grown(startTimeline(base), fold, factsOf(timeline));
}

function grown<S>(timeline: Timeline<S>, fold: Fold<S>, facts: readonly Fact[]): Timeline<S> {
  const segments = [...timeline.segments];
  let last = segments.pop() ?? { before: timeline.base, facts: [] };
  let room: Fact[] = [...last.facts];
  let state = timeline.state;
  for (const fact of facts) {
    if (room.length >= SEGMENT) {
      segments.push({ before: last.before, facts: room });
      last = { before: state, facts: [] };
      room = [];
    }
    room.push(fact);
    state = fold(state, fact);
  }
  if (room.length > 0) segments.push({ before: last.before, facts: room });
  return { base: timeline.base, segments, state };
}

/** The last segment that doesn't begin after this fact; the first one where all do. */
function segmentOf<S>(segments: readonly Segment<S>[], fact: Fact): number {
  let low = 0;
  let high = segments.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    const begin = segments[middle]?.facts[0];
    if (begin && compareFacts(begin, fact) <= 0) low = middle;
    else high = middle - 1;
  }
  return low;
}

function merged(a: readonly Fact[], b: readonly Fact[]): Fact[] {
  const all: Fact[] = [];
  let i = 0;
  for (const fact of b) {
    for (let next = a[i]; next && compareFacts(next, fact) <= 0; next = a[++i]) all.push(next);
    all.push(fact);
  }
  return all.concat(a.slice(i));
}

/** Of sorted facts, each once; the first stays. */
function distinct(facts: readonly Fact[]): Fact[] {
  return facts.filter((fact, i) => i === 0 || compareFacts(facts[i - 1] ?? fact, fact) !== 0);
}
